"use client";

import { useLengthUnit } from "@/components/shell/length-unit";
import { Notice } from "@/components/ui/notice";
import { lengthText, ohmsText } from "@/lib/drawings/number-text";
import type { WhatIfStart } from "@/lib/resolve/what-if";
import { impedanceOfWidth, type WidthPoint } from "@/lib/resolve/width-points";
import type { ResolvedPath } from "@/lib/si/path/types";

interface Props {
  start: WhatIfStart;
  widths: readonly WidthPoint[];
  target: ResolvedPath["target"];
}

/** Where a line is judged at its class's target and its width gives something else: the two must not be mixed up. */
export function TargetNotice({ start, widths, target }: Props) {
  const { unit } = useLengthUnit();
  const own = start.atTarget ? impedanceOfWidth(widths, start.mainWidth) : null;
  if (own === null || Math.abs(own / start.impedance - 1) <= (target?.tolerance ?? 0)) return null;
  return (
    <Notice tone="warning">
      Judged at the class target, {ohmsText(start.impedance)}; {lengthText(start.mainWidth, unit)} on{" "}
      {start.mainLayer} gives {ohmsText(own)}. The verdicts hold once the width gives the target.
    </Notice>
  );
}
