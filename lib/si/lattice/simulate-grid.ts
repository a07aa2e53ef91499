import type { Sine } from "../network/types";
import { recordedNodes } from "./channels";
import type { Circuit } from "./circuit";
import type { Cluster } from "./clusters";
import type { Waveforms } from "./comb-output";
import { drawGrid, type GridTerm } from "./grid-output";
import { drawJumps, type JumpTerm } from "./jump-output";
import { runJump } from "./jump-run";
import { planGrid, type GridPlan } from "./grid-plan";
import type { GridInput } from "./grid-input";
import { channelSeries, runGrid } from "./grid-run";
import { drawEven, markRoundPeaks } from "./round-peaks";
import { movingSources, type MovingSource, type Prepared } from "./prepared";
import { workspace } from "./workspace";
import { chooseStep, type Accuracy } from "./step-size";

/** A corner that a straight line between samples would miss by more than this share of the swing gets its sample. */
const WORTHY: Record<Accuracy, number> = { live: 1e-3, standard: 2e-4, reference: 5e-5 };
/** A corner this close to a step counts as on it [steps]. */
const ALIGNED = 1e-6;

/**
 * Waveforms of a linear network on a grid: all sources in one run where every corner falls on the grid, else by
 * superposition of the responses to one corner of each.
 */
export function simulateGrid(prepared: Prepared): { waveforms: Waveforms; steps: number } {
  const { circuit, clusters, measured, channels, rest, until, accuracy, step: asked } = prepared;
  const { step, delays } = chooseStep(circuit, measured, until, accuracy, {
    asked,
    isLumped: measured !== clusters,
  });
  const sources = movingSources(circuit).map((source) => ({
    ...source,
    ...cornersOf(source, circuit, until),
  }));
  let origin = until;
  let swing = 0;
  for (const { fixed, kinks } of sources) {
    for (const { time } of kinks) origin = Math.min(origin, time);
    const wave = circuit.fixed[fixed]!.wave!;
    swing +=
      wave.kind === "sine" ? 2 * Math.abs(wave.amplitude) : Math.max(...wave.value) - Math.min(...wave.value);
  }
  const plan = planGrid(circuit, clusters, step, until - origin, delays);
  if (isOnGrid(sources, clusters, origin, step)) {
    const inputs = sources.map((source) => wholeInput(source, circuit, plan, origin));
    const run = runGrid(plan, inputs, circuit.nodeCount, recordedNodes(channels));
    const series = channelSeries(channels, plan, run, inputs);
    const waveforms = drawEven(series, rest, { origin, step, count: plan.steps + 1, swing });
    return { waveforms, steps: plan.steps };
  }
  const { terms, jumping, steps } = superposition(prepared, plan, sources);
  const worthy = WORTHY[accuracy] * swing;
  const waveforms =
    jumping.length > 0
      ? drawJumps(terms, jumping, rest, step, until, worthy)
      : drawGrid(terms, rest, step, until, worthy);
  return { waveforms: markRoundPeaks(waveforms, swing), steps };
}

interface Kink {
  /** [s] */
  time: number;
  jump: number;
  /** change of slope [V/s] */
  slope: number;
}

interface Source extends MovingSource {
  /** within the window; of a sine its start */
  kinks: readonly Kink[];
}

function cornersOf(
  { fixed, corners }: MovingSource,
  circuit: Circuit,
  until: number,
): { kinks: readonly Kink[] } {
  const wave = circuit.fixed[fixed]!.wave;
  const all = corners ?? (wave?.kind === "sine" ? [{ time: wave.start, jump: 0, slope: 0 }] : []);
  return { kinks: all.every(({ time }) => time <= until) ? all : all.filter(({ time }) => time <= until) };
}

/** One run serves all where nothing jumps, every corner is on a step and no source is felt through its rate. */
function isOnGrid(
  sources: readonly Source[],
  clusters: readonly Cluster[],
  origin: number,
  step: number,
): boolean {
  for (const { kinks } of sources)
    for (const { time, jump } of kinks) {
      const steps = (time - origin) / step;
      if (jump !== 0 || Math.abs(steps - Math.round(steps)) > ALIGNED) return false;
    }
  return clusters.every(({ feeds }) => feeds.every(({ farads }) => farads === 0));
}

