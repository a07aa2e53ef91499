import type { Pwl, Sine } from "../network/types";
import { restValue, waveValue } from "../network/wave";
import { recordedNodes } from "./channels";
import type { Waveforms } from "./comb-output";
import { dcState } from "./dc";
import type { GridInput } from "./grid-input";
import { drawGrid } from "./grid-output";
import { planGrid } from "./grid-plan";
import { channelSeries, runGrid } from "./grid-run";
import type { Prepared } from "./prepared";
import { markRoundPeaks } from "./round-peaks";
import { chooseStep, wavesOf } from "./step-size";
import type { ElementWeights } from "./table-worker";
import { workspace } from "./workspace";

/** Waveforms of a network with I-V tables or diodes, all sources at once on one grid from t = 0. */
export function simulateTables({
  circuit,
  clusters,
  measured,
  channels,
  rest,
  until,
  accuracy,
  step: asked,
}: Prepared): { waveforms: Waveforms; steps: number } {
  const { step, delays } = chooseStep(circuit, measured, until, accuracy, {
    asked,
    isLumped: measured !== clusters,
  });
  const plan = planGrid(circuit, clusters, step, until, delays);
  const levels = circuit.fixed.map((item) => item.rest);
  const inputs: GridInput[] = circuit.fixed.flatMap(({ wave }, fixed) =>
    wave ? [movement(fixed, wave, plan.steps, step)] : [],
  );
  const weights: ElementWeights = new Map(
    circuit.elements.map((element) => [
      element,
      element.terms.map(({ weight }) => weight && samples(weight, plan.steps, step)),
    ]),
  );
  const context = { rest: { nodes: dcState(circuit, levels).volts, fixed: levels }, weights };
  const run = runGrid(plan, inputs, circuit.nodeCount, recordedNodes(channels), context);
  const response = channelSeries(channels, plan, run, inputs);
  const swing = wavesOf(circuit).reduce(
    (sum, wave) =>
      sum +
      (wave.kind === "sine"
        ? 2 * Math.abs(wave.amplitude)
        : Math.max(...wave.value) - Math.min(...wave.value)),
    0,
  );
  return {
    waveforms: markRoundPeaks(
      drawGrid([{ response, shift: 0, weight: 1 }], rest, step, until, Infinity),
      swing,
    ),
    steps: plan.steps,
  };
}

function movement(fixed: number, wave: Pwl | Sine, steps: number, step: number): GridInput {
  const value = samples(wave, steps, step);
  const rest = restValue(wave);
  const rate = workspace.take(steps + 1).subarray(0, steps + 1);
  for (let n = 0; n <= steps; n++) value[n] = value[n]! - rest;
  // Straight between samples, as the charges see it.
  for (let n = 0; n <= steps; n++) rate[n] = n < steps ? (value[n + 1]! - value[n]!) / step : 0;
  return { fixed, value, rate };
}

/** Values on the grid; at a jump the middle, so that the straight line through the samples is not early or late. */
function samples(wave: Pwl | Sine, steps: number, step: number): Float64Array {
  const value = workspace.take(steps + 1).subarray(0, steps + 1);
  const beside = 1e-6 * step;
  value[0] = restValue(wave);
  for (let n = 1; n <= steps; n++)
    value[n] = (waveValue(wave, n * step - beside) + waveValue(wave, n * step + beside)) / 2;
  return value;
}
