"use client";

import { useMemo } from "react";
import {
  type ImpedanceBin,
  spreadHistogram,
  type SpreadHistogramOptions,
} from "@/lib/drawings/spread-histogram.geometry";
import { DrawingSvg } from "./drawing-svg";
import { Sized } from "./sized";

type Props = Omit<SpreadHistogramOptions, "width"> & { bins: readonly ImpedanceBin[] };

/** Production's impedances about their target. */
export function SpreadHistogram(props: Props) {
  return <Sized>{(width) => <AtWidth {...props} width={width} />}</Sized>;
}

function AtWidth({ bins, width, height, title, target, low, high }: Props & { width: number }) {
  const { ohms, tolerance } = target;
  const drawing = useMemo(
    () => spreadHistogram(bins, { width, height, title, target: { ohms, tolerance }, low, high }),
    [bins, width, height, title, ohms, tolerance, low, high],
  );
  return <DrawingSvg drawing={drawing} />;
}
