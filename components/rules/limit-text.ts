import { convert, type Dimension, parseQuantity } from "@/lib/si/units";

/** Units of rules that are physical; the others are shares and ratios, typed bare. */
const DIMENSIONS: Readonly<Record<string, Dimension>> = {
  V: "voltage",
  mV: "voltage",
  ps: "time",
  ns: "time",
  s: "time",
};

const NUMBER = /^[+-]?(\d+(\.\d*)?|\.\d+)(e[+-]?\d{1,2})?$/i;

/**
 * Reads a limit as typed into decimal text in the rule's own unit: "300 mV" for a rule in volts is "0.3". Empty is no
 * limit of the project's own.
 * @throws RangeError with a sentence for the screen
 */
export function readLimit(typed: string, unit: string): string | null {
  const text = typed.trim().replace(/\u2212/g, "-");
  if (text === "") return null;
  const dimension = DIMENSIONS[unit];
  if (dimension) return convert(parseQuantity(text, dimension, unit), unit).value;
  const bare = (text.endsWith(unit) ? text.slice(0, -unit.length) : text)
    .replace(/[%×]$/, "")
    .trim()
    .replace(",", ".");
  if (!NUMBER.test(bare))
    throw new RangeError(
      `'${text.slice(0, 40)}' is not a number. Write it in ${unit === "1" ? "times, such as 0.17" : unit}.`,
    );
  return bare;
}
