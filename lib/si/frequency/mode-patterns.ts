import type { LineParameters, Mode } from "../cross-section";
import { quadratic } from "./wall-recession";

/** "first" and "second" (the slower) are the modes of unequal pairs. */
export type ModeName = "single" | "odd" | "even" | "first" | "second";

/** One mode of the lossless line: currents of square sum 1, and the voltages that go with them. */
export interface ModePattern {
  name: ModeName;
  line: Mode;
  currents: number[];
  /** up to a factor */
  volts: number[];
  /** vᵀ C v */
  energy: number;
}

/**
 * Current and voltage patterns of a line's modes. Of unequal pairs the eigenvectors of C L, with v = L i (up to the
 * mode's speed), so that loss is the first-order perturbation iᵀ R i/(2 vᵀ i).
 */
export function modePatterns(params: LineParameters): ModePattern[] {
  const { capacitance, inductance, single, pair } = params;
  const pattern = (name: ModeName, line: Mode, currents: number[]): ModePattern => {
    const volts = inductance.map((row) => row.reduce((sum, value, j) => sum + value * currents[j]!, 0));
    return { name, line, currents, volts, energy: quadratic(capacitance, volts) };
  };
  if (single) return [pattern("single", single, [1])];
  if (!pair) return [];
  const h = Math.SQRT1_2;
  if (pair.odd && pair.even) {
    return [pattern("odd", pair.odd, [h, -h]), pattern("even", pair.even, [h, h])];
  }
  const product = capacitance.map((row) =>
    [0, 1].map((j) => row[0]! * inductance[0]![j]! + row[1]! * inductance[1]![j]!),
  );
  const [a, b, c, d] = [product[0]![0]!, product[0]![1]!, product[1]![0]!, product[1]![1]!];
  const half = (a - d) / 2;
  const root = Math.sqrt(Math.max(0, half * half + b * c));
  const vectors = [-1, 1].map((sign) => {
    const lambda = (a + d) / 2 + sign * root;
    // the better conditioned of both rows of (CL − λ)
    const v =
      Math.abs(a - lambda) + Math.abs(b) > Math.abs(d - lambda) + Math.abs(c)
        ? [b, lambda - a]
        : [lambda - d, c];
    const size = Math.sqrt(v[0]! ** 2 + v[1]! ** 2);
    return size > 1e-9 * Math.abs(a) ? v.map((x) => x / size) : sign < 0 ? [h, -h] : [h, h];
  });
  const modes = [...pair.modes].sort((x, y) => x.delay - y.delay);
  return modes.map((mode, k) => {
    const made = pattern(k === 0 ? "first" : "second", mode, vectors[k] ?? [h, h]);
    return made;
  });
}
