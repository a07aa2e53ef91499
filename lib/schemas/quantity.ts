import { z } from "zod";
import { formatSi, toSi, type Dimension } from "@/lib/si/units";

/** A decimal number as a person typed it: the truth from which `_m`, `_s` … columns are derived. */
export const decimalText = z
  .string()
  .trim()
  .regex(/^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d{1,2})?$/i, "Write a number, such as 0.127.");

interface Bounds {
  /** Smallest legal value in SI units. */
  min?: number;
  /** Largest legal value in SI units. */
  max?: number;
  /** When true, zero is refused. */
  positive?: boolean;
}

/** A typed value with its unit, checked to be of `dimension` and inside the bounds (SI). */
export function quantity(dimension: Dimension, bounds: Bounds = {}) {
  return z.object({ value: decimalText, unit: z.string().trim().min(1).max(12) }).superRefine((q, ctx) => {
    let si: number;
    try {
      si = toSi(q, dimension);
    } catch (error) {
      ctx.addIssue({ code: "custom", message: error instanceof Error ? error.message : "Not a quantity." });
      return;
    }
    const said = `${q.value} ${q.unit}`;
    if (bounds.positive && !(si > 0))
      ctx.addIssue({ code: "custom", message: `${said} must be above zero.` });
    if (bounds.min !== undefined && si < bounds.min)
      ctx.addIssue({
        code: "custom",
        message: `${said} is below ${bound(bounds.min, dimension)}, the smallest value allowed here.`,
      });
    if (bounds.max !== undefined && si > bounds.max)
      ctx.addIssue({
        code: "custom",
        message: `${said} is above ${bound(bounds.max, dimension)}, the largest value allowed here.`,
      });
  });
}

/** A limit in the unit that suits its size: "20 mm", "0 Ω". */
function bound(si: number, dimension: Dimension): string {
  return formatSi(si, dimension).replace(/\.(\d*?)0+(?=\D|$)/, (_, rest: string) => (rest ? `.${rest}` : ""));
}

/** Metres; up to 10 m, which no board reaches. */
export const length = quantity("length", { min: 0, max: 10 });
export const positiveLength = quantity("length", { positive: true, max: 10 });
/** Width or gap of a controlled line: 20 mm, beyond which a conductor is a plane. */
export const lineWidth = quantity("length", { positive: true, max: 0.02 });
export const time = quantity("time", { positive: true, max: 1 });
export const resistance = quantity("resistance", { min: 0, max: 1e9 });
export const capacitance = quantity("capacitance", { min: 0, max: 1 });
export const voltage = quantity("voltage", { min: -1000, max: 1000 });
export const frequency = quantity("frequency", { positive: true, max: 1e13 });

export type QuantityInput = z.infer<typeof length>;
