import {
  classifyCrossSection,
  type CrossSection,
  type LineParameters,
  type Mode,
  type Structure,
} from "../cross-section";
import { DomainError } from "../errors";
import { ETA0, MU0 } from "../physical-constants";
import { kirschningJansenDispersion, normalisedFrequency, permittivityTerm } from "./kirschning-jansen-1982";
import { kirschningJansenPairDispersion, pairPermittivityTerms } from "./kirschning-jansen-1984";
import { nextModeOf } from "./next-mode";

export interface DispersionNote {
  /** from here on delay or impedance of a mode leaves the quasi-static value by more than 1 % [Hz]; null: never below 300 GHz */
  onset: number | null;
  /** at the frequency asked for: the mode that is off most; relative, + where the real value is larger */
  delay: number;
  impedance: number;
  /** where a second mode of the trace, or the first surface wave, can travel [Hz] */
  nextMode: number;
  /** one or two sentences for the screen */
  words: string;
  /** formula that said so */
  method: string;
}

const LIMIT = 0.01;
const LOWEST = 1e7;
const HIGHEST = 3e11;
const STEP = 1.03;

interface Deviation {
  delay: number;
  impedance: number;
}

/**
 * Up to which frequency the quasi-static answer is good to 1 %, and how far off it is at one frequency.
 *
 *     εe(f) = ε̂ − (ε̂ − εe)/(1 + P(f)),  ε̂ the laminate's (or a higher) permittivity, εe of the field solution
 *
 * Surface lines: P of Kirschning and Jansen (1982 single, 1984 pairs), impedance by their ratios. Between planes: none
 * in one dielectric; in several, Getsinger's form with the constant of Hammerstad and Jansen 1980, an estimate.
 *
 * @param frequency  [Hz], ≥ 0
 * @throws DomainError for a bad section or frequency
 */
export function dispersionNote(
  section: CrossSection,
  params: LineParameters,
  frequency: number,
): DispersionNote {
  if (!(frequency >= 0 && Number.isFinite(frequency))) {
    throw new DomainError(`The frequency must be zero or more; it is ${frequency}.`, "frequency");
  }
  const structure = classifyCrossSection(section);
  const { at, method } = deviationOf(section, structure, params);
  const onset = onsetOf(at);
  const { delay, impedance } = at(frequency);
  const nextMode = nextModeOf(section, structure);
  return {
    onset,
    delay,
    impedance,
    nextMode,
    method,
    words: wordsOf({ onset, delay, impedance, nextMode }, frequency),
  };
}

function deviationOf(
  section: CrossSection,
  structure: Structure,
  params: LineParameters,
): { at: (frequency: number) => Deviation; method: string } {
  const modes = modesOf(params);
  const permittivities = [
    ...section.layers.map((layer) => layer.er),
    ...(section.mask ? [section.mask.er] : []),
  ];
  const highest = Math.max(...permittivities);
  if (structure.place === "inner") {
    const lowest = Math.min(...permittivities);
    if (highest - lowest < 1e-6) {
      return {
        at: () => ({ delay: 0, impedance: 0 }),
        method: "one dielectric between planes: no dispersion",
      };
    }
    const height = structure.below.height + structure.thickness + (structure.above?.height ?? 0);
    const at = (f: number) => worst(modes.map(({ line }) => betweenPlanes(line, highest, lowest, height, f)));
    return { at, method: "Getsinger's form, an estimate" };
  }
  const { width, gap, below } = structure;
  const u = width / below.height;
  const laminate = Math.max(below.er, structure.above ? highest : 1);
  const pair = gap !== null;
  const at = (f: number): Deviation => {
    const fn = normalisedFrequency(f, below.height);
    const single = permittivityTerm(u, laminate, fn);
    const coupled = pair ? pairPermittivityTerms(u, gap / below.height, laminate, fn) : null;
    const ratios = impedanceRatios(structure, laminate, f);
    return worst(
      modes.map(({ name, line }) => {
        const e0 = line.effectivePermittivity;
        const ceiling = Math.max(laminate, e0);
        const term =
          coupled && name === "odd" ? coupled.odd : coupled && name === "even" ? coupled.even : single;
        const e = ceiling - (ceiling - e0) / (1 + term);
        return { delay: Math.sqrt(e / e0) - 1, impedance: ratios[name] - 1 };
      }),
    );
  };
  return { at, method: pair ? "Kirschning–Jansen 1984" : "Kirschning–Jansen 1982" };
}

