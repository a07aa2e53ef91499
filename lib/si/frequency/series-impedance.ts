import { basisAt, type Basis } from "./conduction-modes";
import { solveComplexSymmetric } from "./complex-symmetric";
import { cellsOf, type FilamentConductor } from "./filaments";
import { cellResistances, mutualInductances } from "./mutual-inductances";

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
