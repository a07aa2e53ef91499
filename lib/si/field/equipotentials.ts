import { DomainError } from "../errors";
import type { Excitation, FieldSolution } from "./field-solution";

/** Part of the cross-section [m]. */
export interface FieldWindow {
  left: number;
  right: number;
  bottom: number;
  top: number;
}

export interface Equipotential {
  /** [V] */
  level: number;
  /** points [m]; the first is repeated at the end of a closed line */
  points: { x: number; y: number }[];
}

/**
 * Lines of equal potential within a window, by marching squares on a grid of square cells.
 *
 * @param levels  potentials [V]
 * @param resolution  cells across the window's width, 2 to 2000; a line's place is good to about a tenth of a cell
 * @throws DomainError for an empty window or a resolution out of range
 */
export function equipotentials(
  solution: FieldSolution,
  levels: readonly number[],
  window: FieldWindow,
  resolution: number,
  excitation: Excitation = "single",
): Equipotential[] {
  const width = window.right - window.left;
  const height = window.top - window.bottom;
  if (!(width > 0 && height > 0 && Number.isFinite(width * height))) {
    throw new DomainError("The window of the drawing is empty.", "window");
  }
  if (!(resolution >= 2 && resolution <= 2000)) {
    throw new DomainError("The resolution must lie between 2 and 2000 cells.", "resolution");
  }
  const columns = Math.round(resolution);
  const rows = Math.max(2, Math.round((columns * height) / width));
  const grid: Grid = { window, columns, rows, values: new Float64Array((columns + 1) * (rows + 1)) };
  for (let j = 0; j <= rows; j++) {
    for (let i = 0; i <= columns; i++) {
      const { x, y } = gridPoint(grid, i, j);
      grid.values[j * (columns + 1) + i] = solution.potentialAt(x, y, excitation);
    }
  }
  return levels.flatMap((level) => linesAt(grid, level));
}

interface Grid {
  window: FieldWindow;
  columns: number;
  rows: number;
  values: Float64Array;
}

function gridPoint({ window, columns, rows }: Grid, i: number, j: number): { x: number; y: number } {
  return {
    x: window.left + ((window.right - window.left) * i) / columns,
    y: window.bottom + ((window.top - window.bottom) * j) / rows,
  };
}

/** Edges are numbered 2·corner for the one to the right of a grid point, 2·corner + 1 for the one above it. */
function linesAt(grid: Grid, level: number): Equipotential[] {
  const { columns, rows, values } = grid;
  const across = columns + 1;
  const links = new Map<number, number[]>();
  const link = (a: number, b: number) => {
    for (const [from, to] of [
      [a, b],
      [b, a],
    ] as const) {
      const known = links.get(from);
      if (known) known.push(to);
      else links.set(from, [to]);
    }
  };
  for (let j = 0; j < rows; j++) {
    for (let i = 0; i < columns; i++) {
      const corner = j * across + i;
      const sw = values[corner]! >= level;
      const se = values[corner + 1]! >= level;
      const nw = values[corner + across]! >= level;
      const ne = values[corner + across + 1]! >= level;
      const cut: number[] = [];
      if (sw !== se) cut.push(2 * corner);
      if (se !== ne) cut.push(2 * (corner + 1) + 1);
      if (nw !== ne) cut.push(2 * (corner + across));
      if (sw !== nw) cut.push(2 * corner + 1);
      if (cut.length === 2) link(cut[0]!, cut[1]!);
      if (cut.length === 4) {
        // a saddle: the mean tells which corners hang together
        const mean =
          (values[corner]! + values[corner + 1]! + values[corner + across]! + values[corner + across + 1]!) /
          4;
        const swWithNe = mean >= level === sw;
        link(cut[0]!, swWithNe ? cut[1]! : cut[3]!);
        link(cut[2]!, swWithNe ? cut[3]! : cut[1]!);
      }
    }
  }
  return chains(links).map((edges) => ({ level, points: edges.map((edge) => crossing(grid, edge, level)) }));
}

/** Walks the links: open lines from their ends first, then the closed ones. */
function chains(links: Map<number, number[]>): number[][] {
  const lines: number[][] = [];
  const walk = (start: number) => {
    const line = [start];
    let here = start;
    for (;;) {
      const next = links.get(here)?.pop();
      if (next === undefined) break;
      const back = links.get(next);
      back?.splice(back.indexOf(here), 1);
      line.push(next);
      here = next;
    }
    if (line.length > 1) lines.push(line);
  };
  for (const [edge, others] of links) if (others.length === 1) walk(edge);
  for (const edge of links.keys()) walk(edge);
  return lines;
}

function crossing(grid: Grid, edge: number, level: number): { x: number; y: number } {
  const across = grid.columns + 1;
  const corner = edge >> 1;
  const i = corner % across;
  const j = (corner - i) / across;
  const upward = edge & 1;
  const a = grid.values[corner]!;
  const b = grid.values[corner + (upward ? across : 1)]!;
  const share = (level - a) / (b - a);
  return gridPoint(grid, upward ? i : i + share, upward ? j + share : j);
}
