import "server-only";
import { parseCorner } from "@/lib/si/rules/corners";
import { svgString } from "@/lib/drawings/svg-string";
import { waveformChart } from "@/lib/drawings/waveform-chart.geometry";
import { writeDelimited } from "@/lib/formats/delimited/write";
import type { FindingRow } from "@/lib/db/run";
import { pathWaveforms } from "@/lib/resolve/path-waveforms";
import type { ResolvedPath } from "@/lib/si/path/types";
import type { ReportFile } from "./report-files";

const MOST_POINTS = 2_000;
const WIDTH = 960;

/** Each failing path at its worst corner: every pin's voltage as CSV, at most 2,000 points, and drawn with its limits. */
export function waveformFiles(paths: ResolvedPath[], findings: FindingRow[], names: string[]): ReportFile[] {
  return paths.flatMap((path, index) => {
    const worst = worstEdge(path.id, findings);
    if (!worst) return [];
    const seen = pathWaveforms(path, worst);
    const kept = keptIndices(
      seen.time,
      seen.probes.map((probe) => probe.voltage),
    );
    const name = `waveforms/${names[index] ?? path.id}`;
    const rows = kept.map((at) => [
      decimal((seen.time[at] ?? 0) * 1e9),
      ...seen.probes.map((probe) => decimal(probe.voltage[at] ?? 0)),
    ]);
    const drawing = waveformChart(
      seen.probes.map((probe) => ({
        id: probe.pin,
        label: probe.label,
        time: seen.time,
        volts: probe.voltage,
        role: probe.drives ? "source" : "total",
      })),
      seen.limits,
      {
        width: WIDTH,
        title: `${path.name}, ${worst.corner.driver} driver, ${worst.corner.impedance} impedance, ${worst.edge === "rise" ? "rising" : "falling"} edge`,
      },
    );
    return [
      {
        name: `${name}.csv`,
        content: writeDelimited([["time [ns]", ...seen.probes.map((probe) => `${probe.pin} [V]`)], ...rows]),
      },
      { name: `${name}.svg`, content: svgString(drawing) },
    ];
  });
}

/** Corner, edge and driving pin of the finding with the least margin, of those that a simulation judged. */
function worstEdge(pathId: string, findings: FindingRow[]) {
  let worst: FindingRow | null = null;
  for (const finding of findings) {
    if (finding.pathId !== pathId || finding.verdict !== "fail" || !finding.corner || !finding.edge) continue;
    if (!worst || (finding.margin ?? 0) / (finding.limit || 1) < (worst.margin ?? 0) / (worst.limit || 1))
      worst = finding;
  }
  if (!worst?.corner) return null;
  return {
    corner: parseCorner(worst.corner),
    edge: worst.edge === "fall" ? ("fall" as const) : ("rise" as const),
    driverPin: worst.driver ?? undefined,
  };
}

/** Samples that a thinning to 2,000 points keeps, of all waves together: they share one time axis. */
function keptIndices(time: Float64Array, waves: Float64Array[]): number[] {
  if (time.length <= MOST_POINTS) return Array.from(time.keys());
  const every = Math.ceil((time.length * waves.length * 2) / (MOST_POINTS - 2));
  const kept = new Set<number>([0, time.length - 1]);
  for (let start = 0; start < time.length; start += every)
    for (const wave of waves) {
      let low = start;
      let high = start;
      for (let at = start; at < Math.min(start + every, time.length); at++) {
        if ((wave[at] ?? 0) < (wave[low] ?? 0)) low = at;
        if ((wave[at] ?? 0) > (wave[high] ?? 0)) high = at;
      }
      kept.add(low).add(high);
    }
  return [...kept].sort((a, b) => a - b).slice(0, MOST_POINTS);
}

function decimal(value: number): string {
  return String(Number(value.toPrecision(7)));
}
