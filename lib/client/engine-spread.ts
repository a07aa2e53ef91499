import { processToSi } from "@/lib/resolve/process-to-si";
import type { ProcessDoc } from "@/lib/schemas/process";
import type { CrossSection } from "@/lib/si/cross-section";
import { solveCrossSection } from "@/lib/si/field";
import { spreadOnLayer, type Stackup, yieldOf } from "@/lib/si/stackup";
import { attempt, type LineShape, type Outcome, traceShape } from "./engine-line";
import { remembered } from "./engine-memo";

/** How production of one line is predicted to spread. */
export interface SpreadJob {
  kind: "line-spread";
  stackup: Stackup;
  index: number;
  shape: LineShape;
  process: ProcessDoc;
  /** target [Ω] and ± of it [%] */
  ohms: number;
  tolerance: number;
}

export interface SpreadFacts {
  /** share of production within the tolerance, as a fraction */
  yield: number;
  /** 0.5th and 99.5th percentile [Ω] */
  low: number;
  high: number;
  /** [Ω] */
  mean: number;
  sigma: number;
  histogram: HistogramBin[];
  /** the largest first */
  sensitivities: SpreadShare[];
  method: string;
}

export interface HistogramBin {
  /** [Ω] */
  from: number;
  to: number;
  count: number;
}

export interface SpreadShare {
  name: string;
  /** of the variance, as a fraction */
  share: number;
  /** that its tolerance makes [Ω] */
  ohms: number;
}

export function lineSpread({
  stackup,
  index,
  shape,
  process,
  ohms,
  tolerance,
}: SpreadJob): Outcome<SpreadFacts> {
  return attempt(() => {
    const spread = remembered(["spread", stackup, index, shape, process], () =>
      spreadOnLayer(stackup, index, traceShape(shape), processToSi(process), {
        solve: solveOnce("standard"),
      }),
    );
    const { low, high, mean, sigma, histogram, sensitivities, method } = spread;
    return {
      yield: yieldOf(spread, ohms, tolerance / 100),
      low,
      high,
      mean,
      sigma,
      histogram: [...histogram.counts].map((count, i) => ({
        from: histogram.edges[i] ?? 0,
        to: histogram.edges[i + 1] ?? 0,
        count,
      })),
      sensitivities,
      method,
    };
  });
}

/** Mirrored layers and classes of one width share the solutions under their spreads. */
const solveOnce = (accuracy: "live" | "standard") => (section: CrossSection) =>
  remembered(["solved", section, accuracy], () => solveCrossSection(section, { accuracy }));

/** How wide the spread is over a range of widths. */
export interface BandJob {
  kind: "line-band";
  stackup: Stackup;
  index: number;
  gap: number | null;
  process: ProcessDoc;
  /** [m] */
  from: number;
  to: number;
}

/** 0.5th and 99.5th percentile as shares of the nominal. */
export interface BandPoint {
  /** [m] */
  width: number;
  low: number;
  high: number;
}

const BAND_POINTS = 7;
const BAND_SAMPLES = 400;

/** The spread's ends change slowly with the width: a few widths tell them for a curve. */
export function spreadBand({ stackup, index, gap, process, from, to }: BandJob): BandPoint[] {
  return Array.from({ length: BAND_POINTS }, (_, i) => from * (to / from) ** (i / (BAND_POINTS - 1))).flatMap(
    (width) => {
      const spread = attempt(() =>
        remembered(["band", stackup, index, { width, gap }, process], () => {
          const { nominal, low, high } = spreadOnLayer(
            stackup,
            index,
            traceShape({ width, gap }),
            processToSi(process),
            { samples: BAND_SAMPLES, accuracy: "live", solve: solveOnce("live") },
          );
          return { low: low / nominal, high: high / nominal };
        }),
      );
      return spread.ok ? [{ width, ...spread.value }] : [];
    },
  );
}
