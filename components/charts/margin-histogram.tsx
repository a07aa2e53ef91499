"use client";

import { useMemo } from "react";
import { marginHistogram, type MarginHistogramOptions } from "@/lib/drawings/margin-histogram.geometry";
import { DrawingSvg } from "./drawing-svg";

type Props = MarginHistogramOptions & { margins: readonly number[] };

/** How margins are spread about their limit. */
export function MarginHistogram({ margins, width, height, title, unit, near }: Props) {
  const drawing = useMemo(
    () => marginHistogram(margins, { width, height, title, unit, near }),
    [margins, width, height, title, unit, near],
  );
  return <DrawingSvg drawing={drawing} />;
}