/** A source's whole movement from the grid's origin on. */
function wholeInput(
  { fixed, kinks }: Source,
  circuit: Circuit,
  { steps, step }: GridPlan,
  origin: number,
): GridInput {
  const { wave } = circuit.fixed[fixed]!;
  const first = kinks.length > 0 ? Math.round((kinks[0]!.time - origin) / step) : steps + 1;
  const value = workspace.take(steps + 1).subarray(0, steps + 1);
  value.fill(0, 0, first);
  if (wave?.kind === "sine") {
    const { amplitude, frequency, phase } = wave;
    const turn = 2 * Math.PI * frequency * step;
    const start = Math.sin(phase);
    for (let n = first; n <= steps; n++)
      value[n] = amplitude * (Math.sin(turn * (n - first) + phase) - start);
  } else {
    let level = 0;
    let slope = 0;
    kinks.forEach((kink, k) => {
      const from = Math.round((kink.time - origin) / step);
      const to = k + 1 < kinks.length ? Math.round((kinks[k + 1]!.time - origin) / step) : steps + 1;
      slope += kink.slope * step;
      for (let n = from; n < to && n <= steps; n++) value[n] = level + slope * (n - from);
      level += slope * (to - from);
    });
  }
  // Nobody asks for the rate: no source is felt through it.
  return { fixed, value, rate: value };
}

function superposition(
  { circuit, channels, until }: Prepared,
  plan: GridPlan,
  sources: readonly Source[],
): { terms: GridTerm[]; jumping: JumpTerm[]; steps: number } {
  const terms: GridTerm[] = [];
  const jumping: JumpTerm[] = [];
  const nodes = recordedNodes(channels);
  let steps = 0;
  for (const { fixed, corners, kinks } of sources) {
    const wave = circuit.fixed[fixed]!.wave!;
    const jumps = kinks.filter(({ jump }) => jump !== 0);
    if (jumps.length > 0) {
      const { before, after } = runJump(plan, fixed, channels);
      steps += plan.steps;
      for (const { time, jump } of jumps)
        jumping.push({ before, response: after, shift: time, weight: jump });
      if (corners?.every(({ slope }) => slope === 0)) continue;
    }
    const input =
      wave.kind === "sine"
        ? sineInput(fixed, plan.steps, plan.step, wave)
        : rampInput(fixed, plan.steps, plan.step);
    const run = runGrid(plan, [input], circuit.nodeCount, nodes);
    const response = channelSeries(channels, plan, run, [input]);
    steps += plan.steps;
    if (corners)
      for (const { time, slope } of kinks)
        if (slope !== 0) terms.push({ response, shift: time, weight: slope });
    if (wave.kind === "sine" && wave.start <= until) terms.push({ response, shift: wave.start, weight: 1 });
  }
  return { terms, jumping, steps };
}

/** A ramp of 1 V/s from t = 0. */
function rampInput(fixed: number, steps: number, step: number): GridInput {
  const value = workspace.take(steps + 1).subarray(0, steps + 1);
  for (let n = 0; n <= steps; n++) value[n] = n * step;
  return {
    fixed,
    value,
    rate: workspace
      .take(steps + 1)
      .subarray(0, steps + 1)
      .fill(1),
  };
}

/** The sine from its own start, as a deviation from its value there. */
function sineInput(fixed: number, steps: number, step: number, wave: Sine): GridInput {
  const value = workspace.take(steps + 1).subarray(0, steps + 1);
  const rate = workspace.take(steps + 1).subarray(0, steps + 1);
  const { amplitude, frequency, phase } = wave;
  const turn = 2 * Math.PI * frequency;
  for (let n = 0; n <= steps; n++) {
    const angle = turn * n * step + phase;
    value[n] = amplitude * (Math.sin(angle) - Math.sin(phase));
    rate[n] = amplitude * turn * Math.cos(angle);
  }
  return { fixed, value, rate };
}
