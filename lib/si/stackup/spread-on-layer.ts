import type { CrossSection, LineParameters } from "../cross-section";
import { impedanceSpread, predictedYield, type SectionTolerances, type Tolerance } from "../spread";
import { buildCrossSection, type BuiltCrossSection, type TraceShape } from "./build-cross-section";
import type { Stackup } from "./model";
import { type Process, validateProcess } from "./process";
import { builtThickness, finishedCopper, layerAt } from "./thickness";

/** How production spreads the impedance of a line on a layer; of a pair, its differential one. Plain data. */
export interface LayerSpread {
  /** [Ω] */
  nominal: number;
  mean: number;
  sigma: number;
  /** 0.5th and 99.5th percentile [Ω] */
  low: number;
  high: number;
  /** every tolerance at its bad end [Ω] */
  corners: { low: number; nominal: number; high: number };
  histogram: { edges: Float64Array; counts: Int32Array };
  /** every sample, ascending [Ω] */
  values: Float64Array;
  /** the weightiest first */
  sensitivities: { name: string; ohms: number; share: number }[];
  /** "1,000 samples of a second-order model" */
  method: string;
  solves: number;
}

/** Fixed, so that a run is repeated to the last digit. */
const SEED = 20_260_101;
export const SPREAD_SAMPLES = 1000;

/**
 * Monte Carlo estimate of a line's impedance over the fabricator's process: width, copper, heights, Dk and mask.
 * A layer's own thickness tolerance comes before the process's.
 *
 * @throws DomainError for missing or illegal inputs, UnsupportedError where the section cannot be solved
 */
export function spreadOnLayer(
  stackup: Stackup,
  index: number,
  shape: TraceShape,
  process: Process,
  options: {
    samples?: number;
    accuracy?: "live" | "standard" | "reference";
    /** in place of the field solver, for whoever keeps its answers */
    solve?: (section: CrossSection) => LineParameters;
  } = {},
): LayerSpread {
  validateProcess(process);
  const built = buildCrossSection(stackup, index, shape);
  const tolerances = sectionTolerances(stackup, index, built, process);
  const { samples = SPREAD_SAMPLES, accuracy = "standard", solve } = options;
  const spread = impedanceSpread(built.section, tolerances, {
    samples,
    seed: SEED,
    accuracy,
    ...(solve && { solve }),
  });
  return {
    nominal: spread.nominal,
    mean: spread.mean,
    sigma: spread.sigma,
    low: quantile(spread.values, 0.005),
    high: quantile(spread.values, 0.995),
    corners: spread.corners,
    histogram: spread.histogram,
    values: spread.values,
    sensitivities: spread.sensitivities.map(({ target, ohms, share }) => ({
      name: nameOf(target, stackup, index, built),
      ohms,
      share,
    })),
    method: `${samples.toLocaleString("en")} samples ${spread.method === "direct" ? "solved one by one" : "of a second-order model"}`,
    solves: spread.solves,
  };
}

/** Share of the spread within target ± fraction [1]. */
export function yieldOf(spread: Pick<LayerSpread, "values">, target: number, fraction: number): number {
  return predictedYield(spread.values, target, fraction);
}

/** The process's tolerances on the quantities of the section it builds. */
export function sectionTolerances(
  stackup: Stackup,
  index: number,
  built: BuiltCrossSection,
  process: Process,
): SectionTolerances {
  const { section, sources } = built;
  const { distribution } = process;
  const share = (relative: number): Tolerance => ({ relative, distribution });
  return {
    width: share(process.width),
    copper: share(layerAt(stackup, index).tolerance ?? process.copper),
    layers: section.layers.map((layer, i) => {
      const source = sources[i];
      if (source === undefined) return null;
      const isMask = source === built.maskLayer;
      const own = layerAt(stackup, source);
      const tolerance = own.tolerance ?? (isMask ? process.mask : process.dielectric);
      return {
        // the slab beside the trace is higher than the laminate by the copper, which scatters by itself
        thickness: { absolute: tolerance * builtThickness(stackup, source), distribution },
        er: share(dkShare(layer.er, process.dk)),
        material: `layer ${source} ${own.dk ?? ""}`,
      };
    }),
    ...(section.mask && {
      mask: {
        thickness: share(maskShare(stackup, built, process)),
        er: share(dkShare(section.mask.er, process.dk)),
      },
    }),
  };
}

/** A Dk never falls below that of air. */
const dkShare = (er: number, share: number) => Math.min(share, Math.max(0, (er - 1) / er) * 0.999);

function maskShare(stackup: Stackup, { maskLayer, section }: BuiltCrossSection, process: Process): number {
  const own = maskLayer === null ? null : layerAt(stackup, maskLayer).tolerance;
  const wanted = own ?? process.mask;
  // beside the trace the mask stays lower than the copper
  const room = roomBelowCopper(section);
  return Math.min(wanted, room);
}

function roomBelowCopper({ mask, traces }: CrossSection): number {
  const copper = Math.min(...traces.map((trace) => trace.thickness));
  return mask ? Math.max(0, (copper / mask.overLaminate - 1) * 0.5) : 0;
}

type Target = ReturnType<typeof impedanceSpread>["sensitivities"][number]["target"];

function nameOf(target: Target, stackup: Stackup, index: number, { sources }: BuiltCrossSection): string {
  const layer = (i: number) => stackup.layers[sources[i] ?? -1]?.name ?? `layer ${i + 1}`;
  switch (target.kind) {
    case "layer thickness":
      return `thickness of ${layer(target.layer)}`;
    case "layer er":
      return `Dk of ${[...new Set(target.layers.map(layer))].join(" and ")}`;
    case "copper":
      return `copper of ${layerAt(stackup, index).name} (${(finishedCopper(stackup, index) * 1e6).toFixed(0)} µm)`;
    case "width":
      return "width";
    case "slope":
      return "side slope";
    case "gap":
      return "gap";
    case "mask thickness":
      return "mask thickness";
    case "mask er":
      return "Dk of the mask";
  }
}

function quantile(values: Float64Array, p: number): number {
  const position = p * (values.length - 1);
  const below = Math.floor(position);
  const low = values[below] ?? 0;
  return low + (position - below) * ((values[below + 1] ?? low) - low);
}
