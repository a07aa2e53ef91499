import { MU0 } from "../physical-constants";
import { solveComplexSymmetric } from "./complex-symmetric";
import { cellsOf, type FilamentConductor } from "./filaments";
import { meanLogDistances } from "./mean-log-distance";

/** Conductors of a cross-section, only those at x ≥ 0 when it mirrors itself there. */
export interface FilamentModel {
  conductors: FilamentConductor[];
  /** +1 currents repeat, −1 they change sign at the mirror, 0 no mirror */
  mirror: 1 | -1 | 0;
  signals: number;
  /** [S/m] */
  conductivity: number;
}

export interface SeriesImpedance {
  /** Ω/m and H/m, one matrix over the signals; currents of a mirrored model are those of its half */
  resistance: number[][];
  inductance: number[][];
}

/**
 * Series impedance of conductors that return their current among themselves, magneto-quasi-static, in two dimensions.
 *
 *     Ik/(σ Ak) + jω Σ Mkm Im = Vk,   Mkm = −μ0/2π · mean ln r,   Σ I = 0
 *
 * Filaments carry uniform current. Through a sheet (a plane) each column's current goes as the two exponentials
 * e^{±(1+j)y/δ} of a wide plate, so the unknowns are few (conduction modes).
 *
 * @returns a function of frequency [Hz], > 0
 * @see L. Daniel, A. Sangiovanni-Vincentelli, J. White, "Using conduction modes basis functions for efficient
 *   electromagnetic analysis of on-chip and off-chip interconnect", DAC 2001 (for the sheets)
 */
export function seriesImpedance(model: FilamentModel): (frequency: number) => SeriesImpedance {
  const { conductors, mirror, conductivity } = model;
  const first: number[] = [];
  let cells = 0;
  let unknowns = 0;
  for (const conductor of conductors) {
    first.push(cells);
    cells += cellsOf(conductor);
    unknowns += conductor.sheet ? 2 * (conductor.rows[0]!.edges.length - 1) : cellsOf(conductor);
  }
  const mutual = mutualInductances(conductors, mirror, cells);
  const resistance = cellResistances(conductors, conductivity, cells);
  return (frequency) => {
    const basis = basisAt(conductors, first, unknowns, frequency, conductivity);
    return solveAt(model, frequency, { cells, unknowns, mutual, resistance, basis });
  };
}

/** Unknown u spreads over cells from[u], from[u] + step, … with complex weights. */
interface Basis {
  from: Int32Array;
  step: Int32Array;
  count: Int32Array;
  signal: Int32Array;
  /** start of the unknown's weights */
  at: Int32Array;
  re: Float64Array;
  im: Float64Array;
}

interface Prepared {
  cells: number;
  unknowns: number;
  mutual: Float64Array;
  resistance: Float64Array;
  basis: Basis;
}

function solveAt(model: FilamentModel, frequency: number, p: Prepared): SeriesImpedance {
  const { unknowns: n, basis } = p;
  const omega = 2 * Math.PI * frequency;
  const re = new Float64Array(n * n);
  const im = new Float64Array(n * n);
  projected(p, omega, re, im);
  const indicator = (wanted: (signal: number) => boolean) => {
    const v = { re: new Float64Array(n), im: new Float64Array(n) };
    for (let u = 0; u < n; u++) {
      if (!wanted(basis.signal[u]!)) continue;
      for (let k = basis.at[u]!; k < basis.at[u]! + basis.count[u]!; k++) {
        v.re[u]! += basis.re[k]!;
        v.im[u]! += basis.im[k]!;
      }
    }
    return v;
  };
  const drives = Array.from({ length: model.signals }, (_, s) => indicator((signal) => signal === s));
  const all = indicator(() => true);
  const solutions = [...drives, all].map((v) => ({ re: v.re.slice(), im: v.im.slice() }));
  solveComplexSymmetric(re, im, n, solutions);
  const toAll = solutions[model.signals]!;
  const sum = dot(all, toAll);
  const yr = drives.map(() => drives.map(() => 0));
  const yi = drives.map(() => drives.map(() => 0));
  drives.forEach((_, j) => {
    const x = solutions[j]!;
    const total = dot(all, x);
    // the common potential that makes the currents return; at an odd mirror they do so by themselves
    const size = sum.re * sum.re + sum.im * sum.im;
    const cr = model.mirror === -1 ? 0 : -(total.re * sum.re + total.im * sum.im) / size;
    const ci = model.mirror === -1 ? 0 : -(total.im * sum.re - total.re * sum.im) / size;
    drives.forEach((drive, i) => {
      const direct = dot(drive, x);
      const common = dot(drive, toAll);
      yr[i]![j] = direct.re + cr * common.re - ci * common.im;
      yi[i]![j] = direct.im + cr * common.im + ci * common.re;
    });
  });
  return fromAdmittance(yr, yi, omega);
}

