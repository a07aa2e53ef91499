import { DomainError } from "../errors";
import type { Pwl, Sine } from "../network/types";
import { corners } from "../network/wave";
import type { Circuit } from "./circuit";
import type { Cluster } from "./clusters";
import { curveStep } from "./curve-step";
import { skinStep } from "./skin-step";

export type Accuracy = "live" | "standard" | "reference";

export interface StepChoice {
  step: number;
  /** each line's delay in steps; a whole number where the search found one */
  delays: number[];
}

/** How finely things are resolved: curvature of charging, ramps between whole steps, a sine's period, a table's corners. */
const FINENESS: Record<
  Accuracy,
  { curve: number; chord: number; ramp: number; sine: number; table: number }
> = {
  live: { curve: 0.1, chord: 0.12, ramp: 1 / 30, sine: 1 / 64, table: 1 / 40 },
  standard: { curve: 0.05, chord: 0.07, ramp: 1 / 60, sine: 1 / 160, table: 1 / 120 },
  reference: { curve: 0.03, chord: 0.035, ramp: 1 / 160, sine: 1 / 400, table: 1 / 500 },
};
const MOST_STEPS = 1_000_000;
/** A step may be this much finer than needed before an exact common step is given up. */
const FINER = 6;

/** The largest common measure of delays [s], or null where they have none above `least`. */
export function commonDelay(delays: readonly number[], least: number): number | null {
  let measure = 0;
  for (const delay of delays) {
    let a = Math.max(measure, delay);
    let b = Math.min(measure, delay);
    while (b > least / 2) {
      const rest = a - b * Math.round(a / b);
      a = b;
      b = Math.abs(rest);
    }
    if (b > 1e-9 * a) return null;
    measure = a;
  }
  if (!(measure >= least)) return null;
  // Rounding in the remainders is repaired from the longest delay.
  const longest = Math.max(...delays);
  measure = longest / Math.round(longest / measure);
  for (const delay of delays) {
    const steps = delay / measure;
    if (Math.abs(steps - Math.round(steps)) > 1e-8 * Math.max(1, steps * 1e-3)) return null;
  }
  return measure;
}

/** Every wave that moves something: sources, and the weights of drivers with tables. */
export function wavesOf(circuit: Circuit): (Pwl | Sine)[] {
  const waves = circuit.fixed.flatMap(({ wave }) => (wave ? [wave] : []));
  for (const { terms } of circuit.elements) for (const { weight } of terms) if (weight) waves.push(weight);
  return waves;
}

/** Shortest moving piece of all sources, in straight ramps [s]; a sine counts with its share of a period. */
export function shortestRamp(circuit: Circuit): number {
  let ramp = Infinity;
  for (const wave of wavesOf(circuit)) {
    if (wave.kind === "sine") ramp = Math.min(ramp, 0.25 / wave.frequency);
    else
      for (let i = 1; i < wave.time.length; i++) {
        const length = wave.time[i]! - wave.time[i - 1]!;
        if (length > 0 && wave.value[i] !== wave.value[i - 1]) ramp = Math.min(ramp, length);
      }
  }
  return ramp;
}

/**
 * The step for a lattice on a grid: fine enough for the charging curves, and such that delays are whole steps if any
 * such step can be found; else each line interpolates, which asks for finer steps and at least two of them a line.
 *
 * @throws DomainError where the window would take more than a million steps
 */
