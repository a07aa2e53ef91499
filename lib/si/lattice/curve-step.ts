import type { Cluster } from "./clusters";
import { discretiseLevels, type Propagator } from "./discretise";

/**
 * A chord over one step of exp(−t/τ) started by a ramp misses by step²/(8 τ ramp) of the swing. Nodes with nothing but
 * capacitance follow the curve of what arrives, so that only the drawn chord counts; clusters of several nodes take it
 * as straight, and where several follow one another, their misses add.
 */
export function curveStep(
  clusters: readonly Cluster[],
  ramp: number,
  until: number,
  fineness: { curve: number; chord: number },
): number {
  const longest = Number.isFinite(ramp) ? ramp / 4 : until / 1000;
  const dynamic = clusters.filter(
    (cluster) => !cluster.isStatic && cluster.ports.length + cluster.feeds.length > 0,
  );
  const curve = fineness.curve / Math.max(1, dynamic.length / 2) ** 0.25;
  let step = longest;
  for (const { size, e, g } of dynamic) {
    if (size !== 1) continue;
    const tau = e[0]! / g[0]!;
    const scale = Number.isFinite(ramp) ? ramp : tau;
    if (tau > 1e-3 * scale)
      step = Math.min(step, Math.max(fineness.chord * Math.sqrt(tau * scale), scale / 400));
  }
  for (const cluster of dynamic)
    if (cluster.size > 1) step = Math.min(step, clusterStep(cluster, step, ramp, (curve * curve) / 8));
  return step;
}

const LEVELS = 7;
const WATCHED = 12;

/** The largest of step, step/2, step/4, … at which the cluster's answer to a ramp on any port is straight enough. */
function clusterStep(cluster: Cluster, step: number, ramp: number, tolerance: number): number {
  const { size, e, g, ports, feeds, nodes } = cluster;
  const levels = discretiseLevels(e, g, size, step, LEVELS);
  const rise = Number.isFinite(ramp) ? ramp : 4 * step;
  const drives: { row: number; siemens: number }[] = feeds.filter((feed) => feed.siemens !== 0);
  for (const port of ports) if (port.node >= 0) drives.push({ row: port.node, siemens: 2 * port.admittance });
  for (let level = 0; level < LEVELS - 1; level++) {
    const length = step / 2 ** level;
    const slope = length / rise;
    const isStraight = drives.every(({ row, siemens }) => {
      const coarse = rampAnswer(levels[level]!, size, row, siemens * slope, WATCHED);
      const fine = rampAnswer(levels[level + 1]!, size, row, (siemens * slope) / 2, 2 * WATCHED);
      for (let n = 0; n < WATCHED; n++)
        for (let i = 0; i < nodes.length; i++) {
          const chord = (coarse[n * size + i]! + coarse[(n + 1) * size + i]!) / 2;
          if (Math.abs(fine[(2 * n + 1) * size + i]! - chord) > tolerance) return false;
        }
      return true;
    });
    if (isStraight) return length;
  }
  return step / 2 ** (LEVELS - 1);
}

/** Unknowns after each of `count` steps of a current that grows by `rate` a step into one row, from rest. */
function rampAnswer(
  { p, q0, q1 }: Propagator,
  size: number,
  row: number,
  rate: number,
  count: number,
): Float64Array {
  const z = new Float64Array((count + 1) * size);
  for (let n = 1; n <= count; n++)
    for (let i = 0; i < size; i++) {
      let sum = rate * ((n - 1) * q0[i * size + row]! + n * q1[i * size + row]!);
      for (let j = 0; j < size; j++) sum += p[i * size + j]! * z[(n - 1) * size + j]!;
      z[n * size + i] = sum;
    }
  return z;
}
