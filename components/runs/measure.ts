import type { TableNumber } from "@/components/ui/data-table";
import { numberText } from "@/lib/drawings/number-text";

/** Decimals that a rule's unit is worth: a millivolt, a picosecond, a tenth of a percent. */
const DECIMALS: Readonly<Record<string, number>> = { V: 3, mV: 0, ps: 0, ns: 2, "1": 2 };

/** A rule's unit as it is read: a ratio is "times". */
export const unitText = (unit: string) => (unit === "1" ? "×" : unit);

/** A value in its rule's unit, or null where there is none: never NaN. */
export function measure(
  value: number | null,
  unit: string | null,
  options: { signed?: boolean } = {},
): TableNumber | null {
  if (value === null || !Number.isFinite(value)) return null;
  const decimals = DECIMALS[unit ?? ""] ?? 1;
  const text = numberText(value, decimals, options.signed);
  return { text, unit: unit === null ? undefined : unitText(unit) };
}

/** The same as one run of text. */
export function measureText(
  value: number | null,
  unit: string | null,
  options: { signed?: boolean } = {},
): string {
  const number = measure(value, unit, options);
  return number ? `${number.text}${number.unit ? `\u2009${number.unit}` : ""}` : "no value";
}

/** A margin as a share of its limit, in percent. */
export function shareText(share: number | null): string {
  return share === null ? "no margin" : `${numberText(100 * share, 0, true)}\u2009%`;
}
