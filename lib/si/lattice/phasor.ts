import { DomainError, UnsupportedError } from "../errors";
import { validateNetwork } from "../network/validate";
import type { Network } from "../network/types";
import { buildCircuit, type Circuit, type Port, type Ref, type WaveLine } from "./circuit";
import { solveComplexInPlace } from "./complex-solve";

/** A steady sine: the real and imaginary part of its phasor, against sin(2π·frequency·t). */
export interface Phasor {
  re: number;
  im: number;
}

/** A linear circuit made ready for any number of frequencies. */
export interface PhasorCircuit {
  network: Network;
  circuit: Circuit;
  /** by fixed node: amplitude and phase at start of what drives [V, rad]; start [s] */
  drive: { amplitude: number; phase: number; start: number }[];
  lines: PhasorLine[];
}

interface PhasorLine extends WaveLine {
  /** [Ω], series resistance of the whole line */
  resistance: number;
}

/** The steady state at one frequency. */
export interface PhasorState {
  node: (ref: Ref) => Phasor;
  /** by line end (2 · line, 2 · line + 1): the wave that arrives there and the one that leaves */
  incident: Phasor[];
  outgoing: Phasor[];
  /** by line: exp(−γ · length), real and imaginary part of γ · length */
  propagation: { loss: number; angle: number }[];
}

/**
 * @throws DomainError where the network is not valid or nothing drives it
 * @throws UnsupportedError where a part is not linear
 */
export function phasorCircuit(network: Network): PhasorCircuit {
  validateNetwork(network);
  // Series resistance is in the propagation here; the circuit itself knows lossless lines only.
  const lossless = {
    ...network,
    sections: network.sections.map((section) => (section.kind === "rlc" ? { ...section, r: 0 } : section)),
  };
  const circuit = buildCircuit(lossless);
  const curved = circuit.elements[0];
  if (curved)
    throw new UnsupportedError(
      `${curved.name} is not linear, so the net has no single steady sine; look at the waveforms instead.`,
      curved.terms.some(({ weight }) => weight) ? "drivers" : "parts",
    );
  const sines = circuit.fixed.some(({ wave }) => wave?.kind === "sine");
  const first = circuit.fixed.findIndex(
    ({ wave }) => wave?.kind === "pwl" && wave.value.some((value) => value !== wave.value[0]),
  );
  const only = first > 0 ? first : circuit.fixed.findIndex(({ wave }) => wave !== null);
  if (!sines && only < 0) throw new DomainError("A steady sine needs a driver.", "drivers");
  return {
    network,
    circuit,
    drive: circuit.fixed.map(({ wave }, i) => {
      if (wave?.kind === "sine") return { amplitude: wave.amplitude, phase: wave.phase, start: wave.start };
      return { amplitude: !sines && i === only ? 1 : 0, phase: 0, start: 0 };
    }),
    lines: circuit.lines.map((line) => {
      const section = network.sections[line.section]!;
      return { ...line, resistance: section.kind === "rlc" ? section.r * section.length : 0 };
    }),
  };
}

/** Beyond so many times the drive, nothing but rounding holds a resonance. */
const BOUNDLESS = 1e9;

/**
 * Complex nodal analysis. Unknowns: node voltages, coil currents and the wave arriving at each line end, which is the
 * one that left the other end, i_A = P (v_B − i_B), P = exp(−γ · length); a node sees Y v − 2 Y i of each line.
 *
 * @param frequency  [Hz], > 0
 * @throws DomainError where a lossless resonance has no steady state
 */
