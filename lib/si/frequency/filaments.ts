/** A row of filaments of one height: cell i lies between edges i and i + 1. */
export interface FilamentRow {
  /** bottom and top [m] */
  y0: number;
  y1: number;
  /** ascending [m] */
  edges: Float64Array;
}

/**
 * A conductor cut into filaments. Rows of a sheet share their edges, and its current may be written by columns, each
 * with a given course through the thickness.
 */
export interface FilamentConductor {
  rows: FilamentRow[];
  /** index of the signal that drives it, −1 at plane potential */
  signal: number;
  sheet: boolean;
}

/** Cells grow by this ratio away from a surface. */
const GROWTH = 1.8;

/**
 * Edges from `from` to `to`, the first cell at a graded end as wide as `fine`, growing inward, none above `coarse`.
 * @param graded  ends at which the current crowds
 */
export function gradedEdges(
  from: number,
  to: number,
  fine: number,
  coarse: number,
  graded: { start: boolean; end: boolean },
  growth = GROWTH,
): Float64Array {
  const length = to - from;
  const widths: number[] = [];
  let left = 0;
  let right = 0;
  const tail: number[] = [];
  let start = graded.start ? Math.min(fine, length) : coarse;
  let end = graded.end ? Math.min(fine, length) : coarse;
  while (left + right < length * (1 - 1e-12)) {
    const fromStart = start <= end;
    const cell = Math.min(fromStart ? start : end, coarse);
    const rest = length - left - right;
    if (cell >= rest * 0.75) {
      widths.push(rest);
      break;
    }
    if (fromStart) {
      widths.push(cell);
      left += cell;
      start = Math.min(start * growth, coarse);
    } else {
      tail.push(cell);
      right += cell;
      end = Math.min(end * growth, coarse);
    }
  }
  widths.push(...tail.reverse());
  const edges = new Float64Array(widths.length + 1);
  edges[0] = from;
  widths.forEach((width, i) => (edges[i + 1] = edges[i]! + width));
  edges[widths.length] = to;
  return edges;
}

/** Cells of all rows. */
export function cellsOf(conductor: FilamentConductor): number {
  return conductor.rows.reduce((sum, row) => sum + row.edges.length - 1, 0);
}
