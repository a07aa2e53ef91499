import { DomainError } from "../errors";
import type { Network } from "../network/types";
import { phasorCircuit, phasorState, type Phasor, type PhasorState } from "./phasor";

/** The steady sine at one place of a section. */
export interface StandingWavePoint {
  section: string;
  /** of a pair: its first or second line */
  conductor: "first" | "second";
  /** 0 at end a … 1 at end b */
  position: number;
  /** amplitude of the voltage [V] */
  magnitude: number;
  /** against sin(2π·frequency·t) [rad], −π … π; 0 where there is no voltage */
  phase: number;
}

/** Places a half wave long, and fewest and most on a section. */
const A_HALF_WAVE = 16;
const FEWEST = 16;
const MOST = 4096;

/**
 * Amplitude and phase of the voltage along every section in the steady state of a sine, by complex nodal analysis of
 * any linear network: v(x) = forward · exp(−γx) + backward · exp(−γ(1 − x)).
 *
 * Sine drivers drive with their own amplitude and phase, all at `frequency`; where there is none, the first driver whose
 * wave moves drives with 1 V. All others and the rails stand still.
 *
 * @param frequency       [Hz], > 0
 * @param options.points  places a section, both ends included, ≥ 2; by default 16 a half wave, at least 17
 * @throws DomainError where the network is not valid, nothing drives it or a resonance has nothing to damp it
 * @throws UnsupportedError where a part is not linear
 */
export function standingWave(
  network: Network,
  frequency: number,
  options: { points?: number } = {},
): StandingWavePoint[] {
  const { points } = options;
  if (points !== undefined && !(Number.isInteger(points) && points >= 2))
    throw new DomainError("A standing wave needs at least two places on a section.", "points");
  const ready = phasorCircuit(network);
  const state = phasorState(ready, frequency);
  const found: StandingWavePoint[] = [];
  ready.lines.forEach(({ section, mode }, index) => {
    if (mode === "odd") return;
    const { name } = network.sections[section]!;
    // The odd mode of a pair follows the even one.
    const modes = mode === "even" ? [index, index + 1] : [index];
    const halfWaves = Math.max(...modes.map((i) => state.propagation[i]!.angle)) / Math.PI;
    const pieces = points
      ? points - 1
      : Math.min(MOST, FEWEST * Math.max(1, Math.ceil((halfWaves * A_HALF_WAVE) / FEWEST)));
    for (const conductor of mode === "even" ? (["first", "second"] as const) : (["first"] as const))
      for (let k = 0; k <= pieces; k++) {
        const position = k / pieces;
        let re = 0;
        let im = 0;
        modes.forEach((i, m) => {
          const volts = voltsAt(state, i, position);
          const sign = m === 1 && conductor === "second" ? -1 : 1;
          re += sign * volts.re;
          im += sign * volts.im;
        });
        found.push({ section: name, conductor, position, ...polar({ re, im }) });
      }
  });
  return found;
}

/** Steady sines at the probes over a sweep of frequencies. */
export interface NodeSpectrum {
  /** [Hz] */
  frequency: Float64Array;
  /** by probe name: amplitude [V] and phase against sin(2π·frequency·t) [rad] */
  probes: Record<string, { magnitude: Float64Array; phase: Float64Array }>;
}

/**
 * The same at the probes, at each of `frequencies` [Hz]: what a net makes of each, per volt where the driver is not a
 * sine. A frequency at which a lossless resonance has no steady state gets an infinite magnitude.
 *
 * @throws as `standingWave`
 */
export function nodeSpectrum(network: Network, frequencies: ArrayLike<number>): NodeSpectrum {
  const ready = phasorCircuit(network);
  const count = frequencies.length;
  const probes: NodeSpectrum["probes"] = {};
  for (const { name } of network.probes)
    probes[name] = { magnitude: new Float64Array(count), phase: new Float64Array(count) };
  for (let i = 0; i < count; i++) {
    const state = stateOrNull(ready, frequencies[i]!);
    for (const { name, node } of network.probes) {
      const { magnitude, phase } = state
        ? polar(state.node(ready.circuit.ref(node)))
        : { magnitude: Infinity, phase: 0 };
      probes[name]!.magnitude[i] = magnitude;
      probes[name]!.phase[i] = phase;
    }
  }
  return { frequency: Float64Array.from(frequencies), probes };
}

function stateOrNull(ready: ReturnType<typeof phasorCircuit>, frequency: number): PhasorState | null {
  try {
    return phasorState(ready, frequency);
  } catch (error) {
    if (error instanceof DomainError && frequency > 0 && Number.isFinite(frequency)) return null;
    throw error;
  }
}

function voltsAt({ outgoing, propagation }: PhasorState, line: number, position: number): Phasor {
  const { loss, angle } = propagation[line]!;
  const sum = { re: 0, im: 0 };
  for (const [end, way] of [
    [2 * line, position],
    [2 * line + 1, 1 - position],
  ] as const) {
    const wave = outgoing[end]!;
    const size = Math.exp(-loss * way);
    const cos = size * Math.cos(angle * way);
    const sin = size * Math.sin(angle * way);
    sum.re += wave.re * cos + wave.im * sin;
    sum.im += wave.im * cos - wave.re * sin;
  }
  return sum;
}

/** Below this a voltage has no phase worth the name [V]. */
const NO_VOLTAGE = 1e-12;

function polar({ re, im }: Phasor): { magnitude: number; phase: number } {
  const magnitude = Math.hypot(re, im);
  return { magnitude, phase: magnitude < NO_VOLTAGE ? 0 : Math.atan2(im, re) };
}
