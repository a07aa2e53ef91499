import { recordedNodes, type Channel } from "./channels";
import type { Circuit } from "./circuit";
import type { Cluster } from "./clusters";
import { combClusters, runComb } from "./comb";
import { drawComb, type CombRun, type Waveforms } from "./comb-output";
import { planGrid } from "./grid-plan";
import { channelSeries, runGrid } from "./grid-run";
import { movingSources, type Prepared } from "./prepared";
import { commonDelay } from "./step-size";

/** Most ticks × line ends for stepping through every tick; beyond, only the moments at which something arrives. */
const MOST_TICKS = 40_000;
/** Moments that are followed with nothing but rounding lost; beyond, the grid is quicker and near enough. */
const MOST_MOMENTS = { live: 1_500, standard: 3_000, reference: 20_000 } as const;
/** A jump keeps its sharpness through every echo, which a grid between whole steps would not; so its echoes are followed further. */
const MOST_OF_A_JUMP = 60_000;
/** Waves below this share of a source step are dropped: thousands of drops stay below 1e-9 … */
const FLOOR = 1e-13;
/** … or, where the echoes of a jump multiply, below 0.02 %: they add like noise. */
const COARSE_FLOOR = 1e-6;

/** Exact waveforms of a resistive network, or null where a source is a sine or the arrivals are too many. */
export function simulateComb({
  circuit,
  clusters,
  channels,
  rest,
  until,
  accuracy,
}: Prepared): { waveforms: Waveforms; steps: number } | null {
  const sources = movingSources(circuit);
  const delays = circuit.lines.map((line) => line.delay);
  const shortest = Math.min(until, ...delays);
  const tick = delays.length === 0 ? until : commonDelay(delays, (2 * until * delays.length) / MOST_TICKS);
  const most = MOST_MOMENTS[accuracy];
  const runs: CombRun[] = [];
  let steps = 0;
  for (const { fixed, corners } of sources) {
    if (!corners) return null;
    let run =
      tick === null
        ? byMoments(circuit, clusters, channels, fixed, until, FLOOR, most)
        : byTicks(circuit, clusters, channels, fixed, until, tick);
    if (!run && corners.some((corner) => corner.jump !== 0))
      run = byMoments(circuit, clusters, channels, fixed, until, COARSE_FLOOR, MOST_OF_A_JUMP);
    if (!run) return null;
    runs.push({ ...run, corners });
    steps += run.times.length;
  }
  return { waveforms: drawComb(runs, rest, until, shortest * 1e-9), steps };
}

function byTicks(
  circuit: Circuit,
  clusters: readonly Cluster[],
  channels: readonly Channel[],
  fixed: number,
  until: number,
  tick: number,
): Omit<CombRun, "corners"> {
  const plan = planGrid(
    circuit,
    clusters,
    tick,
    Math.floor(until / tick + 1e-9) * tick,
    circuit.lines.map((line) => Math.round(line.delay / tick)),
  );
  const value = new Float64Array(plan.steps + 1);
  value[0] = 1;
  const inputs = [{ fixed, value, rate: new Float64Array(plan.steps + 1) }];
  const series = channelSeries(
    channels,
    plan,
    runGrid(plan, inputs, circuit.nodeCount, recordedNodes(channels)),
    inputs,
  );
  const active: number[] = [];
  for (let n = 0; n <= plan.steps; n++)
    if (series.some((rises) => rises !== null && Math.abs(rises[n]!) > FLOOR)) active.push(n);
  return {
    times: Float64Array.from(active, (n) => n * tick),
    rises: series.map((rises) => rises && Float64Array.from(active, (n) => rises[n]!)),
  };
}

function byMoments(
  circuit: Circuit,
  clusters: readonly Cluster[],
  channels: readonly Channel[],
  fixed: number,
  until: number,
  floor: number,
  most: number,
): Omit<CombRun, "corners"> | null {
  const times: number[] = [];
  const rises: number[][] = channels.map(() => []);
  const ofNode = new Map<number, number[]>();
  const ofEnd = new Map<string, number>();
  channels.forEach((channel, c) => {
    if (channel.kind === "node") ofNode.set(channel.node, [...(ofNode.get(channel.node) ?? []), c]);
    else if (channel.kind !== "fixed") ofEnd.set(`${channel.kind} ${channel.end}`, c);
  });
  const set = (c: number | undefined, rise: number) => {
    if (c === undefined) return;
    const list = rises[c]!;
    while (list.length < times.length) list.push(0);
    list[times.length - 1] = list[times.length - 1]! + rise;
  };
  times.push(0);
  channels.forEach((channel, c) => {
    if (channel.kind === "fixed" && channel.fixed === fixed) set(c, 1);
  });
  const isWhole = runComb(
    circuit,
    combClusters(clusters),
    fixed,
    { until, floor, most },
    ({ time, cluster: { cluster }, rise, incident, outgoing }) => {
      if (time !== times[times.length - 1]) times.push(time);
      cluster.nodes.forEach((node, i) => ofNode.get(node)?.forEach((c) => set(c, rise[i]!)));
      if (ofEnd.size > 0)
        cluster.ports.forEach(({ end }, k) => {
          set(ofEnd.get(`incident ${end}`), incident[k]!);
          set(ofEnd.get(`outgoing ${end}`), outgoing[k]!);
        });
    },
  );
  if (!isWhole) return null;
  return {
    times: Float64Array.from(times),
    rises: rises.map((list) => {
      if (list.length === 0) return null;
      const whole = new Float64Array(times.length);
      whole.set(list);
      return whole;
    }),
  };
}
