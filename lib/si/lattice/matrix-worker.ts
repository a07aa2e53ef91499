import { driveOf, heldOf, type Arriving, type GridInput } from "./grid-input";
import type { PlannedCluster } from "./grid-plan";
import type { Worker } from "./node-workers";
import { elementResistance, TableGroup, type TableContext } from "./table-worker";

/** Clusters of several nodes, with coils, pairs or tables: z = carry + Q1 J, carry = P z + Q0 J. */
export function matrixWorker(
  { cluster, propagator, atOnce }: PlannedCluster,
  inputs: readonly GridInput[],
  arriving: readonly Arriving[],
  outgoing: readonly Float64Array[],
  pad: number,
  nodes: readonly (Float64Array | null)[],
  context: TableContext | undefined,
): Worker {
  const { size, ports, tables, isStatic } = cluster;
  const { p, q0, q1 } = propagator!;
  const z = new Float64Array(size);
  const carry = new Float64Array(size);
  const current = new Float64Array(size);
  const drives = Array.from({ length: size }, (_, row) => driveOf(cluster, row, inputs));
  const held = ports.map((port) => heldOf(port, inputs));
  const records = cluster.nodes.map((node) => nodes[node] ?? null);
  const group =
    context && tables.length > 0
      ? new TableGroup(cluster, elementResistance(cluster, q1), context.rest, context.weights)
      : null;
  return (from, to) => {
    for (let n = from; n < to; n++) {
      for (let i = 0; i < size; i++) current[i] = drives[i]?.[n] ?? 0;
      for (let k = 0; k < ports.length; k++) {
        const port = ports[k]!;
        const { samples, offset } = arriving[port.end]!;
        const inflow = 2 * port.admittance * samples[n + offset]!;
        if (port.node >= 0) current[port.node] = current[port.node]! + inflow;
        if (port.second >= 0) current[port.second] = current[port.second]! + port.sign * inflow;
      }
      apply(z, carry, n === 0 && atOnce ? atOnce : q1, current, size);
      if (group) {
        group.settle(n, z, (ref) => shiftOf(ref, inputs, n));
        for (let k = 0; k < tables.length; k++) {
          const { a, b } = tables[k]!;
          if (a >= 0) current[a] = current[a]! - group.currents[k]!;
          if (b >= 0) current[b] = current[b]! + group.currents[k]!;
        }
        apply(z, carry, q1, current, size);
      }
      if (!isStatic)
        for (let i = 0; i < size; i++) {
          let sum = 0;
          for (let j = 0; j < size; j++) sum += p[i * size + j]! * z[j]! + q0[i * size + j]! * current[j]!;
          carry[i] = sum;
        }
      for (let k = 0; k < ports.length; k++) {
        const port = ports[k]!;
        let v = held[k]?.[n] ?? 0;
        if (port.node >= 0) v += port.share * z[port.node]!;
        if (port.second >= 0) v += port.secondShare * z[port.second]!;
        const { samples, offset } = arriving[port.end]!;
        const out = outgoing[port.end]!;
        out[n + pad] = v - samples[n + offset]!;
      }
      for (let i = 0; i < records.length; i++) {
        const record = records[i];
        if (record) record[n] = z[i]!;
      }
    }
  };
}

/** z = carry + Q J */
function apply(z: Float64Array, carry: Float64Array, q: Float64Array, current: Float64Array, size: number) {
  for (let i = 0; i < size; i++) {
    let sum = carry[i]!;
    for (let j = 0; j < size; j++) sum += q[i * size + j]! * current[j]!;
    z[i] = sum;
  }
}

/** How far a fixed node is from its rest. */
function shiftOf(ref: number, inputs: readonly GridInput[], n: number): number {
  for (const { fixed, value } of inputs) if (fixed === -1 - ref) return value[n]!;
  return 0;
}
