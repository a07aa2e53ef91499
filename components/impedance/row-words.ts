import type { LengthUnit } from "@/lib/client/preferences";
import { NO_VALUE } from "@/lib/si/units";
import { lengthDigits } from "./grids";
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

/** A share of production: "99.8", and never 100 where some of it is left out. */
export function yieldPercent(share: number): string {
  const percent = 100 * share;
  if (percent >= 99.95 && share < 1) return percent >= 99.995 ? "> 99.9" : "99.9";
  if (percent > 0 && percent < 0.05) return "< 0.1";
  return percent.toFixed(1);
}

/** The formula's difference to the field solution, signed [%]. */
export function formulaDifference({ now }: Pick<ImpedanceRow, "now">): number | null {
  if (!now?.ok || !now.value.formula) return null;
  return (100 * (now.value.formula.ohms - now.value.impedance)) / now.value.impedance;
}

/** What is to be said of a row beyond its numbers; the gravest first. */
export function remarks(row: ImpedanceRow, unit: LengthUnit, short = false): string[] {
  const { meets, now, spread } = row;
  const said = capabilityWords(row, unit, short);
  if (meets && !meets.ok)
    said.push(
      meets.reachable
        ? `out of reach: ${ohms(meets.reachable.min)} to ${ohms(meets.reachable.max)}\u2009Ω`
        : meets.reason,
    );
  if (now && !now.ok && now.reason !== (meets && !meets.ok ? meets.reason : "")) said.push(now.reason);
  if (spread && !spread.ok && now?.ok) said.push(spread.reason);
  if (row.width === null) said.push("no width yet");
  else if (row.gapAssumed) said.push("no gap yet");
  if (row.gapAssumed && meets?.ok) said.push(`gap of ${lengthDigits(row.gap ?? 0, unit)} ${unit} assumed`);
  if (now?.ok && now.value.formula && !now.value.formula.inRange) said.push("formula beyond its range");
  return said;
}

/** What of a row's width and gap, or of those that would meet, lies below what is etched there. */
export function capabilityWords(
  row: Pick<ImpedanceRow, "least" | "width" | "gap" | "gapAssumed" | "meets">,
  unit: LengthUnit,
  short = false,
): string[] {
  const { least, width, gap, gapAssumed, meets } = row;
  if (!least) return [];
  const under = (value: number | null, limit: number) => value !== null && value < limit * (1 - 1e-9);
  const words: string[] = [];
  const say = (what: string, metres: number) => {
    const limit = `${lengthDigits(metres, unit)} ${unit}`;
    words.push(short ? `${what} < ${limit}` : `${what} is below the least etched here, ${limit}`);
  };
  if (under(width, least.minWidth)) say("width", least.minWidth);
  if (!gapAssumed && under(gap, least.minGap)) say("gap", least.minGap);
  if (words.length === 0 && meets?.ok && under(meets.value.dimension, least.minWidth))
    say(short ? "meets" : "the width that meets", least.minWidth);
  return words;
}
