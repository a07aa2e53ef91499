import { DomainError } from "../errors";

export type ESeries = "E6" | "E12" | "E24" | "E48" | "E96";

const e24 = [
  "1.0", "1.1", "1.2", "1.3", "1.5", "1.6", "1.8", "2.0", "2.2", "2.4", "2.7", "3.0",
  "3.3", "3.6", "3.9", "4.3", "4.7", "5.1", "5.6", "6.2", "6.8", "7.5", "8.2", "9.1",
]; // prettier-ignore

const mantissas: Record<ESeries, readonly string[]> = {
  E6: e24.filter((_, index) => index % 4 === 0),
  E12: e24.filter((_, index) => index % 2 === 0),
  E24: e24,
  E48: geometric(48),
  E96: geometric(96),
};

export interface ESeriesValue {
  /** Standard value nearest by ratio, in the unit of what was asked. */
  value: number;
  /** (value − wanted) ÷ wanted. */
  deviation: number;
  /** Largest standard value ≤ wanted, smallest ≥ wanted. */
  below: number;
  above: number;
}

/**
 * The standard resistor (or capacitor) value nearest to a wanted one, nearest by ratio; the lower of two as near.
 *
 * @param wanted  in any unit, 1e-12 ≤ wanted ≤ 1e12
 * @param series  E24 (5 %) or E96 (1 %) as a rule
 * @throws DomainError outside that range
 * @see IEC 60063, Preferred number series for resistors and capacitors
 */
export function nearestESeries(wanted: number, series: ESeries): ESeriesValue {
  if (!(wanted >= 1e-12 && wanted <= 1e12)) {
    throw new DomainError(
      `A standard value is sought for ${wanted}; it must lie between 1e-12 and 1e12.`,
      "wanted",
    );
  }
  const decade = Math.floor(Math.log10(wanted));
  const candidates = [decade - 1, decade, decade + 1].flatMap((power) =>
    mantissas[series].map((mantissa) => Number(`${mantissa}e${power}`)),
  );
  let below = candidates[0] ?? wanted;
  let above = candidates[candidates.length - 1] ?? wanted;
  for (const candidate of candidates) {
    if (candidate <= wanted && candidate > below) below = candidate;
    if (candidate >= wanted && candidate < above) above = candidate;
  }
  const value = above / wanted < wanted / below ? above : below;
  return { value, deviation: value / wanted - 1, below, above };
}

/** Every value of the series between two bounds, rising. */
export function eSeriesBetween(low: number, high: number, series: ESeries): number[] {
  if (!(low > 0 && high >= low && high < 1e15)) {
    throw new DomainError(
      `Standard values are sought between ${low} and ${high}; both must be above zero.`,
      "low",
    );
  }
  const found: number[] = [];
  for (let power = Math.floor(Math.log10(low)); power <= Math.ceil(Math.log10(high)); power++) {
    for (const mantissa of mantissas[series]) {
      const value = Number(`${mantissa}e${power}`);
      if (value >= low && value <= high) found.push(value);
    }
  }
  return found;
}

/** E48 and E96 are the powers of the root rounded to three digits, without exception. */
function geometric(count: number): string[] {
  return Array.from({ length: count }, (_, index) => (10 ** (index / count)).toFixed(2));
}
