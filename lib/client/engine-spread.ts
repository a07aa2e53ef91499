import type { ProcessDoc } from "@/lib/schemas/process";
import type { Stackup } from "@/lib/si/stackup";
import type { Process } from "@/lib/si/stackup/process";
import { spreadOnLayer, yieldOf } from "@/lib/si/stackup/spread-on-layer";
import { toSi } from "@/lib/si/units";
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
      spreadOnLayer(stackup, index, traceShape(shape), processInSi(process)),
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

function processInSi(process: ProcessDoc): Process {
  const length = (quantity: ProcessDoc["minWidth"]) => (quantity ? toSi(quantity, "length") : null);
  return {
    width: Number(process.widthPercent) / 100,
    copper: Number(process.copperPercent) / 100,
    dielectric: Number(process.dielectricPercent) / 100,
    dk: Number(process.dkPercent) / 100,
    mask: Number(process.maskPercent) / 100,
    distribution: process.distribution,
    minWidth: length(process.minWidth),
    minGap: length(process.minGap),
  };
}
