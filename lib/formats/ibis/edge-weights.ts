import { DomainError } from "@/lib/si/errors";
import {
  columnPoints,
  dieCapacitance,
  hasCorner,
  processColumn,
  slopeAt,
  tablesCorner,
  type IbisCorner,
} from "./corners";
import { isEcl, type IbisModel, type IbisWaveform } from "./document";
import { cornerTables, restVolts, type CornerTables } from "./iv-tables";
import { smoothStep, smoothWave } from "./smooth-wave";
import { thinWeights } from "./thin";
import { switchWeights, type FixtureWave, type SwitchWeights } from "./switch-weights";

export type EdgeMethod = "two waveforms" | "one waveform" | "ramp";

export interface EdgeWeights extends SwitchWeights {
  method: EdgeMethod;
}

/** Weights at rest before and after an edge. */
export const REST = {
  rise: { before: { up: 0, down: 1 }, after: { up: 1, down: 0 } },
  fall: { before: { up: 1, down: 0 }, after: { up: 0, down: 1 } },
} as const;

/** As many times as an edge is worked out at, at most; and within one interval of its table. */
const MOST_TIMES = 3000;
const MOST_PARTS = 12;
const STEP_TIMES = 48;
/** By how much the weights may be missed when they are drawn with few pieces [1]. */
const MISSED = 2e-3;
/** What the die's capacitance charges through while switching, at the least: a strong driver beside a line [Ω]. */
const DIE_OHMS = 20;
/** Volts of a load beside the upper supply that an ECL output is given by custom. */
const ECL_TERMINATION = -2;

/**
 * How the two switches move during an edge at the pin: from two waveforms in different fixtures, from one, or from the
 * ramp, in this order of preference.
 *
 * @throws DomainError where the model has neither waveform nor ramp for this edge, or never comes to rest
 */
export function edgeWeights(model: IbisModel, corner: IbisCorner, edge: "rise" | "fall"): EdgeWeights {
  const own = waveformCorner(model, corner, edge);
  const waves = chooseWaveforms(model, own, edge);
  const from = waves.length > 0 ? own : tablesCorner(model, corner);
  const tables = cornerTables(model, from);
  const capacitance = dieCapacitance(model, from) ?? 0;
  const rest = REST[edge].before;
  if (waves.length > 0) {
    const fixtures = waves.map((waveform) => fixtureWave(waveform, own));
    const times = divided(waves.flatMap(({ rows }) => columnPoints(rows, own).map(([t]) => t)));
    return {
      ...thinWeights(
        switchWeights(tables, capacitance, fixtures, times, rest),
        MISSED,
        capacitance * DIE_OHMS,
      ),
      method: waves.length > 1 ? "two waveforms" : "one waveform",
    };
  }
  const fixture = rampFixture(model, corner, tables, edge);
  const times = Array.from({ length: STEP_TIMES + 1 }, (_, i) => (fixture.wave.end * i) / STEP_TIMES);
  return {
    ...thinWeights(
      switchWeights(tables, capacitance, [fixture], times, rest),
      MISSED,
      capacitance * DIE_OHMS,
    ),
    method: "ramp",
  };
}

/** `corner` where tables and this edge's waveforms have its column, else typical. */
export function waveformCorner(model: IbisModel, corner: IbisCorner, edge: "rise" | "fall"): IbisCorner {
  const own = model.waveforms.filter((waveform) => waveform.edge === edge);
  return own.every(({ rows }) => hasCorner(rows, corner)) ? tablesCorner(model, corner) : "typical";
}

/** The two whose fixtures differ most, or the only one; those behind a package or a coil are none. */
function chooseWaveforms(model: IbisModel, corner: IbisCorner, edge: "rise" | "fall"): IbisWaveform[] {
  const usable = model.waveforms.filter(
    (w) => w.edge === edge && !w.hasPackage && w.inductance === 0 && columnPoints(w.rows, corner).length > 1,
  );
  let best: IbisWaveform[] = usable.slice(0, 1);
  let widest = 0.05;
  for (const [i, a] of usable.entries())
    for (const b of usable.slice(i + 1)) {
      const apart = Math.abs(fixtureVolts(a, corner) - fixtureVolts(b, corner));
      if (apart > widest) [best, widest] = [[a, b], apart];
    }
  return best;
}

export function fixtureVolts(waveform: IbisWaveform, corner: IbisCorner): number {
  return waveform.fixture[processColumn(corner)] ?? waveform.fixture.typ ?? 0;
}

function fixtureWave(waveform: IbisWaveform, corner: IbisCorner): FixtureWave {
  return {
    wave: smoothWave(columnPoints(waveform.rows, corner)),
    resistance: waveform.resistance,
    volts: fixtureVolts(waveform, corner),
    capacitance: waveform.capacitance,
  };
}

/** The load a ramp is measured into: to the lower rail while rising, to the upper while falling, to the only way back. */
export function rampLoad(
  model: IbisModel,
  tables: CornerTables,
  edge: "rise" | "fall",
): { ohms: number; volts: number } {
  const ohms = model.ramp?.load ?? 50;
  if (isEcl(model.type)) return { ohms, volts: model.levels.vref?.value ?? tables.supply + ECL_TERMINATION };
  const goesUp = tables.pulldown === null || (edge === "rise" && tables.pullup !== null);
  return { ohms, volts: goesUp ? 0 : tables.supply };
}

/** A smooth step between the two points of rest, as steep between 20 and 80 % as the ramp says. */
function rampFixture(
  model: IbisModel,
  corner: IbisCorner,
  tables: CornerTables,
  edge: "rise" | "fall",
): FixtureWave {
  const slope = model.ramp && slopeAt(model.ramp[edge], corner);
  if (!slope)
    throw new DomainError(
      `Model ${model.name} has neither a waveform nor a ramp for its ${edge === "rise" ? "rising" : "falling"} edge, so its speed is not known. Add [Ramp] to the file.`,
      "ramp",
    );
  const load = rampLoad(model, tables, edge);
  const from = restVolts(tables, REST[edge].before, load);
  const to = restVolts(tables, REST[edge].after, load);
  if (from === null || to === null || from === to)
    throw new DomainError(
      `Model ${model.name} does not move into its own load of ${load.ohms} Ω, so its tables do not fit. Look at [Pullup] and [Pulldown].`,
      "tables",
    );
  const time = (0.6 * Math.abs(to - from) * slope.seconds) / slope.volts;
  return { wave: smoothStep(from, to, time), resistance: load.ohms, volts: load.volts, capacitance: 0 };
}

/** All times once, each interval cut into equal parts. */
function divided(times: readonly number[]): number[] {
  const sorted = [...new Set(times)].sort((a, b) => a - b);
  const parts = Math.max(1, Math.min(MOST_PARTS, Math.floor(MOST_TIMES / sorted.length)));
  const all: number[] = [];
  sorted.forEach((time, i) => {
    const next = sorted[i + 1];
    for (let k = 0; k < (next === undefined ? 1 : parts); k++)
      all.push(time + ((next ?? time) - time) * (k / parts));
  });
  return all;
}
