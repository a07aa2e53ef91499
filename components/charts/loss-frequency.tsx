"use client";

import { useMemo } from "react";
import {
  lossFrequency,
  type LossFrequencyOptions,
  type LossPoint,
} from "@/lib/drawings/loss-frequency.geometry";
import { DrawingSvg } from "./drawing-svg";
import { Sized } from "./sized";

type Props = Omit<LossFrequencyOptions, "width"> & { points: readonly LossPoint[] };

/** Loss per length against frequency. */
export function LossFrequency(props: Props) {
  return <Sized>{(width) => <AtWidth {...props} width={width} />}</Sized>;
}

function AtWidth({ points, width, height, title, unit, dispersionFrom }: Props & { width: number }) {
  const drawing = useMemo(
    () => lossFrequency(points, { width, height, title, unit, dispersionFrom }),
    [points, width, height, title, unit, dispersionFrom],
  );
  return <DrawingSvg drawing={drawing} />;
}
