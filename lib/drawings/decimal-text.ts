import { type Mark, text, type TextMark } from "./marks";
import { THIN_SPACE } from "./number-text";

/** A number whose decimal point stands at x, with its unit: columns of them align on the point. */
export function decimalText(
  x: number,
  y: number,
  number: string,
  unit: string,
  style: Partial<TextMark> = {},
): Mark[] {
  const [whole = "", fraction] = number.split(".");
  const rest = fraction === undefined ? [] : [{ text: `.${fraction}` }];
  return [
    text(x, y, [{ text: whole }], { anchor: "end", ...style }),
    text(x, y, [...rest, { text: `${THIN_SPACE}${unit}`, ink: "ink-soft" as const }], style),
  ];
}
