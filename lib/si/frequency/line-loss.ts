import { stackHeight, type CrossSection, type LineParameters, type Mode } from "../cross-section";
import { DomainError } from "../errors";
import { solveCrossSection } from "../field";
import { LIGHT_SPEED } from "../physical-constants";
import type { MetalOptions, Pattern } from "./conductor-model";
import { fillingFactors, materialsOf, type Filling } from "./filling-factors";
import { lineImpedance, type SeriesAt } from "./line-impedance";
import { modePatterns, type ModeName, type ModePattern } from "./mode-patterns";
import { roughnessFactor, type Roughness } from "./roughness";
import { skinDepth } from "./skin-effect";
import { externalInductance, quadratic, resistanceFactor, type Solve } from "./wall-recession";
import type { WideBandDebye } from "./wide-band-debye";

export interface ConductorInput {
  /** [S/m], > 0 */
  conductivity: number;
  /** of every copper surface; smooth when left out */
  roughness?: Roughness;
  /** copper of the reference planes [m]; 35 µm. Matters below the frequency where the skin is thinner */
  planeThickness?: number;
  /** width of the reference planes [m]; 30 times the height of the trace over its nearest plane. Matters near DC */
  planeWidth?: number;
}

export interface LineLossOptions {
  /** frequency at which the section's Dk and Df hold [Hz]; 1 GHz */
  dielectricsAt_Hz?: number;
  solve?: Solve;
}

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
  /** characteristic impedance [Ω], real and imaginary part */
  impedance: Float64Array;
  reactance: Float64Array;
  /** (c β/ω)² [1] */
  effectivePermittivity: Float64Array;
  /** kR [1/m]: resistance of smooth thick copper tends to Rs kR */
  resistanceFactor: number;
  /** q = d ln C/d ln ε of each lossy material */
  filling: { er: number; tanD: number; factor: number }[];
}

/** The single line, or the odd (else the first) mode of a pair, and every mode by itself. */
export interface LineLoss extends ModeLoss {
  frequencies: Float64Array;
  modes: ModeLoss[];
  odd?: ModeLoss;
  even?: ModeLoss;
}

const DEFAULT_PLANE_THICKNESS = 35e-6;
const PLANE_HEIGHTS = 30;
const DB_PER_NEPER = 20 / Math.LN10;

/**
 * Loss and line values over frequency from the telegrapher's equations of each mode.
 *
 *     γ = √((R + jωL)(G + jωC)),   αc = R/(2 Re Z),   αd = G |Z|²/(2 Re Z),   α = αc + αd (exact)
 *
 * R and L: `lineImpedance` (skin and proximity effect from DC up), R and the internal part of L times the roughness
 * factor. C and G: the static C moved by each dielectric's wideband Debye value through its filling factor.
 *
 * @param params       of the section, as `solveCrossSection` gives them
 * @param frequencies  [Hz], ≥ 0
 * @returns see above; smooth R within 2 % of finite elements, quasi-static: no dispersion, radiation or surface waves
 * @throws DomainError for bad input, UnsupportedError for copper without thickness
 */
export function lineLoss(
  section: CrossSection,
  params: LineParameters,
  conductor: ConductorInput,
  frequencies: Float64Array,
  options: LineLossOptions = {},
): LineLoss {
  const metal = metalOf(section, conductor);
  for (const f of frequencies) {
    if (!(f >= 0 && Number.isFinite(f))) {
      throw new DomainError(`A frequency must be zero or more; it is ${f}.`, "frequencies");
    }
  }
  const solve = options.solve ?? ((s: CrossSection) => solveCrossSection(s));
  const factors = resistanceFactor(section, solve);
  const external = externalInductance(params);
  const fillings = fillingFactors(section, solve);
  const materials = materialsOf(fillings, options.dielectricsAt_Hz ?? 1e9);
  const modes = modePatterns(params).map((mode): ModeLoss => {
    const factor = quadratic(factors, mode.currents);
    const inductance = quadratic(external, mode.currents);
    const series = lineImpedance(
      {
        section,
        metal,
        pattern: patternOf(mode.name),
        currents: mode.currents,
        factor,
        external: inductance,
      },
      frequencies,
    );
    return overFrequency(mode, frequencies, {
      rough: roughSeries(series, conductor, inductance),
      factor,
      inductance,
      fillings,
      materials,
    });
  });
  const odd = modes.find((mode) => mode.name === "odd");
  const even = modes.find((mode) => mode.name === "even");
  const first = odd ?? modes[0];
  if (!first) throw new DomainError("The parameters hold no mode.", "params");
  return { ...first, frequencies, modes, ...(odd && { odd }), ...(even && { even }) };
}

function patternOf(name: ModeName): Pattern {
  return name === "single" || name === "odd" || name === "even" ? name : "both";
}

function metalOf(section: CrossSection, conductor: ConductorInput): MetalOptions {
  const nearest = Math.min(
    ...section.traces.flatMap(({ y, thickness }) =>
      section.upperPlane ? [y, stackHeight(section) - y - thickness] : [y],
    ),
  );
  const metal = {
    conductivity: conductor.conductivity,
    planeThickness: conductor.planeThickness ?? DEFAULT_PLANE_THICKNESS,
    planeWidth: conductor.planeWidth ?? PLANE_HEIGHTS * nearest,
  };
  for (const [field, value] of Object.entries(metal)) {
    if (!(value > 0 && Number.isFinite(value))) {
      throw new DomainError(`The ${field} must be above zero; it is ${value}.`, `conductor.${field}`);
    }
  }
  const outer = Math.max(...section.traces.map((t) => Math.max(t.widthBottom, t.widthTop)));
  const span = Math.max(...section.traces.map((t) => t.x)) - Math.min(...section.traces.map((t) => t.x));
  metal.planeWidth = Math.max(metal.planeWidth, (conductor.planeWidth ? 1 : 3) * (span + outer));
  return metal;
}

function roughSeries(
  series: (frequency: number) => SeriesAt,
  { conductivity, roughness }: ConductorInput,
  external: number,
): (frequency: number) => SeriesAt {
  if (!roughness) return series;
  return (frequency) => {
    const smooth = series(frequency);
    if (frequency === 0) return smooth;
    const factor = roughnessFactor(roughness, skinDepth(conductivity, frequency));
    return {
      resistance: smooth.resistance * factor,
      inductance: external + (smooth.inductance - external) * factor,
    };
  };
}

interface Ingredients {
  rough: (frequency: number) => SeriesAt;
  factor: number;
  inductance: number;
  fillings: Filling[];
  materials: WideBandDebye[];
}

function overFrequency(mode: ModePattern, frequencies: Float64Array, from: Ingredients): ModeLoss {
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
    // no loss in a leakage-free dielectric, an impedance without limit: the static line's values stand in
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
