import type { NetRow } from "@/lib/client/nets";

export interface NetFilter {
  q: string;
  /** Lineage of a class; "none": in no class; "": all. */
  class: string;
  scope: string;
  kind: string;
  layer: string;
  /** "pair", "bus", "group": those in one. */
  member: string;
}

/** Nets that fit all of a filter; words of the search may stand anywhere in a name, pair, bus or group. */
export function filterNets(nets: readonly NetRow[], filter: NetFilter): NetRow[] {
  const words = filter.q.toLowerCase().split(/\s+/).filter(Boolean);
  return nets.filter((net) => {
    if (filter.scope && net.scope !== filter.scope) return false;
    if (filter.kind && net.scopeKind !== filter.kind) return false;
    if (filter.class && (net.classLineageId ?? "none") !== filter.class) return false;
    if (filter.layer && !layersOf(net).includes(filter.layer)) return false;
    if (filter.member === "pair" && !net.pairPartner) return false;
    if (filter.member === "bus" && !net.bus) return false;
    if (filter.member === "group" && !net.matchGroup) return false;
    if (words.length === 0) return true;
    const text =
      `${net.name} ${net.pairPartner ?? ""} ${net.bus ?? ""} ${net.matchGroup ?? ""}`.toLowerCase();
    return words.every((word) => text.includes(word));
  });
}

/** Layers of a net, in the order of its route. */
export function layersOf(net: Pick<NetRow, "layers">): string[] {
  return net.layers === "" ? [] : net.layers.split(" · ");
}

/** Layers that any net runs on, the most used first. */
export function layerNames(nets: readonly NetRow[]): string[] {
  const counts = new Map<string, number>();
  for (const net of nets) for (const layer of layersOf(net)) counts.set(layer, (counts.get(layer) ?? 0) + 1);
  return [...counts].sort((a, b) => b[1] - a[1]).map(([layer]) => layer);
}

export function countScopes(nets: readonly NetRow[]): Record<NetRow["scope"], number> {
  const counts = { in: 0, out: 0, incomplete: 0 };
  for (const net of nets) counts[net.scope]++;
  return counts;
}
