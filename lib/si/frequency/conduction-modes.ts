import { MU0 } from "../physical-constants";
import { cellsOf, type FilamentConductor } from "./filaments";

/** Unknown u spreads over cells from[u], from[u] + step, … with complex weights. */
export interface Basis {
  from: Int32Array;
  step: Int32Array;
  count: Int32Array;
  signal: Int32Array;
  /** start of the unknown's weights */
  at: Int32Array;
  re: Float64Array;
  im: Float64Array;
}

/**
 * Unknowns of conductors at a frequency: a filament of its own each, or, in a sheet, two courses through the thickness
 * for each column.
 * @param first  first cell of each conductor
 */
export function basisAt(
  conductors: FilamentConductor[],
  first: number[],
  unknowns: number,
  frequency: number,
  conductivity: number,
): Basis {
  const total = conductors.reduce((sum, c) => sum + cellsOf(c) * (c.sheet ? 2 : 1), 0);
  const ints = () => new Int32Array(unknowns);
  const basis: Basis = {
    from: ints(),
    step: ints(),
    count: ints(),
    signal: ints(),
    at: ints(),
    re: new Float64Array(total),
    im: new Float64Array(total),
  };
  let u = 0;
  let w = 0;
  conductors.forEach((conductor, c) => {
    const columns = conductor.rows[0]!.edges.length - 1;
    if (!conductor.sheet) {
      for (let cell = 0; cell < cellsOf(conductor); cell++, u++, w++) {
        basis.from[u] = first[c]! + cell;
        basis.step[u] = basis.count[u] = 1;
        basis.signal[u] = conductor.signal;
        basis.at[u] = w;
        basis.re[w] = 1;
      }
      return;
    }
    const courses = throughSheet(conductor, frequency, conductivity);
    for (let column = 0; column < columns; column++) {
      for (const course of courses) {
        basis.from[u] = first[c]! + column;
        basis.step[u] = columns;
        basis.count[u] = conductor.rows.length;
        basis.signal[u] = conductor.signal;
        basis.at[u] = w;
        basis.re.set(course.re, w);
        basis.im.set(course.im, w);
        w += conductor.rows.length;
        u++;
      }
    }
  });
  return basis;
}

/** Shares of the rows of a sheet in cosh γ(y − yc) and sinh γ(y − yc), γ = (1 + j)/δ, each scaled to stay of order one. */
function throughSheet(
  conductor: FilamentConductor,
  frequency: number,
  conductivity: number,
): { re: Float64Array; im: Float64Array }[] {
  const a = Math.sqrt(Math.PI * frequency * MU0 * conductivity);
  const bottom = conductor.rows[0]!.y0;
  const top = conductor.rows.at(-1)!.y1;
  const n = conductor.rows.length;
  const course = () => ({ re: new Float64Array(n), im: new Float64Array(n) });
  const down = course();
  const up = course();
  // ∫ e^{−γ d} over a row, d from the bottom and from the top face
  const integral = (d0: number, d1: number) => {
    const e0 = Math.exp(-a * d0);
    const e1 = Math.exp(-a * d1);
    const re = e0 * Math.cos(a * d0) - e1 * Math.cos(a * d1);
    const im = -e0 * Math.sin(a * d0) + e1 * Math.sin(a * d1);
    // ÷ (1 + j)a
    return { re: (re + im) / (2 * a), im: (im - re) / (2 * a) };
  };
  conductor.rows.forEach((row, i) => {
    const fromBottom = integral(row.y0 - bottom, row.y1 - bottom);
    const fromTop = integral(top - row.y1, top - row.y0);
    up.re[i] = fromBottom.re + fromTop.re;
    up.im[i] = fromBottom.im + fromTop.im;
    down.re[i] = fromTop.re - fromBottom.re;
    down.im[i] = fromTop.im - fromBottom.im;
  });
  return [up, down].map((c) => {
    // scale by the largest row
    let largest = 0;
    let k = 0;
    for (let i = 0; i < n; i++) {
      const size = c.re[i]! ** 2 + c.im[i]! ** 2;
      if (size > largest) [largest, k] = [size, i];
    }
    const [pr, pi] = [c.re[k]! / largest, -c.im[k]! / largest];
    const scaled = course();
    for (let i = 0; i < n; i++) {
      scaled.re[i] = c.re[i]! * pr - c.im[i]! * pi;
      scaled.im[i] = c.re[i]! * pi + c.im[i]! * pr;
    }
    return scaled;
  });
}
