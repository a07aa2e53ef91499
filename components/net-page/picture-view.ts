import type { PathPicture } from "@/lib/client/engine-jobs";
import { type BounceRay, type NodeVoltage, raysFromTable } from "@/lib/drawings/bounce-rays";
import { harmfulRay, harmSense } from "@/lib/drawings/harmful-ray";
import type { LineRow } from "@/lib/drawings/line-row";
import type { SectionWaves } from "@/lib/drawings/line-voltages";
import { type NetworkRow, rowFromNetwork } from "@/lib/drawings/row-from-network";
import type { WaveProbe } from "@/lib/drawings/waveform-chart.geometry";
import { wavesOfRow } from "@/lib/drawings/waves-of-row";
import type { PathLimit } from "@/lib/resolve/path-limits";
import type { PathWaveforms } from "@/lib/resolve/path-waveforms";

/** More receivers than this are drawn only when they are looked at. */
const MOST_DRAWN = 3;

export interface PictureView {
  span: [number, number];
  probes: WaveProbe[];
  limits: PathLimit[];
  row: LineRow | null;
  waves: SectionWaves[] | null;
  rays: BounceRay[];
  voltages: NodeVoltage[];
  leftOut: string | null;
  refused: string | null;
}

/** What the drawings show of a picture, seen from one receiver; `before` is laid under its wave. */
export function pictureView(
  picture: PathPicture,
  pin: string | null,
  before: PathPicture | null,
): PictureView {
  const { waveforms, bounces } = picture;
  const found = rowTo(waveforms, pin);
  const many = waveforms.probes.length - 1 > MOST_DRAWN;
  const { rays, voltages } = found
    ? raysFromTable(bounces.table, found.sections, found.nodes, {
        swing: swingOf(waveforms),
        start: restOf(waveforms, found),
      })
    : { rays: [], voltages: [] };
  return {
    span: [0, Math.max(waveforms.until, before?.waveforms.until ?? 0)],
    probes: [
      ...waveforms.probes
        .filter((probe) => !many || probe.drives || probe.pin === pin)
        .map(({ pin: id, label, voltage }): WaveProbe => ({
          id,
          label,
          time: waveforms.time,
          volts: voltage,
        })),
      ...asBefore(before?.waveforms ?? null, pin),
    ],
    limits: waveforms.limits.filter((limit) => pin === null || limit.probes.includes(pin)),
    row: found?.row ?? null,
    waves:
      found && waveforms.waves
        ? wavesOfRow({ time: waveforms.time, waves: waveforms.waves }, found.sections)
        : null,
    rays,
    voltages,
    leftOut: bounces.leftOut,
    refused: bounces.refused,
  };
}

/** One-way trips of the row that the bounce diagram holds at a time: more of them are too flat to be read. */
const TRIPS_SHOWN = 12;

/** The page of the bounce diagram that holds the cursor: the whole time, cut where trips would be too flat. */
export function bounceSpan(view: PictureView, cursor: number): [number, number] {
  const delay = view.row?.sections.reduce((sum, section) => sum + section.delay, 0) ?? 0;
  const end = view.span[1];
  const length = Math.min(end, TRIPS_SHOWN * delay);
  // A rest too short for a page of its own joins the page before.
  if (!(length > 0) || end < 1.25 * length) return view.span;
  const page = Math.min(Math.floor(cursor / length), Math.ceil(end / length) - 1);
  return [page * length, (page + 1) * length];
}

function asBefore(waveforms: PathWaveforms | null, pin: string | null): WaveProbe[] {
  const probe = waveforms?.probes.find((entry) => entry.pin === pin);
  if (!waveforms || !probe) return [];
  return [
    {
      id: `${probe.pin} before`,
      label: "before",
      role: "source",
      time: waveforms.time,
      volts: probe.voltage,
    },
  ];
}

function rowTo(waveforms: PathWaveforms, pin: string | null): NetworkRow | null {
  const probe = waveforms.probes.find((entry) => entry.pin === pin);
  if (!probe) return null;
  const node = new Map(waveforms.probes.map((entry) => [entry.node, entry.pin]));
  return rowFromNetwork(waveforms.network, waveforms.driverNode, probe.node, {
    node,
    length: waveforms.lengths,
  });
}

function swingOf({ network }: PathWaveforms): number {
  const source = network.drivers[0];
  if (source?.kind !== "thevenin" || source.wave.kind !== "pwl") return 0;
  const { value } = source.wave;
  return (value.at(-1) ?? 0) - (value[0] ?? 0);
}

/** What each node of the row had before the edge. */
function restOf({ waves }: PathWaveforms, { sections }: NetworkRow): (node: number) => number {
  return (node) => {
    const at = sections[Math.min(node, sections.length - 1)];
    const found = waves?.find((entry) => entry.section === at?.section);
    if (!at || !found) return 0;
    const end = node < sections.length === (at.near === "a") ? found.a : found.b;
    return (end.incident[0] ?? 0) + (end.outgoing[0] ?? 0);
  };
}

interface Looked {
  rule: string;
  edge: "rise" | "fall";
  pin: string | null;
  /** of the finding, where it is what is shown [s] */
  time: number | null;
}

/** When what a rule speaks of happens on a picture: the finding's time, else the extreme that the rule measures. */
export function harmTime(waveforms: PathWaveforms, { rule, edge, pin, time }: Looked): number | null {
  if (time !== null) return time;
  const probe = waveforms.probes.find((entry) => entry.pin === pin);
  if (!probe) return null;
  if (rule === "ringback") {
    const from =
      waveforms.limits.find((limit) => limit.rule === rule && limit.probes.includes(probe.pin))?.from ?? 0;
    return extremeTime(waveforms, probe.voltage, edge === "rise" ? -1 : 1, from);
  }
  if (rule === "above-rail" || rule === "below-rail" || rule === "overshoot")
    return extremeTime(waveforms, probe.voltage, harmSense(rule, edge) || 1, 0);
  return null;
}

function extremeTime(
  { time, until }: PathWaveforms,
  volts: Float64Array,
  sense: number,
  from: number,
): number | null {
  let best = -Infinity;
  let at: number | null = null;
  for (let i = 0; i < volts.length; i++) {
    const t = time[i] ?? 0;
    if (t < from || t > until || sense * (volts[i] ?? 0) <= best) continue;
    best = sense * (volts[i] ?? 0);
    at = t;
  }
  return at;
}

/** The ray to emphasize. */
export function emphasisOf(view: PictureView, waveforms: PathWaveforms, looked: Looked): string | null {
  const time = harmTime(waveforms, looked);
  if (time === null || !view.row) return null;
  return harmfulRay(view.row, view.rays, {
    time,
    sense: harmSense(looked.rule, looked.edge),
    ramp: waveforms.ramp,
  });
}
