import { DomainError } from "../errors";
import { Decimal } from "./decimal";
import { readDecimal } from "./parse-number";
import { parseQuantity } from "./parse-quantity";
import type { Dimension, Quantity } from "./quantity";

/** Dimensions that a two-terminal part's value can have, and the unit of a bare number. */
export type PartDimension = Extract<Dimension, "resistance" | "capacitance" | "inductance">;
const SI_UNITS: Record<PartDimension, string> = { resistance: "Ω", capacitance: "F", inductance: "H" };

/** Where a rating may follow the value: "100n/16V X7R", "33R 1%", "10k±5%". */
const SEPARATOR = /[\s,;/@]+|(?=±|\+\/-)/gu;
/** What follows a bare number and is no part of it: a tolerance, a rating, a size code. */
const RATING =
  /^(?:[±+/-]*\d+(?:[.,/]\d+)?\s*(?:%|m?[WVA]|ppm)|0201|0402|0603|0805|1206|1210|1812|2010|2512)(?=$|[\s,;/@])/iu;
const NOT_FITTED =
  /(?:^|[\s,;/@(])(?:dn[pimf]|n\.?f\.?|(?:do )?not (?:fit(?:ted)?|place|populate))(?:$|[\s,;/@)])/iu;

/**
 * The value of a part as a parts list prints it, with what may follow it: "4k7", "4,7k 1%", "100n/16V X7R",
 * "4 700" = 4700 Ω. What follows is left out only where it cannot belong to the number: "4 70" and "10,1%" are refused.
 *
 * @param text  as written; a bare number is in ohms, and is refused for a capacitor or an inductor
 * @returns the number and its unit: ≥ 0 Ω, or above 0 F or 0 H
 * @throws DomainError with a whole sentence where it cannot be read, can be read two ways, is negative or says that the
 *   part is not fitted
 */
export function parsePrintedValue(text: string, dimension: PartDimension): Quantity {
  const typed = text.trim();
  if (NOT_FITTED.test(typed)) throw new DomainError(`'${typed}' says that the part is not fitted.`, "value");
  const value = readWhole(typed, dimension) ?? readHead(typed, dimension);
  // Refused in the words for any quantity, which name the form to write.
  if (!value) return refuse(typed, dimension);
  const number = new Decimal(value.value);
  if (number.isNegative() && !number.isZero())
    throw new DomainError(`'${typed}' is negative, which no part is. Leave out the sign.`, "value");
  if (dimension !== "resistance" && number.isZero())
    throw new DomainError(`'${typed}' is zero. Write a value above zero.`, "value");
  return value;
}

function readWhole(text: string, dimension: PartDimension): Quantity | null {
  // "100/0402" is no fraction.
  if (/[/\u2044¼½¾]/u.test(text)) return null;
  if (dimension !== "resistance" && readDecimal(text).ok) return null;
  try {
    return parseQuantity(text, dimension, SI_UNITS[dimension]);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return null;
  }
}

/** The longest head that is a value, where what follows it is surely something else. */
function readHead(text: string, dimension: PartDimension): Quantity | null {
  for (const split of [...text.matchAll(SEPARATOR)].reverse()) {
    const head = text.slice(0, split.index);
    const rest = text.slice(split.index + split[0].length);
    const value = readWhole(head, dimension);
    if (!value) continue;
    const bare = !/\p{L}|Ω|\u2126/u.test(head);
    const decimalComma = split[0] === "," && /^\d/.test(rest);
    if (bare && rest !== "" && (decimalComma || !RATING.test(rest))) return null;
    return value;
  }
  return null;
}

function refuse(text: string, dimension: PartDimension): never {
  if (readDecimal(text).ok)
    throw new DomainError(
      `'${text}' has no unit. Write it with one, such as ${dimension === "capacitance" ? "100n" : "10 nH"}.`,
      "value",
    );
  parseQuantity(text, dimension, SI_UNITS[dimension]);
  throw new DomainError(
    `'${text}' can be read two ways. Write the value with its unit, such as 4k7.`,
    "value",
  );
}