function fromAdmittance(yr: number[][], yi: number[][], omega: number): SeriesImpedance {
  if (yr.length === 1) {
    const [a, b] = [yr[0]![0]!, yi[0]![0]!];
    const size = a * a + b * b;
    return { resistance: [[a / size]], inductance: [[-b / size / omega]] };
  }
  const [a, b, c, d] = [yr[0]![0]!, yi[0]![0]!, yr[1]![1]!, yi[1]![1]!];
  const [e, f] = [(yr[0]![1]! + yr[1]![0]!) / 2, (yi[0]![1]! + yi[1]![0]!) / 2];
  const detR = a * c - b * d - (e * e - f * f);
  const detI = a * d + b * c - 2 * e * f;
  const size = detR * detR + detI * detI;
  const over = (x: number, y: number) => ({
    re: (x * detR + y * detI) / size,
    im: (y * detR - x * detI) / size / omega,
  });
  const z = [
    [over(c, d), over(-e, -f)],
    [over(-e, -f), over(a, b)],
  ];
  return {
    resistance: z.map((row) => row.map((x) => x.re)),
    inductance: z.map((row) => row.map((x) => x.im)),
  };
}

/** Bᵀ (R + jωM) B, lower triangle. */
function projected(p: Prepared, omega: number, re: Float64Array, im: Float64Array): void {
  const { cells, unknowns: n, mutual, resistance, basis } = p;
  const { from, step, count, at } = basis;
  const tr = new Float64Array(cells);
  const ti = new Float64Array(cells);
  for (let u = 0; u < n; u++) {
    // t = jωM·B_u + R·B_u, one column
    tr.fill(0);
    ti.fill(0);
    for (let k = 0; k < count[u]!; k++) {
      const br = basis.re[at[u]! + k]!;
      const bi = basis.im[at[u]! + k]!;
      const cell = from[u]! + k * step[u]!;
      const row = cell * cells;
      if (bi === 0) for (let m = 0; m < cells; m++) ti[m]! += omega * br * mutual[row + m]!;
      else
        for (let m = 0; m < cells; m++) {
          const value = omega * mutual[row + m]!;
          tr[m]! -= value * bi;
          ti[m]! += value * br;
        }
    }
    for (let k = 0; k < count[u]!; k++) {
      const cell = from[u]! + k * step[u]!;
      tr[cell]! += resistance[cell]! * basis.re[at[u]! + k]!;
      ti[cell]! += resistance[cell]! * basis.im[at[u]! + k]!;
    }
    for (let v = u; v < n; v++) {
      let sr = 0;
      let si = 0;
      for (let k = 0; k < count[v]!; k++) {
        const br = basis.re[at[v]! + k]!;
        const bi = basis.im[at[v]! + k]!;
        const cell = from[v]! + k * step[v]!;
        sr += br * tr[cell]! - bi * ti[cell]!;
        si += br * ti[cell]! + bi * tr[cell]!;
      }
      re[v * n + u] = sr;
      im[v * n + u] = si;
    }
  }
}

function basisAt(
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

function cellResistances(conductors: FilamentConductor[], conductivity: number, cells: number): Float64Array {
  const resistance = new Float64Array(cells);
  let k = 0;
  for (const { rows } of conductors) {
    for (const { y0, y1, edges } of rows) {
      for (let i = 0; i + 1 < edges.length; i++) {
        resistance[k++] = 1 / (conductivity * (edges[i + 1]! - edges[i]!) * (y1 - y0));
      }
    }
  }
  return resistance;
}

function mutualInductances(conductors: FilamentConductor[], mirror: number, cells: number): Float64Array {
  const rows = conductors.flatMap((conductor) => conductor.rows);
  const starts: number[] = [];
  rows.reduce((sum, row) => (starts.push(sum), sum + row.edges.length - 1), 0);
  const reach = Math.max(...rows.map((row) => Math.max(-row.edges[0]!, row.edges.at(-1)!, row.y1, -row.y0)));
  const reference = Math.log(4 * reach);
  const scale = -MU0 / (2 * Math.PI);
  const m = new Float64Array(cells * cells);
  for (let a = 0; a < rows.length; a++) {
    for (let b = 0; b <= a; b++) {
      const put = (sign: number) => (i: number, j: number, mean: number) => {
        m[(starts[a]! + i) * cells + starts[b]! + j]! += sign * scale * (mean - reference);
      };
      meanLogDistances(rows[a]!, rows[b]!, false, put(1));
      if (mirror !== 0) meanLogDistances(rows[a]!, rows[b]!, true, put(mirror));
      if (a === b) continue;
      for (let i = starts[a]!; i < starts[a]! + rows[a]!.edges.length - 1; i++) {
        for (let j = starts[b]!; j < starts[b]! + rows[b]!.edges.length - 1; j++)
          m[j * cells + i] = m[i * cells + j]!;
      }
    }
  }
  return m;
}

type Vector = { re: Float64Array; im: Float64Array };

/** aᵀ b, without conjugation. */
function dot(a: Vector, b: Vector): { re: number; im: number } {
  let re = 0;
  let im = 0;
  for (let k = 0; k < a.re.length; k++) {
    re += a.re[k]! * b.re[k]! - a.im[k]! * b.im[k]!;
    im += a.re[k]! * b.im[k]! + a.im[k]! * b.re[k]!;
  }
  return { re, im };
}
