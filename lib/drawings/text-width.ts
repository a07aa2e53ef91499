/** Widths of letters in em, measured once on the text face; rounded up, so that labels keep clear of each other. */
const NARROW = /[ijlI.,:;|'!()\[\]\u00b7 ]/;
const THIN_SPACE = "\u2009";
const WIDE = /[mwMW@%\u03a9\u2126]/;
const CAPITAL = /[A-Z]/;

/**
 * Estimated width of a text, for placing labels where letters cannot be measured.
 *
 * @param words the text
 * @param size  font size [px]
 * @param bold  semibold weight
 * @returns width [px], about 5 % over the true one
 */
export function textWidth(words: string, size: number, bold = false): number {
  let em = 0;
  for (const letter of words) {
    if (letter === THIN_SPACE) em += 0.22;
    else if (NARROW.test(letter)) em += 0.32;
    else if (WIDE.test(letter)) em += 0.88;
    else if (CAPITAL.test(letter)) em += 0.68;
    else em += 0.59;
  }
  return em * size * (bold ? 1.05 : 1);
}
