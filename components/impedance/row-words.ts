import { NO_VALUE } from "@/lib/si/units";
import type { ImpedanceRow } from "./impedance-rows";

/** Ohms for a column: two digits after the point below 10, one elsewhere. */
export function ohms(value: number | null | undefined): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return NO_VALUE;
  return value < 10 ? value.toFixed(2) : value.toFixed(1);
}

/** A deviation with its sign: "+1.2", "−0.4", "0.0". */
export function signedPercent(value: number): string {
  const digits = Math.abs(value).toFixed(1);
  return Number(digits) === 0 ? digits : `${value < 0 ? "−" : "+"}${digits}`;
}

/** What is to be said of a row beyond its numbers; the gravest first. */
export function remarks(row: ImpedanceRow): string[] {
  const said: string[] = [];
  const { width0, now } = row;
  if (!width0.ok)
    said.push(
      width0.reachable
        ? `out of reach: ${ohms(width0.reachable.min)} to ${ohms(width0.reachable.max)}\u2009Ω`
        : width0.reason,
    );
  if (now && !now.ok && now.reason !== (width0.ok ? "" : width0.reason)) said.push(now.reason);
  if (now?.ok && !now.value.inRange) said.push("beyond the formula’s range");
  else if (width0.ok && !width0.value.inRange) said.push("beyond the formula’s range there");
  if (row.width === null) said.push("no width yet");
  else if (row.gapAssumed) said.push("no gap yet");
  if (row.gapAssumed && width0.ok) said.push("gap assumed");
  return said;
}
