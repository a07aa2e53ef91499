import { MU0 } from "../physical-constants";
import type { FilamentConductor } from "./filaments";
import { meanLogDistances } from "./mean-log-distance";

/** 1/(σ A) of every cell [Ω/m]. */
export function cellResistances(
  conductors: FilamentConductor[],
  conductivity: number,
  cells: number,
): Float64Array {
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

/**
 * −μ0/2π · mean ln(r/r₀) of every pair of cells [H/m], and of the mirrored ones where the model mirrors itself; r₀ is
 * larger than the model, and cancels where the currents sum to zero.
 * @returns [cell·cells + cell]
 */
export function mutualInductances(
  conductors: FilamentConductor[],
  mirror: number,
  cells: number,
): Float64Array {
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
