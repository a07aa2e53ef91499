import { Decimal, decimalToText } from "./decimal";
import type { Dimension, Quantity } from "./quantity";

const letters: Partial<Record<Dimension, Record<string, string>>> = {
  resistance: { m: "mΩ", R: "Ω", r: "Ω", Ω: "Ω", E: "Ω", k: "kΩ", K: "kΩ", M: "MΩ" },
  capacitance: { f: "fF", p: "pF", n: "nF", u: "µF", µ: "µF", m: "mF", F: "F" },
  inductance: { p: "pH", n: "nH", u: "µH", µ: "µH", m: "mH", H: "H" },
};

/**
 * A part's value as printed on drawings: the unit's letter stands where the point would ("4k7" = 4.7 kΩ, "33R",
 * "R47" = 0.47 Ω, "2p2", "4n7F"). Null where it is not of this form.
 *
 * Source: IEC 60062 (letter code for resistance and capacitance values), from memory.
 */
export function readPartValue(text: string, dimension: Dimension): Quantity | null {
  const known = letters[dimension];
  if (!known) return null;
  const plain = text
    .trim()
    .replace(/\u03bc/g, "µ")
    .replace(/\u2126/g, "Ω");
  const match = /^(\d{0,9})([mRrΩEkKMfpnuµFH])(\d{0,9})(?:Ω|ohm|F|H)?$/.exec(plain);
  if (!match) return null;
  const [, whole = "", letter = "", part = ""] = match;
  const unit = known[letter];
  if (!unit || (whole === "" && part === "")) return null;
  return { value: decimalToText(new Decimal(`${whole || "0"}.${part || "0"}`)), unit };
}