type ModeKind = "single" | "odd" | "even";

function modesOf(params: LineParameters): { name: ModeKind; line: Mode }[] {
  const { single, pair } = params;
  if (single) return [{ name: "single", line: single }];
  if (!pair) return [];
  if (pair.odd && pair.even)
    return [
      { name: "odd", line: pair.odd },
      { name: "even", line: pair.even },
    ];
  return pair.modes.map((line) => ({ name: "single", line }));
}

/** Z(f)/Z(0) by the formulas; 1 where they have no value. */
function impedanceRatios(structure: Structure, er: number, f: number): Record<ModeKind, number> {
  const { width, gap, below } = structure;
  const ratios = { single: 1, odd: 1, even: 1 };
  try {
    const at = (frequency: number) => kirschningJansenDispersion(width, below.height, er, frequency);
    ratios.single = at(f).impedance / at(0).impedance;
    if (gap !== null) {
      const pairAt = (frequency: number) =>
        kirschningJansenPairDispersion(width, gap, below.height, er, frequency);
      const [there, rest] = [pairAt(f), pairAt(0)];
      ratios.odd = there.odd / rest.odd;
      ratios.even = there.even / rest.even;
    }
  } catch (error) {
    // far outside the formula's range the permittivity alone must say it
    if (!(error instanceof DomainError)) throw error;
  }
  return ratios;
}

function betweenPlanes(line: Mode, highest: number, lowest: number, height: number, f: number): Deviation {
  const e0 = line.effectivePermittivity;
  const z = line.impedance;
  const g = ((Math.PI ** 2 / 12) * (highest - lowest) * Math.sqrt((2 * Math.PI * z) / ETA0)) / e0;
  const x = (f * 2 * MU0 * height) / z;
  const e = Math.max(e0, highest - (highest - e0) / (1 + g * x * x));
  const ratio = Math.sqrt(e / e0);
  return { delay: ratio - 1, impedance: 1 / ratio - 1 };
}

function worst(deviations: Deviation[]): Deviation {
  const size = ({ delay, impedance }: Deviation) => Math.max(Math.abs(delay), Math.abs(impedance));
  return deviations.reduce((a, b) => (size(b) > size(a) ? b : a), { delay: 0, impedance: 0 });
}

function onsetOf(at: (frequency: number) => Deviation): number | null {
  const over = (f: number) => {
    const { delay, impedance } = at(f);
    return Math.max(Math.abs(delay), Math.abs(impedance)) > LIMIT;
  };
  for (let f = LOWEST; f <= HIGHEST; f *= STEP) {
    if (!over(f)) continue;
    let [low, high] = [f / STEP, f];
    for (let pass = 0; pass < 12; pass++) {
      const middle = Math.sqrt(low * high);
      if (over(middle)) high = middle;
      else low = middle;
    }
    return high;
  }
  return null;
}

function wordsOf(
  { onset, delay, impedance, nextMode }: Pick<DispersionNote, "onset" | "delay" | "impedance" | "nextMode">,
  frequency: number,
): string {
  const reach =
    onset === null
      ? "No dispersion above 1 % below 300 GHz."
      : `Quasi-static values hold within 1 % up to ${gigahertz(onset)}.`;
  const there =
    onset !== null && frequency > onset
      ? ` At ${gigahertz(frequency)} the delay is ${off(delay)} and the impedance ${off(impedance)} off.`
      : "";
  const mode = frequency > nextMode ? ` Above ${gigahertz(nextMode)} a second mode can travel.` : "";
  return reach + there + mode;
}

function gigahertz(frequency: number): string {
  const value = frequency / 1e9;
  return `${value >= 100 ? value.toFixed(0) : value.toPrecision(2)} GHz`;
}

function off(ratio: number): string {
  return `${ratio < 0 ? "−" : "+"}${Math.abs(100 * ratio).toFixed(1)} %`;
}
