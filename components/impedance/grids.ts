import type { LengthUnit } from "@/lib/client/preferences";
import { toSi } from "@/lib/si/units";

/** Steps on which widths are given: those that layout programs and fabricators work in. */
export const gridNames = ["1 µm", "5 µm", "10 µm", "0.1 mil", "0.25 mil", "0.5 mil"] as const;
export type GridName = (typeof gridNames)[number];

export const defaultGrid: Record<LengthUnit, GridName> = { mm: "5 µm", mil: "0.1 mil" };

/** [m] */
export function gridStep(grid: GridName): number {
  const [value = "1", unit = "µm"] = grid.split(" ");
  return toSi({ value, unit }, "length");
}

/** The same for a column of lengths: to the micrometre or the tenth of a mil, further only where there is more. */
export function columnDigits(metres: number, unit: LengthUnit): string {
  const digits = lengthDigits(metres, unit);
  const least = unit === "mm" ? 3 : 1;
  return (digits.split(".")[1]?.length ?? 0) < least ? Number(digits).toFixed(least) : digits;
}

/** A length as digits in a unit: as many as its grid needs, without zeros at the end. */
export function lengthDigits(metres: number, unit: LengthUnit): string {
  const factor = unit === "mm" ? 1e-3 : 25.4e-6;
  return String(Number((metres / factor).toFixed(unit === "mm" ? 4 : 3)));
}