export function phasorState({ circuit, drive, lines }: PhasorCircuit, frequency: number): PhasorState {
  if (!(frequency > 0) || !Number.isFinite(frequency))
    throw new DomainError("A steady sine needs a frequency above zero.", "frequency");
  const omega = 2 * Math.PI * frequency;
  const held = drive.map(({ amplitude, phase, start }): Phasor => {
    const angle = phase - omega * start;
    return { re: amplitude * Math.cos(angle), im: amplitude * Math.sin(angle) };
  });
  const { nodeCount } = circuit;
  const coils = circuit.branches.filter((branch) => branch.kind === "L");
  const size = nodeCount + coils.length + 2 * lines.length;
  const m = { re: new Float64Array(size * size), im: new Float64Array(size * size) };
  const b = { re: new Float64Array(size), im: new Float64Array(size) };
  const touched = new Uint8Array(nodeCount);
  const add = (row: number, column: number, re: number, im: number) => {
    m.re[row * size + column] = m.re[row * size + column]! + re;
    m.im[row * size + column] = m.im[row * size + column]! + im;
  };
  /** factor · V(ref) on the left of a row. */
  const addVolts = (row: number, ref: Ref, re: number, im: number) => {
    if (ref >= 0) return add(row, ref, re, im);
    const volts = held[-1 - ref]!;
    b.re[row] = b.re[row]! - (re * volts.re - im * volts.im);
    b.im[row] = b.im[row]! - (re * volts.im + im * volts.re);
  };
  let coil = nodeCount;
  for (const { kind, a, b: other, value } of circuit.branches) {
    if (kind === "L") {
      for (const [ref, sign] of [
        [a, 1],
        [other, -1],
      ] as const) {
        if (ref >= 0) {
          add(ref, coil, sign, 0);
          touched[ref] = 1;
        }
        addVolts(coil, ref, sign, 0);
      }
      add(coil, coil, 0, -omega * value);
      coil++;
      continue;
    }
    const re = kind === "R" ? 1 / value : 0;
    const im = kind === "R" ? 0 : omega * value;
    for (const [from, to] of [
      [a, other],
      [other, a],
    ] as const) {
      if (from < 0) continue;
      touched[from] = 1;
      addVolts(from, from, re, im);
      addVolts(from, to, -re, -im);
    }
  }
  const propagation: PhasorState["propagation"] = [];
  lines.forEach((line, index) => {
    const { gamma, admittance } = wavesOf(line, omega);
    propagation.push({ loss: gamma.re, angle: gamma.im });
    const size0 = nodeCount + coils.length + 2 * index;
    const p: Phasor = {
      re: Math.exp(-gamma.re) * Math.cos(gamma.im),
      im: -Math.exp(-gamma.re) * Math.sin(gamma.im),
    };
    ([line.a, line.b] as const).forEach((port, end) => {
      const own = size0 + end;
      const far = size0 + 1 - end;
      // i_own + P i_far − P v_far = 0
      add(own, own, 1, 0);
      add(own, far, p.re, p.im);
      eachVolt(end === 0 ? line.b : line.a, (ref, share) => addVolts(own, ref, -share * p.re, -share * p.im));
      for (const [ref, weight] of nodesOf(port)) {
        if (ref < 0) continue;
        touched[ref] = 1;
        eachVolt(port, (seen, share) =>
          addVolts(ref, seen, weight * share * admittance.re, weight * share * admittance.im),
        );
        add(ref, own, -2 * weight * admittance.re, -2 * weight * admittance.im);
      }
    });
  });
  for (let node = 0; node < nodeCount; node++) if (!touched[node]) add(node, node, 1, 0);
  const largest = held.reduce((most, { re, im }) => Math.max(most, Math.hypot(re, im)), 0);
  const isDefined = solveComplexInPlace(m, b, size);
  for (let i = 0; i < size; i++)
    if (!isDefined || !(Math.abs(b.re[i]!) + Math.abs(b.im[i]!) <= BOUNDLESS * (largest || 1)))
      throw new DomainError(
        `At ${frequency} Hz the net resonates with nothing to damp it, so its sine grows without end; add some resistance or take another frequency.`,
        "frequency",
      );
  const at = (i: number): Phasor => ({ re: b.re[i]!, im: b.im[i]! });
  const node = (ref: Ref): Phasor => (ref >= 0 ? at(ref) : held[-1 - ref]!);
  const incident = lines.flatMap((_, index) =>
    [0, 1].map((end) => at(nodeCount + coils.length + 2 * index + end)),
  );
  const outgoing = lines.flatMap(({ a, b: far }, index) =>
    [a, far].map((port, end) => {
      const wave = { re: -incident[2 * index + end]!.re, im: -incident[2 * index + end]!.im };
      eachVolt(port, (ref, share) => {
        wave.re += share * node(ref).re;
        wave.im += share * node(ref).im;
      });
      return wave;
    }),
  );
  return { node, incident, outgoing, propagation };
}

/** γ · length and 1/Zc: lossless, with skin loss (impedance held), or with constant series resistance. */
function wavesOf(
  { impedance, delay, skin, resistance }: PhasorLine,
  omega: number,
): { gamma: Phasor; admittance: Phasor } {
  if (resistance === 0) {
    // √(jω) = (1 + j)·√(ω/2)
    const loss = skin * Math.sqrt(omega / 2);
    return { gamma: { re: loss, im: omega * delay + loss }, admittance: { re: 1 / impedance, im: 0 } };
  }
  // γ = jωT √(1 + R/(jωL)), Y = Y0 / √(…); ωL = ω·delay·impedance.
  const ratio = resistance / (omega * delay * impedance);
  const size = Math.sqrt(Math.hypot(1, ratio));
  const half = -Math.atan(ratio) / 2;
  const root = { re: size * Math.cos(half), im: size * Math.sin(half) };
  const square = size * size;
  return {
    gamma: { re: -omega * delay * root.im, im: omega * delay * root.re },
    admittance: { re: root.re / square / impedance, im: -root.im / square / impedance },
  };
}

function nodesOf(port: Port): (readonly [ref: Ref, weight: number])[] {
  return port.second === null
    ? [[port.node, 1]]
    : [
        [port.node, 1],
        [port.second, port.sign],
      ];
}

/** Calls back with each node's share in the port's voltage. */
function eachVolt(port: Port, each: (ref: Ref, share: number) => void): void {
  if (port.second === null) return each(port.node, 1);
  each(port.node, 0.5);
  each(port.second, 0.5 * port.sign);
}
