import { DomainError } from "../errors";
import { findUnit } from "./find-unit";
import { readDecimal, type NumberReading } from "./parse-number";
import { readPartValue } from "./part-value";
import type { Dimension, Quantity } from "./quantity";

/** How each dimension is named in a sentence, and what a right entry looks like. */
const words: Record<Dimension, { article: string; example: string }> = {
  length: { article: "a length", example: "12.7 mm or 500 mil" },
  time: { article: "a time", example: "120 ps or 1.5 ns" },
  resistance: { article: "a resistance", example: "33 Ω or 4k7" },
  capacitance: { article: "a capacitance", example: "5 pF or 100 nF" },
  inductance: { article: "an inductance", example: "2.2 nH or 1 µH" },
  voltage: { article: "a voltage", example: "3.3 V or 300 mV" },
  current: { article: "a current", example: "8 mA" },
  frequency: { article: "a frequency", example: "125 MHz or 1 GHz" },
  bitRate: { article: "a bit rate", example: "480 Mb/s or 5 Gb/s" },
  ratio: { article: "a ratio", example: "10 % or 0.1" },
  power: { article: "a power", example: "100 mW" },
  delayPerLength: { article: "a delay per length", example: "6.8 ps/mm or 170 ps/in" },
  slewRate: { article: "a slew rate", example: "2 V/ns" },
  voltageTime: { article: "an area of voltage and time", example: "0.5 V·ns" },
};

const LONGEST_TEXT = 64;
const vulgarFractions: Record<string, string> = { "¼": " 1/4", "½": " 1/2", "¾": " 3/4" };

/**
 * Reads a typed quantity: "5 mil", "0,127mm", "1/2 oz", "120ps", "4k7"; a bare number is in `defaultUnit`.
 *
 * @param text         what was typed; spaces of any width, decimal comma, µ or μ or u, Ω of either code point
 * @param dimension    what it must be
 * @param defaultUnit  unit of a bare number, one of that dimension
 * @returns the number as exact decimal text (a fraction that does not terminate: 34 digits) and the unit's usual name
 * @throws DomainError with a whole sentence that says what is wrong and what to write instead
 */
export function parseQuantity(text: string, dimension: Dimension, defaultUnit: string): Quantity {
  const typed = text.replace(/[¼½¾]/g, (sign) => vulgarFractions[sign] ?? sign).trim();
  if (typed === "")
    throw refuse(`Nothing is written where ${words[dimension].article} is needed.`, dimension);
  const said = `'${typed.length > 40 ? `${typed.slice(0, 40)}…` : typed}'`;
  if (typed.length > LONGEST_TEXT)
    throw refuse(`${said} is too long for ${words[dimension].article}.`, dimension);

  const bare = readDecimal(typed);
  if (bare.ok) return { value: bare.value, unit: canonicalUnit(defaultUnit, dimension) };
  if (bare.reason !== "shape") throw refuseNumber(said, bare, dimension);

  const part = readPartValue(typed, dimension);
  if (part) return part;

  const split = /^([+\-\u2212\u2013]?[\d.,'\s\u2044/]*\d[.,]?(?:[eE][+-]?\d{1,4})?)\s*([^\d\s.,+-].*)$/u.exec(
    typed,
  );
  if (!split) throw refuse(`${said} is not ${words[dimension].article}.`, dimension);
  const [, number = "", unitText = ""] = split;
  const reading = readDecimal(number);
  if (!reading.ok) throw refuseNumber(said, reading, dimension);
  const unit = findUnit(unitText, dimension);
  if (!unit) {
    throw refuse(
      `${said} is not ${words[dimension].article}: the unit '${unitText}' is not known here.`,
      dimension,
    );
  }
  return { value: reading.value, unit: unit.unit };
}

/** The unit's usual name; throws DomainError where it is not one of that dimension. */
export function canonicalUnit(unitText: string, dimension: Dimension): string {
  const unit = findUnit(unitText, dimension);
  if (!unit) throw refuse(`'${unitText}' is not a unit of ${bareName(dimension)}.`, dimension);
  return unit.unit;
}

function refuseNumber(
  said: string,
  reading: NumberReading & { ok: false },
  dimension: Dimension,
): DomainError {
  if (reading.reason === "ambiguous") {
    return refuse(`${said} can be read two ways: leave out the comma, or write a point.`, dimension);
  }
  if (reading.reason === "range")
    return refuse(`${said} is too large, too small or too long a number.`, dimension);
  return refuse(`${said} is not ${words[dimension].article}.`, dimension);
}

function bareName(dimension: Dimension): string {
  return words[dimension].article.replace(/^an? /, "");
}

function refuse(sentence: string, dimension: Dimension): DomainError {
  return new DomainError(`${sentence} Write ${words[dimension].example}.`, "value");
}
