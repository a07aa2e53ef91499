import type { DraftTrace } from "./draft";
import type { RouteNode } from "./net-route";

/** The point of a line that is nearest to a place. */
export interface Nearest {
  distance: number;
  /** Along the line, from its start [m]. */
  at: number;
  total: number;
  chord: number;
  x: number;
  y: number;
}

export interface Cut extends Nearest {
  node: RouteNode;
}

export interface Piece {
  from: RouteNode;
  to: RouteNode;
  length_m: number;
  path: number[];
}

/** The nearest point of a line's centre to (x, y) [m]. */
export function nearestOn({ path, chords }: DraftTrace, x: number, y: number): Nearest {
  const best = { distance: Infinity, at: 0, chord: 0, x: 0, y: 0 };
  let before = 0;
  chords.forEach((length, chord) => {
    const [x0 = 0, y0 = 0, x1 = 0, y1 = 0] = path.slice(2 * chord, 2 * chord + 4);
    const [dx, dy] = [x1 - x0, y1 - y0];
    const square = dx * dx + dy * dy;
    const share = square > 0 ? Math.min(1, Math.max(0, ((x - x0) * dx + (y - y0) * dy) / square)) : 0;
    const [px, py] = [x0 + share * dx, y0 + share * dy];
    const distance = Math.hypot(x - px, y - py);
    if (distance < best.distance)
      Object.assign(best, { distance, at: before + share * length, chord, x: px, y: py });
    before += length;
  });
  return { ...best, total: before };
}

/** A line in pieces from node to node; whole where nothing cuts it. */
export function cutTrace(trace: DraftTrace, cuts: readonly Cut[], from: RouteNode, to: RouteNode): Piece[] {
  const { path, chords } = trace;
  const total = chords.reduce((sum, chord) => sum + chord, 0);
  const pieces: Piece[] = [];
  let start = { node: from, at: 0, points: path.slice(0, 2), corner: 1 };
  for (const cut of [...cuts].sort((a, b) => a.at - b.at)) {
    const corners = path.slice(2 * start.corner, 2 * (cut.chord + 1));
    pieces.push({
      from: start.node,
      to: cut.node,
      length_m: cut.at - start.at,
      path: [...start.points, ...corners, cut.x, cut.y],
    });
    start = { node: cut.node, at: cut.at, points: [cut.x, cut.y], corner: cut.chord + 1 };
  }
  pieces.push({
    from: start.node,
    to,
    length_m: total - start.at,
    path: [...start.points, ...path.slice(2 * start.corner)],
  });
  return pieces;
}
