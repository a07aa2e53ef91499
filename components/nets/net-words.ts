import type { NetRow } from "@/lib/client/nets";
import { formatSiParts } from "@/lib/si/units";

export const SCOPE_WORDS: Record<NetRow["scope"], string> = {
  in: "In scope",
  out: "Out of scope",
  incomplete: "Incomplete route",
};

export const KIND_WORDS: Record<string, string> = {
  signal: "Signal",
  power: "Power",
  ground: "Ground",
  static: "Static",
  test: "Test",
};

/** "Out of scope, power"; "In scope". */
export function scopeWords(net: Pick<NetRow, "scope" | "scopeKind">): string {
  const kind = net.scope === "out" && net.scopeKind !== "signal" ? `, ${net.scopeKind}` : "";
  return `${SCOPE_WORDS[net.scope]}${kind}`;
}

/** A length in the reader's unit, to a tenth of a micrometre or a hundredth of a mil. */
export function lengthParts(length_m: number, unit: "mm" | "mil"): { text: string; unit: string } {
  return formatSiParts(length_m, "length", { unit, decimals: unit === "mm" ? 3 : 1 });
}

/** 1 net, 12 nets. */
export function counted(count: number, noun: string): string {
  return `${count.toLocaleString("en")} ${noun}${count === 1 ? "" : "s"}`;
}
