import { numberText, withUnit } from "@/lib/drawings/number-text";
import type { CornerName, Finding } from "@/lib/si/rules/types";

const DECIMALS: Record<string, number> = {
  V: 2,
  mV: 0,
  ps: 0,
  ns: 2,
  "%": 1,
  "% of bit": 1,
  "% of VDD": 1,
  Ω: 1,
  mm: 2,
};

/** As short as a column has room for; what the share is of, the rule's title says. */
export function shortUnit(unit: string): string {
  if (unit === "1") return "";
  return unit.startsWith("%") ? "%" : unit;
}

/** A value of a rule, in the rule's unit. */
export function findingNumber(value: number | null, unit: string, signed = false): string | null {
  if (value === null) return null;
  const decimals = DECIMALS[unit] ?? 2;
  return numberText(value, decimals, signed);
}

export function findingText(value: number | null, unit: string, signed = false): string {
  const number = findingNumber(value, unit, signed);
  if (number === null) return "no value";
  return unit === "1" ? number : withUnit(number, unit);
}

/** "fast driver, high impedance" */
export function cornerWords(corner: CornerName): string {
  const [speed, side] = corner.split("/");
  return `${speed} driver, ${side} impedance`;
}

/** "fails at 3 of 9 corners, at nominal too" */
export function failsWords(finding: Finding): string {
  if (finding.failsAt === 0) return "";
  const where = `fails at ${finding.failsAt} of ${finding.ofCorners}`;
  if (finding.ofCorners < 2) return where;
  return `${where}, ${finding.failsAtNominal ? "at nominal too" : "corner only"}`;
}

/** A day as a person reads it, the same on server and in browser. */
export function dayText(at: number): string {
  return new Date(at).toISOString().slice(0, 10);
}
