import type { StoredNet } from "@/lib/schemas/net";
import { byName } from "./pin-names";
import { isRail } from "./rails";
import type { PartEnd, TwoTerminal } from "./two-terminal";

/** Nets that are one signal path, with the parts that join and end them. */
export interface PathGroup {
  nets: StoredNet[];
  series: { part: TwoTerminal; a: PartEnd; b: PartEnd }[];
  terminations: { part: TwoTerminal; end: PartEnd; rail: StoredNet }[];
  /** parts whose other pin is on no imported net */
  loose: { part: TwoTerminal; end: PartEnd }[];
}

/**
 * Joins nets through two-terminal parts. A part with one pin on a supply or ground ends a path (termination, pull,
 * filter) and never joins; one with both on supplies is decoupling and belongs to no path.
 */
export function groupPaths(nets: StoredNet[], parts: TwoTerminal[]): PathGroup[] {
  const signals = nets.filter((net) => !isRail(net));
  const parent = new Map<StoredNet, StoredNet>(signals.map((net) => [net, net]));
  const root = (net: StoredNet): StoredNet => {
    let top = net;
    for (let up = parent.get(top); up && up !== top; up = parent.get(top)) top = up;
    parent.set(net, top);
    return top;
  };
  for (const { ends } of parts) {
    const [a, b] = ends;
    if (b && parent.has(a.net) && parent.has(b.net)) parent.set(root(a.net), root(b.net));
  }
  const groups = new Map<StoredNet, PathGroup>();
  for (const net of signals) {
    const key = root(net);
    const group = groups.get(key) ?? { nets: [], series: [], terminations: [], loose: [] };
    group.nets.push(net);
    groups.set(key, group);
  }
  const groupOf = (net: StoredNet) => (parent.has(net) ? groups.get(root(net)) : undefined);
  for (const part of parts) {
    const [a, b] = part.ends;
    const group = groupOf(a.net) ?? (b && groupOf(b.net));
    if (!group) continue;
    if (!b) group.loose.push({ part, end: a });
    else if (isRail(b.net)) group.terminations.push({ part, end: a, rail: b.net });
    else if (isRail(a.net)) group.terminations.push({ part, end: b, rail: a.net });
    else group.series.push({ part, a, b });
  }
  for (const group of groups.values()) group.nets.sort((a, b) => byName(a.name, b.name));
  return [...groups.values()];
}
