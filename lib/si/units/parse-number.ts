import { Decimal, decimalToText } from "./decimal";

/** Outside 1e-30 … 1e30 nothing on a board is meant. */
const MAX_EXPONENT = 30;
const MAX_DIGITS = 30;
/** What plainDigits gives for numbers such as this one. */
const AMBIGUOUS = "1,000";

export type NumberReading =
  | { ok: true; value: string }
  /** "shape": not a number at all; "ambiguous": 1,000 is one or a thousand; "range": too large, small or long. */
  | { ok: false; reason: "shape" | "ambiguous" | "range" };

/**
 * Reads a decimal number as people write it: point or comma, grouped by spaces (thin ones too), by a comma where a
 * point follows, fractions ("1/2", "1 1/2"), exponents, the typographic minus.
 *
 * "1,000" is refused as ambiguous; "0,127" and "12,5" are read as decimal commas.
 */
export function readDecimal(text: string): NumberReading {
  const plain = text
    .trim()
    .replace(/[\u2212\u2013]/g, "-")
    .replace(/[\u00a0\u2000-\u200a\u202f\u205f]/g, " ");
  const fraction = /^([+-]?)(?:(\d{1,9}) +)?(\d{1,9})\s*[/\u2044]\s*(\d{1,9})$/.exec(plain);
  if (fraction) return readFraction(fraction);
  const match = /^([+-]?)([\d., ']*\d[\d., ']*)(?:[eE]([+-]?\d{1,4}))?$/.exec(plain);
  if (!match) return { ok: false, reason: "shape" };
  const [, sign = "", body = "", exponent = "0"] = match;
  const digits = plainDigits(body);
  if (digits === AMBIGUOUS) return { ok: false, reason: "ambiguous" };
  if (digits === null) return { ok: false, reason: "shape" };
  if (digits.replace(".", "").length > MAX_DIGITS) return { ok: false, reason: "range" };
  return checked(new Decimal(`${sign}${digits}e${exponent}`));
}

function readFraction(match: RegExpExecArray): NumberReading {
  const [, sign, whole = "0", over = "0", under = "1"] = match;
  if (/^0+$/.test(under)) return { ok: false, reason: "shape" };
  const value = new Decimal(over).div(under).plus(whole);
  return checked(sign === "-" ? value.neg() : value);
}

function checked(value: Decimal): NumberReading {
  if (!value.isFinite()) return { ok: false, reason: "range" };
  if (!value.isZero() && Math.abs(value.e) > MAX_EXPONENT) return { ok: false, reason: "range" };
  return { ok: true, value: decimalToText(value) };
}

/** Digits with at most one point; AMBIGUOUS; null for what is no number. */
function plainDigits(body: string): string | null {
  if (/^\d+(\.\d*)?$|^\.\d+$/.test(body)) return body.startsWith(".") ? `0${body}` : body.replace(/\.$/, "");
  if (/^\d{1,3}(?:[ ']\d{3})+(?:[.,]\d+)?$/.test(body)) return body.replace(/[ ']/g, "").replace(",", ".");
  if (/^\d{1,3}(?:,\d{3})+\.\d+$/.test(body)) return body.replace(/,/g, "");
  if (/^\d{1,3}(?:\.\d{3})+,\d+$/.test(body)) return body.replace(/\./g, "").replace(",", ".");
  if (/^[1-9]\d{0,2}(?:,\d{3})+$/.test(body)) return AMBIGUOUS;
  if (/^\d*,\d+$/.test(body)) return body.startsWith(",") ? `0.${body.slice(1)}` : body.replace(",", ".");
  return null;
}
