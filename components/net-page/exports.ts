import { alongLine, alongLineWaves } from "@/lib/drawings/along-line.geometry";
import { bounceDiagram } from "@/lib/drawings/bounce-diagram.geometry";
import { alongLineDomain, voltagesAlong } from "@/lib/drawings/line-voltages";
import { type Drawing, emptyDrawing } from "@/lib/drawings/marks";
import type { LengthUnit } from "@/lib/drawings/number-text";
import { voltsAt } from "@/lib/drawings/wave-samples";
import { waveformChart } from "@/lib/drawings/waveform-chart.geometry";
import { bounceSpan, type PictureView } from "./picture-view";

/** How a drawing looks on the page when it is saved. */
export interface Look {
  pin: string | null;
  emphasis: string | null;
  unit: LengthUnit;
  /** [s] */
  cursor: number;
}

type Rows = (string | number)[][];

const WIDTH = 960;

export function waveDrawing(view: PictureView, look: Look): Drawing {
  return waveformChart(view.probes, view.limits, {
    width: WIDTH,
    height: 400,
    focus: look.pin ?? undefined,
    span: view.span,
  });
}

/** Every time at which any of the waves has a sample. */
export function waveRows(view: PictureView): Rows {
  const times = [...new Set(view.probes.flatMap((probe) => Array.from(probe.time)))].sort((a, b) => a - b);
  return [
    ["time [s]", ...view.probes.map((probe) => `${probe.label} [V]`)],
    ...times
      .filter((time) => time <= view.span[1])
      .map((time) => [time, ...view.probes.map((probe) => voltsAt(probe, time) ?? "")]),
  ];
}

export function bounceDrawing(view: PictureView, look: Look): Drawing {
  if (!view.row) return nothing("Bounce diagram");
  return bounceDiagram(view.row, view.rays, view.voltages, {
    width: WIDTH,
    height: 640,
    span: bounceSpan(view, look.cursor),
    unit: look.unit,
    emphasis: look.emphasis,
  });
}

export function bounceRows(view: PictureView): Rows {
  const name = (place: number) => view.row?.nodes[place] || `junction ${place}`;
  return [
    ["leaves at [s]", "arrives at [s]", "from", "to", "amplitude [V]"],
    ...[...view.rays]
      .sort((a, b) => a.start - b.start)
      .map((ray) => {
        const [from, to] = ray.outward ? [ray.section, ray.section + 1] : [ray.section + 1, ray.section];
        const delay = view.row?.sections[ray.section]?.delay ?? 0;
        return [ray.start, ray.start + delay, name(from), name(to), ray.amplitude];
      }),
  ];
}

export function alongDrawing(view: PictureView, look: Look): Drawing {
  if (!view.row || !view.waves) return nothing("Voltage along the line");
  const drawing = alongLine(view.row, {
    width: WIDTH,
    height: 360,
    unit: look.unit,
    volts: alongLineDomain(view.row, view.waves, view.span),
  });
  return {
    ...drawing,
    marks: [
      ...drawing.marks,
      ...alongLineWaves(drawing, view.row, view.waves, look.cursor),
      ...drawing.front,
    ],
  };
}

export function alongRows(view: PictureView, look: Look): Rows {
  const { row, waves } = view;
  const heading = ["section", "share of it", "incident [V]", "reflected [V]", "total [V]"];
  if (!row || !waves) return [heading];
  return [
    heading,
    ...voltagesAlong(row, waves, look.cursor).map((place) => [
      row.sections[place.section]?.id ?? "",
      place.share,
      place.incident,
      place.reflected,
      place.total,
    ]),
  ];
}

function nothing(title: string): Drawing {
  return emptyDrawing(title, "No line leads from the driver to this pin.", WIDTH, 120);
}
