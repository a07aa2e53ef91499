import { DomainError } from "../errors";
import type { Network } from "../network/types";
import { validateNetwork } from "../network/validate";
import { nodeChannel, restLevels, waveChannels } from "./channels";
import { buildCircuit, type Circuit } from "./circuit";
import { buildClusters } from "./clusters";
import type { Waveforms } from "./comb-output";
import type { Prepared } from "./prepared";
import { simulateComb } from "./simulate-comb";
import { simulateSkin } from "./simulate-skin";
import { simulateTables } from "./simulate-tables";
import { simulateGrid } from "./simulate-grid";
import { lumpShortLines } from "./lump";
import { splitLossySections } from "./split-lossy";
import { shortestRamp, type Accuracy } from "./step-size";
import { workspace } from "./workspace";

export interface SimulateOptions {
  /** [s], > 0; the record ends there or up to one step later */
  until: number;
  /** default "standard" */
  accuracy?: Accuracy;
  /** largest step of a lattice on a grid [s]; worked out where absent */
  step?: number;
  /** report the waves at every section end too */
  waves?: boolean;
}

/** The waves of a section (of a pair: of one mode), on the record's own times. */
export interface SectionWaves {
  section: string;
  mode: "line" | "even" | "odd";
  /** [Ω] */
  impedance: number;
  /** one way [s] */
  delay: number;
  a: EndWaves;
  b: EndWaves;
}

/** incident: arriving at the end from along the line; outgoing: leaving it into the line. Their sum is the end's voltage [V]. */
export interface EndWaves {
  incident: Float64Array;
  outgoing: Float64Array;
}

export interface Simulation {
  /** [s], from 0, never decreasing; a repeated time is a jump (before, after) */
  time: Float64Array;
  /** by probe name [V] */
  voltage: Record<string, Float64Array>;
  waves?: SectionWaves[];
  /** how many time steps or arrivals were computed */
  steps: number;
}

/** Lines shorter than this share of the edge are lumped where time goes in steps. */
const LUMPED: Record<Accuracy, number> = { live: 1 / 120, standard: 1 / 250, reference: 1 / 800 };

/**
 * Waveforms of a network from rest, by the method of characteristics: on lossless lines the voltage is the sum of two
 * waves that travel unchanged, v = a + b, and each node sends v − a into every line, v = G⁻¹ Σ 2Y a (Bergeron).
 *
 * Resistive networks: every arrival exactly, the source drawn through the sum of its echoes; exact to rounding for any
 * delays while the arrivals can be counted. Others: on a grid whose step divides the delays where such a step exists,
 * capacitors and coils by the exponential of their node's circuit with arrivals straight within a step; linear circuits
 * by superposition of the response to one corner, so that every corner of the source lies on its own grid.
 *
 * @returns samples whose joining straight lines meet: resistive 1e-9 of the source swing (0.05 % where arrivals are too
 *          many to count); others 0.5 %, 0.2 % or 0.05 % for live, standard and reference
 * @throws DomainError where the network is not valid or holds contradicting ideal voltages
 * @throws UnsupportedError naming the item that is not simulated yet
 */
export function simulate(network: Network, options: SimulateOptions): Simulation {
  validateNetwork(network);
  const { until, step } = options;
  if (!(until > 0) || !Number.isFinite(until))
    throw new DomainError("A simulation needs an end time above zero.", "until");
  if (step !== undefined && !(step > 0)) throw new DomainError("The step must be above zero.", "step");
  const whole = splitLossySections(network, options.accuracy ?? "standard");
  const prepared = prepare(whole, options);
  const { waveforms, steps } = draw(whole, prepared, options);
  const voltage: Record<string, Float64Array> = {};
  network.probes.forEach((probe, i) => (voltage[probe.name] = waveforms.values[i]!));
  const result: Simulation = { time: waveforms.time, voltage, steps };
  if (options.waves) result.waves = sectionWaves(whole, prepared.circuit, waveforms);
  return result;
}

function prepare(network: Network, { until, accuracy = "standard", step, waves }: SimulateOptions): Prepared {
  const circuit = buildCircuit(network);
  const channels = network.probes.map((probe) => nodeChannel(circuit.ref(probe.node)));
  if (waves) channels.push(...waveChannels(circuit));
  const clusters = buildClusters(circuit);
  return {
    circuit,
    clusters,
    measured: clusters,
    channels,
    rest: restLevels(circuit, channels),
    until,
    accuracy,
    step,
  };
}

function draw(
  network: Network,
  prepared: Prepared,
  options: SimulateOptions,
): { waveforms: Waveforms; steps: number } {
  const { circuit, clusters, accuracy } = prepared;
  try {
    const hasTables = circuit.elements.length > 0;
    const isResistive = !hasTables && clusters.every((cluster) => cluster.isStatic);
    const isLossless = circuit.lines.every(({ skin }) => skin === 0);
    const exact = isResistive ? (isLossless ? simulateComb : simulateSkin)(prepared) : null;
    if (exact) return exact;
    const ramp = shortestRamp(circuit);
    // Whoever asks for the waves wants those of every section.
    const lumped =
      options.waves || !Number.isFinite(ramp) ? network : lumpShortLines(network, ramp * LUMPED[accuracy]);
    // Echoes inside what was lumped are what the step need not follow.
    const ready = lumped === network ? prepared : { ...prepare(lumped, options), measured: clusters };
    return hasTables ? simulateTables(ready) : simulateGrid(ready);
  } finally {
    workspace.endAll();
  }
}

function sectionWaves(network: Network, circuit: Circuit, { values }: Waveforms): SectionWaves[] {
  const all: SectionWaves[] = [];
  circuit.lines.forEach(({ section, mode, impedance, delay }, i) => {
    const at = network.probes.length + 4 * i;
    const name = network.sections[section]!.name;
    const b = { outgoing: values[at + 2]!, incident: values[at + 3]! };
    const before = all[all.length - 1];
    if (before?.section === name && before.mode === mode) {
      // The pieces of a lossy section are one section.
      before.delay += delay;
      before.b = b;
    } else
      all.push({
        section: name,
        mode,
        impedance,
        delay,
        a: { outgoing: values[at]!, incident: values[at + 1]! },
        b,
      });
  });
  return all;
}