export function chooseStep(
  circuit: Circuit,
  clusters: readonly Cluster[],
  until: number,
  accuracy: Accuracy,
  { asked, isLumped }: { asked?: number; isLumped: boolean },
): StepChoice {
  const fineness = FINENESS[accuracy];
  const ramp = shortestRamp(circuit);
  const delays = circuit.lines.map((line) => line.delay);
  const shortest = Math.min(Infinity, ...delays);
  // A lumped line shifts corners by less than a step, so that they fall between samples.
  const between = isLumped ? 0.6 * fineness.ramp * ramp : Infinity;
  const chords =
    circuit.elements.length > 0 || delays.length === 0
      ? { curve: 0.7 * fineness.curve, chord: 0.7 * fineness.curve }
      : fineness;
  const drawn = Math.min(
    between,
    curveStep(clusters, ramp, until, chords),
    // Curves are followed from one step ahead, which a line of one step does not allow.
    clusters.some(({ isStatic, size }) => !isStatic && size === 1) ? shortest / 2 : Infinity,
    sineStep(circuit, fineness.sine),
    clusters.some((cluster) => cluster.isStatic && cluster.tables.length > 0)
      ? ramp * fineness.table
      : Infinity,
  );
  const isLossy = circuit.lines.some(({ skin }) => skin > 0);
  const wanted =
    asked ??
    (isLossy ? skinStep(circuit, until, accuracy, { ramp, jumps: jumps(circuit), wanted: drawn }) : drawn);
  // Where nothing rounds the corners off, they must be kept by the step alone.
  const sharp = clusters.every((cluster) => cluster.isStatic);
  const choice =
    delays.length === 0
      ? { step: wanted, delays }
      : (wholeSteps(circuit, delays, wanted, ramp) ??
        betweenSteps(
          delays,
          Math.min(asked ?? (sharp ? 0.16 : 1) * fineness.ramp * ramp, wanted, shortest / 2),
        ));
  if (until / choice.step > MOST_STEPS)
    throw new DomainError(
      `The window of ${until} s takes more than a million steps at a delay of ${shortest} s; end it earlier or join the short sections.`,
      "until",
    );
  return choice;
}

function jumps(circuit: Circuit): boolean {
  return wavesOf(circuit).some((wave) => wave.kind === "pwl" && corners(wave).some(({ jump }) => jump !== 0));
}

function sineStep(circuit: Circuit, share: number): number {
  let step = Infinity;
  for (const { wave } of circuit.fixed)
    if (wave?.kind === "sine") step = Math.min(step, share / wave.frequency);
  return step;
}

/** A step that divides every delay, as near below `wanted` as can be and in tune with the sources' corners. */
function wholeSteps(
  circuit: Circuit,
  delays: readonly number[],
  wanted: number,
  ramp: number,
): StepChoice | null {
  const common = commonDelay(delays, wanted / FINER);
  if (common !== null) {
    const parts = bestParts(circuit, common, Math.max(1, Math.ceil(common / wanted - 1e-9)));
    const step = common / parts;
    return { step, delays: delays.map((delay) => Math.round(delay / step)) };
  }
  const longest = Math.max(...delays);
  const least = Math.ceil(longest / wanted);
  const slip = Number.isFinite(ramp) ? 1e-5 * ramp : 1e-6 * Math.min(...delays);
  for (let n = least; n <= FINER * least; n++) {
    const step = longest / n;
    if (
      delays.every(
        (delay) => Math.round(delay / step) > 0 && Math.abs(delay - step * Math.round(delay / step)) <= slip,
      )
    )
      return { step, delays: delays.map((delay) => Math.round(delay / step)) };
  }
  return null;
}

/** Of the next few divisions, the one whose step comes nearest to dividing the spans between corners. */
function bestParts(circuit: Circuit, common: number, least: number): number {
  const spans: number[] = [];
  for (const wave of wavesOf(circuit)) {
    if (wave.kind !== "pwl") continue;
    const found = corners(wave);
    // Without tables each corner starts its own grid; with them, all share the one from t = 0.
    const origin = circuit.elements.length > 0 ? 0 : (found[0]?.time ?? 0);
    for (const corner of found.slice(0, 5)) if (corner.time > origin) spans.push(corner.time - origin);
  }
  let best = least;
  let bestMiss = Infinity;
  for (let parts = least; parts <= least * 1.4 + 1; parts++) {
    let miss = 0;
    for (const span of spans) {
      const steps = (span * parts) / common;
      miss += Math.abs(steps - Math.round(steps));
    }
    if (miss < bestMiss - 1e-6) {
      best = parts;
      bestMiss = miss;
    }
  }
  return best;
}

/** Delays between steps: of the next divisions of the longest, the one with the least to interpolate. */
function betweenSteps(delays: readonly number[], wanted: number): StepChoice {
  const longest = Math.max(...delays);
  const least = Math.ceil(longest / wanted);
  let best = least;
  let bestMiss = Infinity;
  const most = least + Math.min(60, Math.ceil(least * 0.3));
  for (let n = least; n <= most; n++) {
    let miss = 0;
    for (const delay of delays) {
      const steps = (delay / longest) * n;
      const part = Math.abs(steps - Math.round(steps));
      miss += part * part;
    }
    if (miss < bestMiss) {
      best = n;
      bestMiss = miss;
    }
  }
  return { step: longest / best, delays: delays.map((delay) => (delay / longest) * best) };
}
