import { findUnit } from "@/lib/si/units";

export interface HeaderText {
  /** Lower case, words single-spaced, without the unit. */
  name: string;
  /** Unit of length in its usual spelling, when the header names one. */
  unit: string | null;
}

/** Splits "length_mm", "Length [mil]", "width (um)", "gap/µm", "parallelMm" into name and unit of length. */
export function readHeader(text: string): HeaderText {
  const bracket = /^(.*?)[\s_]*[[({<]\s*([^\])}>]{1,12}?)\s*[\])}>]\s*$/u.exec(text);
  if (bracket) {
    const unit = lengthUnit(bracket[2] ?? "");
    if (unit) return { name: fold(bracket[1] ?? ""), unit };
  }
  const tail =
    /^(.+?)(?:[\s_/,.:-]+(?:in[\s_]+)?)(mm|mils?|thou|[uµμ]m|microns?|inch(?:es)?|in|cm|nm|m)\.?$/iu.exec(
      text.trim(),
    );
  if (tail) {
    const unit = lengthUnit(tail[2] ?? "");
    if (unit) return { name: fold(tail[1] ?? ""), unit };
  }
  const camel = /^(.*[a-z])(Mm|MM|Mil|Um)$/u.exec(text.trim());
  if (camel) {
    const unit = lengthUnit((camel[2] ?? "").toLowerCase());
    if (unit) return { name: fold(camel[1] ?? ""), unit };
  }
  return { name: fold(text), unit: null };
}

function lengthUnit(text: string): string | null {
  return findUnit(text, "length")?.unit ?? findUnit(text.toLowerCase(), "length")?.unit ?? null;
}

function fold(text: string): string {
  return text
    .replace(/([a-z])([A-Z])/g, "$1 $2")
    .toLowerCase()
    .replace(/[^\p{L}\p{N}#]+/gu, " ")
    .trim();
}
