"use client";

import { useMemo } from "react";
import { alongLine, type AlongLineOptions, alongLineWaves } from "@/lib/drawings/along-line.geometry";
import { alongLineDomain, describeAlong, type SectionWaves } from "@/lib/drawings/line-voltages";
import type { Domain } from "@/lib/drawings/axis";
import type { LineRow } from "@/lib/drawings/line-row";
import { DrawingSvg } from "./drawing-svg";
import { Sized } from "./sized";

type Props = Omit<AlongLineOptions, "width" | "volts"> & {
  row: LineRow;
  waves: readonly SectionWaves[];
  /** the time the voltage axis must hold for [s] */
  span: Domain;
  cursorTime: number;
  width?: number;
  volts?: Domain;
};

/** Voltage over place at the cursor's time: incident, reflected, total. */
export function AlongLine({ width, ...props }: Props) {
  return width ? (
    <AtWidth {...props} width={width} />
  ) : (
    <Sized least={420}>{(w) => <AtWidth {...props} width={w} />}</Sized>
  );
}

function AtWidth({
  row,
  waves,
  span,
  volts,
  cursorTime,
  width,
  height,
  title,
  unit,
  by,
  limits,
}: Props & { width: number }) {
  const [from, to] = span;
  const domain = useMemo(
    () => volts ?? alongLineDomain(row, waves, [from, to], limits),
    [volts, row, waves, from, to, limits],
  );
  const drawing = useMemo(
    () => alongLine(row, { width, height, title, unit, by, limits, volts: domain }),
    [row, width, height, title, unit, by, limits, domain],
  );
  const said = drawing.empty
    ? drawing
    : { ...drawing, description: `${drawing.description} ${describeAlong(row, waves, cursorTime)}` };
  return (
    <DrawingSvg
      drawing={said}
      overlay={[...alongLineWaves(drawing, row, waves, cursorTime), ...drawing.front]}
    />
  );
}
