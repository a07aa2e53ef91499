import type { BoardFile, BoardSection } from "./document";
import { PlaceGrid } from "./place-grid";

export interface BoardNeighbour {
  net: string;
  neighbour: string;
  layer: string;
  /** Edge to edge, the mean along the stretch. */
  gap_m: number;
  parallel_m: number;
}

export interface NeighbourSearch {
  /** Greatest gap, edge to edge [m], > 0. */
  distance_m: number;
  /** Shorter stretches are left out [m]. */
  least_m: number;
}

export interface FoundNeighbours {
  rows: BoardNeighbour[];
  /** Pairs of nets whose copper meets on a layer: shorts, or nets under two names. */
  touching: { net: string; other: string; layer: string }[];
}

/** sin of the angle up to which two pieces count as parallel: about 5°. */
const PARALLEL = 0.09;
/** Stretches of one pair whose gaps differ by less are one row [m]. */
const GAP_STEP_M = 10e-6;
const LEAST_CELL_M = 0.5e-3;
/** A long line is looked at piece by piece, so that a slanting one does not fill a square of cells [m]. */
const LONGEST_PIECE_M = 4e-3;

interface Piece {
  net: string;
  x: number;
  y: number;
  /** Unit vector along it. */
  ux: number;
  uy: number;
  length: number;
  half: number;
}

/**
 * Lines of different nets that run side by side on one layer: same direction within 5°, facing each other, gap within
 * reach. One row a pair, layer and gap, its length the sum of such stretches; each pair once.
 */
export function findNeighbours(board: Pick<BoardFile, "nets">, search: NeighbourSearch): FoundNeighbours {
  const byLayer = new Map<string, Piece[]>();
  for (const net of board.nets)
    for (const section of net.sections) {
      const pieces = byLayer.get(section.layer) ?? [];
      byLayer.set(section.layer, pieces);
      addPieces(pieces, net.name, section);
    }
  const found: FoundNeighbours = { rows: [], touching: [] };
  for (const [layer, pieces] of byLayer) searchLayer(layer, pieces, search, found);
  return found;
}

function searchLayer(
  layer: string,
  pieces: readonly Piece[],
  search: NeighbourSearch,
  found: FoundNeighbours,
) {
  const widest = pieces.reduce((most, { half }) => Math.max(most, half), 0);
  const grid = new PlaceGrid<Piece>(Math.max(LEAST_CELL_M, search.distance_m + widest));
  const sums = new Map<string, { a: string; b: string; length: number; weighted: number }>();
  const touching = new Set<string>();
  for (const piece of pieces) {
    const reach = search.distance_m + piece.half + widest;
    const [x1, y1] = [piece.x + piece.ux * piece.length, piece.y + piece.uy * piece.length];
    const [left, right] = [Math.min(piece.x, x1), Math.max(piece.x, x1)];
    const [low, high] = [Math.min(piece.y, y1), Math.max(piece.y, y1)];
    for (const other of grid.within(left - reach, low - reach, right + reach, high + reach)) {
      if (other.net === piece.net) continue;
      const beside = sideBySide(piece, other);
      if (!beside || beside.gap > search.distance_m) continue;
      const [a, b] = piece.net < other.net ? [piece.net, other.net] : [other.net, piece.net];
      if (!(beside.gap > 0)) {
        const pair = `${a}\u0000${b}`;
        if (!touching.has(pair)) found.touching.push({ net: a, other: b, layer });
        touching.add(pair);
        continue;
      }
      const key = `${a}\u0000${b}\u0000${Math.round(beside.gap / GAP_STEP_M)}`;
      const sum = sums.get(key) ?? { a, b, length: 0, weighted: 0 };
      sum.length += beside.length;
      sum.weighted += beside.gap * beside.length;
      sums.set(key, sum);
    }
    grid.add(left, low, right, high, piece);
  }
  for (const { a, b, length, weighted } of sums.values())
    if (length >= search.least_m)
      found.rows.push({ net: a, neighbour: b, layer, gap_m: weighted / length, parallel_m: length });
}

/** How long two pieces face each other, and the gap between their edges there; null where they do not. */
function sideBySide(a: Piece, b: Piece): { length: number; gap: number } | null {
  if (Math.abs(a.ux * b.uy - a.uy * b.ux) > PARALLEL) return null;
  const cosine = a.ux * b.ux + a.uy * b.uy;
  const start = (b.x - a.x) * a.ux + (b.y - a.y) * a.uy;
  const end = start + b.length * cosine;
  const from = Math.max(0, Math.min(start, end));
  const to = Math.min(a.length, Math.max(start, end));
  if (!(to > from)) return null;
  const middle = (from + to) / 2;
  const along = (middle - start) / cosine;
  const across = (b.x + b.ux * along - a.x) * -a.uy + (b.y + b.uy * along - a.y) * a.ux;
  return { length: to - from, gap: Math.abs(across) - a.half - b.half };
}

function addPieces(pieces: Piece[], net: string, { path, width_m }: BoardSection): void {
  for (let at = 0; at + 3 < path.length; at += 2) {
    const [x = 0, y = 0, x1 = 0, y1 = 0] = path.slice(at, at + 4);
    const length = Math.hypot(x1 - x, y1 - y);
    if (!(length > 0)) continue;
    const [ux, uy] = [(x1 - x) / length, (y1 - y) / length];
    const count = Math.ceil(length / LONGEST_PIECE_M);
    for (let part = 0; part < count; part++) {
      const start = (length * part) / count;
      pieces.push({
        net,
        x: x + ux * start,
        y: y + uy * start,
        ux,
        uy,
        length: length / count,
        half: width_m / 2,
      });
    }
  }
}
