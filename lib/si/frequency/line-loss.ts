import { stackHeight, type CrossSection, type LineParameters } from "../cross-section";
import { DomainError } from "../errors";
import { solveCrossSection } from "../field";
import type { MetalOptions, Pattern } from "./conductor-model";
import { fillingFactors, materialsOf } from "./filling-factors";
import { filamentsOf, lineImpedance, type Filaments, type SeriesAt } from "./line-impedance";
import { overFrequency, type ModeLoss } from "./mode-loss";
import { modePatterns, type ModeName } from "./mode-patterns";
import { roughnessFactor, type Roughness } from "./roughness";
import { skinDepth } from "./skin-effect";
import { externalInductance, quadratic, resistanceFactor, type Solve } from "./wall-recession";

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

/** The single line, or the odd (else the first) mode of a pair, and every mode by itself. */
export interface LineLoss extends ModeLoss {
  frequencies: Float64Array;
  modes: ModeLoss[];
  odd?: ModeLoss;
  even?: ModeLoss;
}

const DEFAULT_PLANE_THICKNESS = 35e-6;
const PLANE_HEIGHTS = 30;

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
 * @returns see above; smooth R within 2 % (see `lineImpedance`), quasi-static: no dispersion, radiation or surface waves
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
  const models = new Map<Pattern, Filaments>();
  const filaments = (pattern: Pattern) => {
    const found = models.get(pattern) ?? filamentsOf(section, metal, pattern);
    models.set(pattern, found);
    return found;
  };
  const modes = modePatterns(params).map((mode): ModeLoss => {
    const factor = quadratic(factors, mode.currents);
    const inductance = quadratic(external, mode.currents);
    const series = lineImpedance(
      {
        conductivity: metal.conductivity,
        filaments: filaments(patternOf(mode.name, section)),
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

/** Odd and even currents mirror themselves between traces side by side; one above the other both must be solved. */
function patternOf(name: ModeName, { traces }: CrossSection): Pattern {
  if (name === "single") return name;
  const sideBySide = (name === "odd" || name === "even") && traces[0]?.y === traces[1]?.y;
  return sideBySide ? name : "both";
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
