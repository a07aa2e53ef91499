import type { Channel } from "./channels";
import { discretise } from "./discretise";
import { jumpLoss } from "./skin-worker";
import type { GridPlan, PlannedCluster } from "./grid-plan";

/** The response to a 1 V jump at t = 0: at each step the value before and after what jumps there. */
export interface JumpRun {
  before: (Float64Array | null)[];
  after: (Float64Array | null)[];
}

interface Waves {
  before: Float64Array;
  after: Float64Array;
}

/** So short that nothing charges in it, as a share of the step. */
const AT_ONCE = 1e-9;

/**
 * Steps a linear lattice through time after a 1 V jump of one fixed node. Waves carry two values a step: what jumps
 * moves at once through conductances, charges follow straight lines between. Lines with delays between steps carry a
 * jump as a slope of about a step.
 */
export function runJump(plan: GridPlan, fixed: number, channels: readonly Channel[]): JumpRun {
  const { steps, pad, delays, skins, step } = plan;
  const length = steps + 1 + pad;
  const outgoing: Waves[] = delays.flatMap(() =>
    [0, 1].map(() => ({ before: new Float64Array(length), after: new Float64Array(length) })),
  );
  const incident: Waves[] = outgoing.map(() => ({
    before: new Float64Array(length),
    after: new Float64Array(length),
  }));
  const nodes = new Map<number, Waves>();
  for (const channel of channels)
    if (channel.kind === "node")
      nodes.set(channel.node, { before: new Float64Array(steps + 1), after: new Float64Array(steps + 1) });
  const losses = incident.map((_, end) => {
    const filter = skins[end >> 1];
    return filter ? jumpLoss(filter) : null;
  });
  const states = plan.clusters.map((planned) => clusterState(planned, fixed, step));
  for (let n = 0; n <= steps; n++) {
    const at = n + pad;
    for (let end = 0; end < incident.length; end++) {
      const { whole, taps } = delays[end >> 1]!;
      const from = outgoing[end ^ 1]!;
      const into = incident[end]!;
      if (taps) {
        let sum = 0;
        for (let k = 0; k < 4; k++) sum += taps[k]! * from.after[at - whole - 2 + k]!;
        into.before[at] = into.after[at] = sum;
      } else {
        into.before[at] = from.before[at - whole]!;
        into.after[at] = from.after[at - whole]!;
      }
      losses[end]?.(into, at);
    }
    for (const state of states) advance(state, n, at, incident, outgoing, nodes);
  }
  const series = (side: keyof Waves) =>
    channels.map((channel) => {
      if (channel.kind === "node") return nodes.get(channel.node)![side];
      if (channel.kind === "fixed")
        return channel.fixed === fixed
          ? new Float64Array(steps + 1).fill(1, side === "before" ? 1 : 0)
          : null;
      return (channel.kind === "outgoing" ? outgoing : incident)[channel.end]![side].subarray(
        pad,
        pad + steps + 1,
      );
    });
  return { before: series("before"), after: series("after") };
}

interface State {
  planned: PlannedCluster;
  p: Float64Array;
  q0: Float64Array;
  q1: Float64Array;
  /** what a change of current does at once */
  atOnce: Float64Array;
  /** into the rows from the jumped source */
  drive: Float64Array;
  /** what the jump pushes through capacitors at t = 0 */
  kick: Float64Array;
  held: number[];
  z: Float64Array;
  kept: Float64Array;
}

function clusterState(planned: PlannedCluster, fixed: number, step: number): State {
  const { cluster, single, propagator } = planned;
  const { size, e, g, feeds, ports } = cluster;
  const drive = new Float64Array(size);
  const farads = new Float64Array(size);
  for (const feed of feeds) {
    if (feed.fixed !== fixed) continue;
    drive[feed.row] = drive[feed.row]! + feed.siemens;
    farads[feed.row] = farads[feed.row]! + feed.farads;
  }
  const kick = new Float64Array(size);
  const held = ports.map((port) =>
    port.held.reduce((sum, item) => (item.fixed === fixed ? sum + item.factor : sum), 0),
  );
  const common = { planned, drive, kick, held, z: new Float64Array(size), kept: new Float64Array(size) };
  if (!single && !propagator) return { ...common, p: kick, q0: kick, q1: kick, atOnce: kick };
  const short = step * AT_ONCE;
  const instant = discretise(e, g, size, short);
  for (let i = 0; i < size; i++) {
    let sum = 0;
    for (let j = 0; j < size; j++)
      sum += (instant.q0[i * size + j]! + instant.q1[i * size + j]!) * (farads[j]! / short);
    kick[i] = sum;
  }
  const update = propagator ?? {
    p: Float64Array.of(single!.p),
    q0: Float64Array.of(single!.q0),
    q1: Float64Array.of(single!.q1),
  };
  return { ...common, ...update, atOnce: instant.q1 };
}

function advance(
  state: State,
  n: number,
  at: number,
  incident: readonly Waves[],
  outgoing: readonly Waves[],
  nodes: ReadonlyMap<number, Waves>,
) {
  const { planned, p, q0, q1, atOnce, drive, kick, held, z, kept } = state;
  const { cluster, single, propagator } = planned;
  const { size, ports } = cluster;
  if (!single && !propagator) {
    ports.forEach(({ end }, k) => {
      outgoing[end]!.before[at] = (n > 0 ? held[k]! : 0) - incident[end]!.before[at]!;
      outgoing[end]!.after[at] = held[k]! - incident[end]!.after[at]!;
    });
    return;
  }
  const before = new Float64Array(size);
  const after = drive.slice();
  if (n > 0) before.set(drive);
  for (const port of ports) {
    const low = 2 * port.admittance * incident[port.end]!.before[at]!;
    const high = 2 * port.admittance * incident[port.end]!.after[at]!;
    if (port.node >= 0) {
      before[port.node] = before[port.node]! + low;
      after[port.node] = after[port.node]! + high;
    }
    if (port.second >= 0) {
      before[port.second] = before[port.second]! + port.sign * low;
      after[port.second] = after[port.second]! + port.sign * high;
    }
  }
  // `kept` holds P z + Q0 J of the step before.
  for (let i = 0; i < size; i++) {
    let sum = kept[i]!;
    if (n > 0) for (let j = 0; j < size; j++) sum += q1[i * size + j]! * before[j]!;
    z[i] = sum;
  }
  send("before", n > 0 ? 1 : 0);
  for (let i = 0; i < size; i++) {
    let sum = n === 0 ? kick[i]! : 0;
    for (let j = 0; j < size; j++) sum += atOnce[i * size + j]! * (after[j]! - before[j]!);
    z[i] = z[i]! + sum;
  }
  send("after", 1);
  for (let i = 0; i < size; i++) {
    let sum = 0;
    for (let j = 0; j < size; j++) sum += p[i * size + j]! * z[j]! + q0[i * size + j]! * after[j]!;
    kept[i] = sum;
  }

  function send(side: keyof Waves, jumped: number) {
    ports.forEach((port, k) => {
      let v = jumped * held[k]!;
      if (port.node >= 0) v += port.share * z[port.node]!;
      if (port.second >= 0) v += port.secondShare * z[port.second]!;
      outgoing[port.end]![side][at] = v - incident[port.end]![side][at]!;
    });
    cluster.nodes.forEach((node, i) => {
      const record = nodes.get(node);
      if (record) record[side][n] = z[i]!;
    });
  }
}
