import type { Domain, PlotBox, Scale } from "./axis";
import { type Mark, type Point, polygon, rect } from "./marks";
import { type Excess, excesses } from "./wave-samples";
import type { LimitLine, WaveProbe } from "./waveform-chart.geometry";

export interface Violation extends Excess {
  probe: string;
  limit: string;
  side: "max" | "min";
}

/** Every span in which a judged wave passes a limit that holds then. */
export function findViolations(
  probes: readonly WaveProbe[],
  limits: readonly LimitLine[],
  span: Domain,
): Violation[] {
  return limits
    .filter((l) => !l.reference)
    .flatMap((l) =>
      probes
        .filter((p) => (l.probes ? l.probes.includes(p.id) : p.role === undefined || p.role === "total"))
        .flatMap((p) =>
          excesses(
            p,
            l.volts,
            l.side,
            Math.max(l.from ?? span[0], span[0]),
            Math.min(l.to ?? span[1], span[1]),
          ).map((e) => ({ ...e, probe: p.id, limit: l.id, side: l.side })),
        ),
    );
}

/** Spans in which any limit is passed, as bands; overlapping ones are one. */
export function bands(violations: readonly Violation[], x: Scale, box: PlotBox): Mark[] {
  const spans: [number, number][] = [];
  for (const v of [...violations].sort((a, b) => a.from - b.from)) {
    const last = spans.at(-1);
    if (last && v.from <= last[1]) last[1] = Math.max(last[1], v.to);
    else spans.push([v.from, v.to]);
  }
  return spans.map(([from, to]) =>
    rect(x(from), box.top, Math.max(x(to) - x(from), 1), box.bottom - box.top, {
      fill: "fail",
      fillOpacity: 0.07,
    }),
  );
}

/** What is past the limit: hatched for the wave in focus, tinted for the others. */
export function shade(v: Violation, focused: boolean, x: Scale, y: Scale): Mark[] {
  const outline = v.outline.map(([t, u]): Point => [x(t), y(u)]);
  return [
    polygon(outline, { fill: "fail", fillOpacity: focused ? 0.16 : 0.08 }),
    ...(focused ? [polygon(outline, { fill: "hatch-fail" })] : []),
  ];
}
