import type { Mode } from "../cross-section";
import { LIGHT_SPEED } from "../physical-constants";
import type { Filling } from "./filling-factors";
import type { SeriesAt } from "./line-impedance";
import type { ModeName, ModePattern } from "./mode-patterns";
import { quadratic } from "./wall-recession";
import type { WideBandDebye } from "./wide-band-debye";

/** Loss and line values of one mode; every array runs over the frequencies asked for. */
export interface ModeLoss {
  name: ModeName;
  /** conductor and dielectric part and their sum [dB/m] */
  conductor: Float64Array;
  dielectric: Float64Array;
  total: Float64Array;
  /** sum [Np/m] and phase constant [rad/m] */
  attenuation: Float64Array;
  phase: Float64Array;
  /** series resistance [Ω/m] and inductance [H/m], shunt conductance [S/m] and capacitance [F/m], of one line */
  resistance: Float64Array;
  inductance: Float64Array;
  conductance: Float64Array;
  capacitance: Float64Array;
  /** characteristic impedance [Ω], real and imaginary part; without limit (Infinity) at 0 Hz, as εeff */
  impedance: Float64Array;
  reactance: Float64Array;
  /** (c β/ω)² [1] */
  effectivePermittivity: Float64Array;
  /** kR [1/m]: resistance of smooth thick copper tends to Rs kR */
  resistanceFactor: number;
  /** q = d ln C/d ln ε of each lossy material */
  filling: { er: number; tanD: number; factor: number }[];
}

const DB_PER_NEPER = 20 / Math.LN10;

/** What a mode's loss is made of. */
export interface Ingredients {
  rough: (frequency: number) => SeriesAt;
  factor: number;
  inductance: number;
  fillings: Filling[];
  materials: WideBandDebye[];
}

export function overFrequency(mode: ModePattern, frequencies: Float64Array, from: Ingredients): ModeLoss {
  const n = frequencies.length;
  const array = () => new Float64Array(n);
  const capacitance = staticCapacitance(mode.line, from.inductance);
  const filling = from.fillings.map(({ er, tanD, slope }) => ({
    er,
    tanD,
    factor: quadratic(slope, mode.volts) / mode.energy,
  }));
  const result: ModeLoss = {
    name: mode.name,
    conductor: array(),
    dielectric: array(),
    total: array(),
    attenuation: array(),
    phase: array(),
    resistance: array(),
    inductance: array(),
    conductance: array(),
    capacitance: array(),
    impedance: array(),
    reactance: array(),
    effectivePermittivity: array(),
    resistanceFactor: from.factor,
    filling,
  };
  frequencies.forEach((frequency, k) => {
    const omega = 2 * Math.PI * frequency;
    const { resistance: r, inductance: l } = from.rough(frequency);
    let c = capacitance;
    let loss = 0;
    filling.forEach(({ er, factor }, i) => {
      const e = from.materials[i]!.at(frequency);
      c *= Math.pow(e.re / er, factor);
      loss -= (factor * e.im) / e.re;
    });
    const g = omega * c * loss;
    fill(result, k, { omega, r, l, g, c });
  });
  return result;
}

/** C of a mode that with its external inductance travels at the mode's static speed. */
function staticCapacitance(line: Mode, inductance: number): number {
  return line.effectivePermittivity / (LIGHT_SPEED * LIGHT_SPEED * inductance);
}

function fill(
  result: ModeLoss,
  k: number,
  { omega, r, l, g, c }: { omega: number; r: number; l: number; g: number; c: number },
): void {
  result.resistance[k] = r;
  result.inductance[k] = l;
  result.conductance[k] = g;
  result.capacitance[k] = c;
  if (omega === 0) {
    // R over no conductance: nothing propagates
    result.impedance[k] = Infinity;
    result.effectivePermittivity[k] = Infinity;
    return;
  }
  // Z² = (r + jωl)/(g + jωc)
  const size = g * g + omega * omega * c * c;
  const re = (r * g + omega * omega * l * c) / size;
  const im = (omega * l * g - omega * c * r) / size;
  const modulus = Math.sqrt(re * re + im * im);
  const impedance = Math.sqrt((modulus + re) / 2);
  const reactance = im / (2 * impedance);
  const conductor = r / (2 * impedance);
  const dielectric = (g * modulus) / (2 * impedance);
  // β = Im((g + jωc) Z)
  const phase = g * reactance + omega * c * impedance;
  result.conductor[k] = conductor * DB_PER_NEPER;
  result.dielectric[k] = dielectric * DB_PER_NEPER;
  result.total[k] = (conductor + dielectric) * DB_PER_NEPER;
  result.attenuation[k] = conductor + dielectric;
  result.phase[k] = phase;
  result.impedance[k] = impedance;
  result.reactance[k] = reactance;
  result.effectivePermittivity[k] = ((LIGHT_SPEED * phase) / omega) ** 2;
}
