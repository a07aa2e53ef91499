import { DomainError } from "@/lib/si/errors";
import { columnPoints, slopeAt, tablesCorner, type IbisCorner } from "./corners";
import { modelTypes, type IbisModel } from "./document";
import { edgeWeights, fixtureVolts, rampLoad, REST, waveformCorner } from "./edge-weights";
import { restVolts, type CornerTables } from "./iv-tables";
import type { IbisFinding } from "./quality";
import { percent, tablesOf } from "./quality-tables";

const corners = ["typical", "slow", "fast"] as const satisfies readonly IbisCorner[];
/** Of the swing: waveform ends off the load line by more are told of. */
const END = 0.02;
const RAMP = 0.1;
const OUTSIDE = 0.1;

/** A waveform must begin and end where the tables cross the fixture's load line. */
export function endPoints(model: IbisModel): IbisFinding[] {
  return perCorner(model, (corner, tables) =>
    model.waveforms.flatMap((waveform) => {
      if (waveform.hasPackage || waveformCorner(model, corner, waveform.edge) !== corner) return [];
      const points = columnPoints(waveform.rows, corner);
      const first = points[0]?.[1];
      const last = points.at(-1)?.[1];
      if (first === undefined || last === undefined) return [];
      const load = { ohms: waveform.resistance, volts: fixtureVolts(waveform, corner) };
      const before = restVolts(tables, REST[waveform.edge].before, load);
      const after = restVolts(tables, REST[waveform.edge].after, load);
      if (before === null || after === null) return [];
      const swing = Math.max(Math.abs(after - before), 1e-3);
      const misses = [
        { word: "begins", volts: first, rest: before },
        { word: "ends", volts: last, rest: after },
      ].filter(({ volts, rest }) => Math.abs(volts - rest) > END * swing);
      return misses.map(({ word, volts, rest }) => ({
        weight: Math.abs(volts - rest) / swing,
        finding: {
          check: "end points" as const,
          severity: "warning" as const,
          model: model.name,
          line: waveform.line,
          reason: `The ${waveform.edge === "rise" ? "rising" : "falling"} waveform into ${load.ohms} Ω at ${load.volts} V ${word} at ${volts.toPrecision(4)} V (${corner}); the tables rest at ${rest.toPrecision(4)} V there, ${percent(Math.abs(volts - rest) / swing)} of the swing away. Levels follow the waveform in its fixture only; ask which of the two is right.`,
        },
      }));
    }),
  );
}

/** The ramp's swing is 60 % of what the tables give into its load. */
export function rampSwing(model: IbisModel): IbisFinding[] {
  const { ramp } = model;
  if (!ramp) return [];
  return perCorner(model, (corner, tables) =>
    (["rise", "fall"] as const).flatMap((edge) => {
      const slope = slopeAt(ramp[edge], corner);
      const load = rampLoad(model, tables, edge);
      const before = restVolts(tables, REST[edge].before, load);
      const after = restVolts(tables, REST[edge].after, load);
      if (!slope || before === null || after === null) return [];
      const expected = 0.6 * Math.abs(after - before);
      const off = Math.abs(slope.volts - expected) / Math.max(expected, 1e-3);
      if (off <= RAMP) return [];
      return [
        {
          weight: off,
          finding: {
            check: "ramp" as const,
            severity: "notice" as const,
            model: model.name,
            line: ramp.line,
            reason: `The ${edge === "rise" ? "rising" : "falling"} ramp swings ${slope.volts.toPrecision(4)} V (${corner}); 60 % of what the tables give into ${load.ohms} Ω is ${expected.toPrecision(4)} V. Its slope is kept, over the tables' swing.`,
          },
        },
      ];
    }),
  );
}

/** Weights far outside 0 … 1 say that waveforms, tables and C_comp do not belong together. */
export function weightsInRange(model: IbisModel): IbisFinding[] {
  if (model.waveforms.length === 0) return [];
  return perCorner(model, (corner, tables) =>
    (["rise", "fall"] as const).flatMap((edge) => {
      if (waveformCorner(model, corner, edge) !== corner) return [];
      const weights = ownWeights(model, corner, edge);
      if (!weights) return [];
      const all = [...(tables.pullup ? weights.up : []), ...(tables.pulldown ? weights.down : [])];
      const low = Math.min(0, ...all);
      const high = Math.max(1, ...all);
      if (low >= -OUTSIDE && high <= 1 + OUTSIDE) return [];
      return [
        {
          weight: Math.max(-low, high - 1),
          finding: {
            check: "switching weights" as const,
            severity: "warning" as const,
            model: model.name,
            line: model.waveforms.find((waveform) => waveform.edge === edge)?.line ?? model.line,
            reason: `To give the ${edge === "rise" ? "rising" : "falling"} waveforms (${corner}), the tables would have to be switched on between ${low.toFixed(2)} and ${high.toFixed(2)} of themselves; 0 to 1 is natural. Tables, C_comp and waveforms do not quite belong together.`,
          },
        },
      ];
    }),
  );
}

function ownWeights(model: IbisModel, corner: IbisCorner, edge: "rise" | "fall") {
  try {
    return edgeWeights(model, corner, edge);
  } catch (error) {
    if (error instanceof DomainError) return null; // the missing thing is reported by its own check
    throw error;
  }
}

interface Weighted {
  weight: number;
  finding: IbisFinding;
}

/** The worst corner of each finding's line and kind. */
function perCorner(
  model: IbisModel,
  find: (corner: IbisCorner, tables: CornerTables) => Weighted[],
): IbisFinding[] {
  if (!modelTypes[model.type].drives || model.type.endsWith("_diff")) return [];
  const worst = new Map<string, Weighted>();
  for (const corner of corners) {
    const tables = tablesOf(model, corner);
    if (tablesCorner(model, corner) !== corner) continue;
    if (!tables || (!tables.pullup && !tables.pulldown)) continue;
    for (const entry of find(corner, tables)) {
      const key = `${entry.finding.line} ${entry.finding.reason.split(" ").slice(0, 2).join(" ")}`;
      if (entry.weight > (worst.get(key)?.weight ?? 0)) worst.set(key, entry);
    }
  }
  return [...worst.values()].map(({ finding }) => finding);
}
