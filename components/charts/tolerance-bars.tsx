"use client";

import { useMemo } from "react";
import { toleranceBars, type ToleranceShare } from "@/lib/drawings/tolerance-bars.geometry";
import { DrawingSvg } from "./drawing-svg";
import { Sized } from "./sized";

/** What each tolerance makes of the spread. */
export function ToleranceBars({ shares }: { shares: readonly ToleranceShare[] }) {
  return <Sized>{(width) => <AtWidth shares={shares} width={width} />}</Sized>;
}

function AtWidth({ shares, width }: { shares: readonly ToleranceShare[]; width: number }) {
  const drawing = useMemo(() => toleranceBars(shares, { width }), [shares, width]);
  return <DrawingSvg drawing={drawing} />;
}
