import type { Sine } from "../network/types";
import { recordedNodes } from "./channels";
import type { Waveforms } from "./comb-output";
import { drawGrid, type GridTerm } from "./grid-output";
import { drawJumps, type JumpTerm } from "./jump-output";
import { runJump } from "./jump-run";
import { planGrid } from "./grid-plan";
import type { GridInput } from "./grid-input";
import { channelSeries, runGrid } from "./grid-run";
import { markRoundPeaks } from "./round-peaks";
import { movingSources, type Prepared } from "./prepared";
import { workspace } from "./workspace";
import { chooseStep, type Accuracy } from "./step-size";

/** A corner that a straight line between samples would miss by more than this share of the swing gets its sample. */
const WORTHY: Record<Accuracy, number> = { live: 1e-3, standard: 2e-4, reference: 5e-5 };

/** Waveforms of a linear network on a grid, by superposition of the responses to one corner of each source. */
export function simulateGrid({
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
  const terms: GridTerm[] = [];
  const jumping: JumpTerm[] = [];
  const nodes = recordedNodes(channels);
  let swing = 0;
  let steps = 0;
  for (const { fixed, corners } of movingSources(circuit)) {
    const { wave } = circuit.fixed[fixed]!;
    if (!wave) continue;
    swing +=
      wave.kind === "sine" ? 2 * Math.abs(wave.amplitude) : Math.max(...wave.value) - Math.min(...wave.value);
    const input =
      wave.kind === "sine" ? sineInput(fixed, plan.steps, step, wave) : rampInput(fixed, plan.steps, step);
    const jumps = corners?.filter((corner) => corner.jump !== 0 && corner.time <= until) ?? [];
    if (jumps.length > 0) {
      const { before, after } = runJump(plan, fixed, channels);
      steps += plan.steps;
      for (const { time, jump } of jumps)
        jumping.push({ before, response: after, shift: time, weight: jump });
      if (corners?.every((corner) => corner.slope === 0)) continue;
    }
    const run = runGrid(plan, [input], circuit.nodeCount, nodes);
    const response = channelSeries(channels, plan, run, [input]);
    steps += plan.steps;
    if (corners)
      for (const { time, slope } of corners)
        if (time <= until && slope !== 0) terms.push({ response, shift: time, weight: slope });
    if (wave.kind === "sine" && wave.start <= until) terms.push({ response, shift: wave.start, weight: 1 });
  }
  const worthy = WORTHY[accuracy] * swing;
  const waveforms =
    jumping.length > 0
      ? drawJumps(terms, jumping, rest, step, until, worthy)
      : drawGrid(terms, rest, step, until, worthy);
  return { waveforms: markRoundPeaks(waveforms, swing), steps };
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
