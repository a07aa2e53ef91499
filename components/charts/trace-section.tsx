"use client";

import { useMemo } from "react";
import { traceSection, type TraceSectionOptions } from "@/lib/drawings/trace-section.geometry";
import type { TraceSectionShape } from "@/lib/drawings/trace-shape";
import { DrawingSvg } from "./drawing-svg";
import { Sized } from "./sized";

type Props = Omit<TraceSectionOptions, "width"> & {
  /** the engine's CrossSection fits */
  shape: TraceSectionShape;
  width?: number;
};

/** One trace or pair with its planes, to scale, dimensioned. */
export function TraceSection({ width, ...props }: Props) {
  return width ? (
    <AtWidth {...props} width={width} />
  ) : (
    <Sized>{(w) => <AtWidth {...props} width={w} />}</Sized>
  );
}

function AtWidth({ shape, width, height, unit, title, equipotentials }: Props & { width: number }) {
  const drawing = useMemo(
    () => traceSection(shape, { width, height, unit, title, equipotentials }),
    [shape, width, height, unit, title, equipotentials],
  );
  return <DrawingSvg drawing={drawing} />;
}
