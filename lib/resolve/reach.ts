import type { ResolvedPath } from "@/lib/si/path/types";
import type { MissingInput } from "./path-pins";

/** Pins that no copper and no part joins to the first driver: a route that looked whole net by net. */
export function findUnreached(path: ResolvedPath): MissingInput[] {
  const start = path.drivers[0];
  if (!start) return [];
  const next = new Map<string, string[]>();
  const link = (a: string, b: string) => {
    const list = next.get(a);
    if (list) list.push(b);
    else next.set(a, [b]);
  };
  for (const { a, b } of [...path.sections, ...path.parts]) {
    link(a, b);
    link(b, a);
  }
  const reached = new Set([start.node]);
  // A rail is no way through: two parts to ground do not join their nets.
  const rails = new Set(path.rails.map((rail) => rail.node));
  const queue = [start.node];
  for (let node = queue.pop(); node !== undefined; node = queue.pop())
    for (const other of rails.has(node) ? [] : (next.get(node) ?? []))
      if (!reached.has(other)) {
        reached.add(other);
        queue.push(other);
      }
  const lost = [...path.drivers, ...path.receivers].find((pin) => !reached.has(pin.node));
  if (!lost) return [];
  return [{ input: `route of ${lost.net}`, detail: `No routed copper joins ${lost.pin} to ${start.pin}.` }];
}
