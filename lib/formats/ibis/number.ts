/** Scale letters of the standard. They are case-sensitive: m is milli, M is mega. */
const SCALES: ReadonlyMap<string, number> = new Map([
  ["T", 1e12],
  ["G", 1e9],
  ["M", 1e6],
  ["k", 1e3],
  ["m", 1e-3],
  ["u", 1e-6],
  ["n", 1e-9],
  ["p", 1e-12],
  ["f", 1e-15],
]);
/** First letters of units; a letter that is neither a scale nor one of these is a slip. F is farads, f femto. */
const UNITS = new Set("VvAaHhOoSsCcWwFΩ");
const NUMBER = /^[+-]?(?:\d{1,40}\.?\d{0,40}|\.\d{1,40})(?:[eE][+-]?\d{1,4})?/;
const LONGEST = 120;

export type NumberReading =
  { kind: "number"; value: number } | { kind: "na" } | { kind: "slip"; reason: string };

/**
 * A number of the standard: digits, an exponent, then one scale letter that counts, and a unit that does not
 * ("3.44nH", "0.5000k", "-11.4A"). NA stands for no data.
 */
export function readNumber(token: string): NumberReading {
  if (/^na$/i.test(token)) return { kind: "na" };
  const digits = token.length > LONGEST ? null : NUMBER.exec(token)?.[0];
  if (!digits) return { kind: "slip", reason: "is not a number. Write one such as 3.44nH, or NA" };
  const letter = token.charAt(digits.length);
  const scale = letter === "" || UNITS.has(letter) ? 1 : SCALES.get(letter);
  if (scale === undefined) return { kind: "slip", reason: wrongLetter(letter) };
  if (/^meg/i.test(token.slice(digits.length)) && letter === "m")
    return { kind: "slip", reason: "would be milli by its first letter. Write M for mega" };
  const value = Number(digits) * scale;
  return Number.isFinite(value)
    ? { kind: "number", value }
    : { kind: "slip", reason: "is too large for a number" };
}

function wrongLetter(letter: string): string {
  const other = letter === letter.toLowerCase() ? letter.toUpperCase() : letter.toLowerCase();
  return SCALES.has(other)
    ? `has the letter ${letter}, which is no scale; scales are case-sensitive. Write ${other} if that is meant`
    : `has the letter ${letter}, which is no scale and no unit. Scales are T, G, M, k, m, u, n, p and f`;
}
