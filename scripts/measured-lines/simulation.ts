import {
  cascade,
  scatteringFromChain,
  simulate,
  type LineSection,
  type Network,
  type PortData,
  type TwoPortChain,
} from "../../lib/si";
import { BOARD, boardLine, lineChain } from "./board";
import { between, type BoardFit } from "./fit";
import { launchChain } from "./launch";
import { EDGE } from "./step-response";

export type BoardName = "open" | "stepped";
/** Widths and lengths of the two boards from port 1 on [m]. The open one's length stands in its own file. */
const BOARDS: Record<BoardName, { width: number; length: number }[]> = {
  open: [{ width: 3e-3, length: 50e-3 }],
  stepped: [
    { width: 3e-3, length: 50e-3 },
    { width: 8e-3, length: 20e-3 },
    { width: 1e-3, length: 20e-3 },
    { width: 3e-3, length: 50e-3 },
  ],
};
/** Where loss and delay of the time-domain lines are matched [Hz]: the middle of the edge's spectrum. */
const MATCHED = 2e9;
const REFERENCE = 50;

/** A board with the fitted dielectric and launch as scattering parameters on the frequencies given. */
export function boardScattering(name: BoardName, fit: BoardFit, frequencies: Float64Array): PortData {
  const lines = piecesOf(name, fit).map(({ width, length }) =>
    lineChain(boardLine(width, fit.dielectric), length, frequencies),
  );
  const whole = lines.reduce(cascade);
  const launch = launchChain(fit.launch, frequencies);
  return name === "open"
    ? openScattering(cascade(launch, whole))
    : scatteringFromChain(between(launch, whole), REFERENCE, REFERENCE);
}

/** (A − 50 C)/(A + 50 C): nothing flows at the far end. */
function openScattering({ frequencies, values: m }: TwoPortChain): PortData {
  const values = new Float64Array(2 * frequencies.length);
  for (let k = 0; k < frequencies.length; k++) {
    const [ar, ai, cr, ci] = [m[8 * k]!, m[8 * k + 1]!, REFERENCE * m[8 * k + 4]!, REFERENCE * m[8 * k + 5]!];
    const [p, q, x, y] = [ar - cr, ai - ci, ar + cr, ai + ci];
    const size = x * x + y * y;
    values[2 * k] = (p * x + q * y) / size;
    values[2 * k + 1] = (q * x - p * y) / size;
  }
  return { ports: 1, frequencies, references: Float64Array.of(REFERENCE), values };
}

function piecesOf(name: BoardName, { dielectric }: BoardFit): { width: number; length: number }[] {
  const pieces = BOARDS[name];
  if (name === "stepped") return pieces;
  return pieces.map(({ width, length }) => ({ width, length: length + openEnd(width, dielectric.er) }));
}

/**
 * By how much the fringe at an open end lengthens a microstrip [m], to 4 %.
 * @see E. Hammerstad, "Equations for microstrip circuit design", Proc. 5th European Microwave Conference, 1975, p. 268
 */
function openEnd(width: number, er: number): number {
  const u = width / BOARD.height;
  const { phase } = boardLine(width, { er, tanD: 0 })(1e9);
  const e = ((phase * 299_792_458) / (2 * Math.PI * 1e9)) ** 2;
  return (0.412 * BOARD.height * (e + 0.3) * (u + 0.264)) / ((e - 0.258) * (u + 0.8));
}

/**
 * The same board in the time domain, by the network engine: lines with a skin term that is matched at one frequency,
 * launches as line, coil and capacitor.
 * @returns at port 1 the reflected, at port 2 the passing wave of a unit step, at `times`
 */
export function boardInTime(
  name: BoardName,
  fit: BoardFit,
  times: readonly number[],
): { reflected: Float64Array; passing: Float64Array | null } {
  const start = 6 * EDGE;
  const wave = { kind: "pwl" as const, ...gaussianStep(start) };
  const { launch } = fit;
  const sections: LineSection[] = [
    { name: "launch 1", kind: "line", a: "p1", b: "l1", impedance: REFERENCE, delay: launch.delay },
  ];
  const pieces = piecesOf(name, fit);
  pieces.forEach(({ width, length }, i) => {
    const { attenuation, phase, impedance } = boardLine(width, fit.dielectric)(MATCHED);
    const omega = 2 * Math.PI * MATCHED;
    sections.push({
      name: `line ${i + 1}`,
      kind: "line",
      a: `m${i}`,
      b: `m${i + 1}`,
      impedance,
      delay: ((phase - attenuation) * length) / omega,
      skin: (attenuation * length) / Math.sqrt(omega / 2),
    });
  });
  const far = `m${pieces.length}`;
  const network: Network = {
    rails: [],
    drivers: [{ name: "source", kind: "thevenin", node: "p1", resistance: REFERENCE, wave }],
    sections,
    parts: [
      { name: "coil 1", kind: "L", a: "l1", b: "m0", value: launch.inductance },
      { name: "pad 1", kind: "C", a: "m0", b: "0", value: launch.capacitance },
    ],
    probes: [{ name: "p1", node: "p1" }],
  };
  if (name === "stepped") {
    sections.push({
      name: "launch 2",
      kind: "line",
      a: "l2",
      b: "p2",
      impedance: REFERENCE,
      delay: launch.delay,
    });
    network.parts.push(
      { name: "pad 2", kind: "C", a: far, b: "0", value: launch.capacitance },
      { name: "coil 2", kind: "L", a: far, b: "l2", value: launch.inductance },
      { name: "load", kind: "R", a: "p2", b: "0", value: REFERENCE },
    );
    network.probes.push({ name: "p2", node: "p2" });
  }
  const { time, voltage } = simulate(network, { until: start + (times.at(-1) ?? 0) + 1e-10 });
  // The source's 2 V behind 50 Ω are an incident wave of 1 V.
  const at = (probe: string, t: number) => sampleAt(time, voltage[probe]!, start + t);
  const incident = (t: number) =>
    sampleAt(Float64Array.from(wave.time), Float64Array.from(wave.value), start + t) / 2;
  return {
    reflected: Float64Array.from(times, (t) => at("p1", t) - incident(t)),
    passing: name === "stepped" ? Float64Array.from(times, (t) => at("p2", t)) : null,
  };
}

/** From 0 to 2 V around `middle`: the integral of a Gaussian, in 60 straight pieces. */
function gaussianStep(middle: number): { time: number[]; value: number[] } {
  const time: number[] = [];
  const value: number[] = [];
  let sum = 0;
  const pieces = 60;
  const width = (10 * EDGE) / pieces;
  for (let i = 0; i <= pieces; i++) {
    const t = -5 * EDGE + i * width;
    time.push(middle + t);
    value.push(sum);
    sum += (2 * width * Math.exp(-(((t + width / 2) / EDGE) ** 2) / 2)) / (EDGE * Math.sqrt(2 * Math.PI));
  }
  return { time, value };
}

function sampleAt(time: Float64Array, value: Float64Array, at: number): number {
  if (at <= time[0]!) return value[0]!;
  if (at >= time.at(-1)!) return value.at(-1)!;
  let low = 0;
  let high = time.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (time[middle]! <= at) low = middle;
    else high = middle;
  }
  const span = time[high]! - time[low]!;
  return span > 0 ? value[low]! + ((value[high]! - value[low]!) * (at - time[low]!)) / span : value[high]!;
}
