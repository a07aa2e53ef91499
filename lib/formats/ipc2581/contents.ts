import type { BoardFile, BoardProblem } from "./document";
import { findNeighbours } from "./neighbours";
import { neighbourListOf, partsListOf, sectionListOf } from "./to-lists";

/** Problems sent to the page; their count is whole. */
const SHOWN_PROBLEMS = 300;
/** Shorter stretches side by side couple next to nothing [m]. */
const LEAST_PARALLEL_M = 0.5e-3;

/** What a board file holds, in numbers, and the lists that can be taken over from it. */
export interface BoardContents {
  revision: string;
  step: string;
  counts: {
    nets: number;
    /** Nets with at least one section; the others are planes, or not routed. */
    routed: number;
    sections: number;
    parts: number;
    pins: number;
    holes: number;
    vias: number;
  };
  /** Copper only, as declared. */
  layers: { name: string; plane: boolean; sections: number }[];
  plies: number;
  problems: BoardProblem[];
  problemCount: number;
  partsList: BoardList;
  sectionList: BoardList;
}

export interface BoardList {
  text: string;
  rows: number;
}

export interface NeighbourRows extends BoardList {
  /** Pairs of nets whose copper meets; they are in no row. */
  touching: { net: string; other: string; layer: string }[];
}

export function contentsOf(board: BoardFile): BoardContents {
  const sections = board.nets.flatMap((net) => net.sections);
  const onLayer = new Map<string, number>();
  for (const { layer } of sections) onLayer.set(layer, (onLayer.get(layer) ?? 0) + 1);
  return {
    revision: board.revision,
    step: board.step,
    counts: {
      nets: board.nets.length,
      routed: board.nets.filter((net) => net.sections.length > 0).length,
      sections: sections.length,
      parts: board.parts.length,
      pins: board.nets.reduce((sum, { pins }) => sum + pins.length, 0),
      holes: board.holeCount,
      vias: board.nets.reduce((sum, { vias }) => sum + vias, 0),
    },
    layers: board.layers
      .filter(({ copper }) => copper)
      .map(({ name, plane }) => ({ name, plane, sections: onLayer.get(name) ?? 0 })),
    plies: board.stackup?.plies.length ?? 0,
    problems: board.problems.slice(0, SHOWN_PROBLEMS),
    problemCount: board.problemCount,
    partsList: { text: partsListOf(board), rows: board.parts.length },
    sectionList: { text: sectionListOf(board), rows: sections.length },
  };
}

/** @param distance_m greatest gap, edge to edge [m] */
export function neighbourRowsOf(board: BoardFile, distance_m: number): NeighbourRows {
  const { rows, touching } = findNeighbours(board, { distance_m, least_m: LEAST_PARALLEL_M });
  return { text: neighbourListOf(rows, board.unit), rows: rows.length, touching };
}
