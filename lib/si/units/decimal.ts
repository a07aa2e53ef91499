import { Decimal as Base } from "decimal.js";

/** Decimal arithmetic of 60 digits: sums and products of typed values are exact, quotients far below any double. */
export const Decimal = Base.clone({
  precision: 60,
  rounding: Base.ROUND_HALF_EVEN,
  toExpNeg: -40,
  toExpPos: 40,
});
export type Decimal = Base;

/** Digits kept where a conversion does not terminate (mm → mil); terminating ones shorter than this are exact. */
const SHOWN_DIGITS = 34;

/** Plain decimal text without exponent and without needless zeros. */
export function decimalToText(value: Base): string {
  const text = value.toSignificantDigits(SHOWN_DIGITS).toFixed();
  return text === "-0" ? "0" : text;
}
