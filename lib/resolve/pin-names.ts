import type { StoredNet } from "@/lib/schemas/net";

const collator = new Intl.Collator("en", { numeric: true });

/** "U2" before "U10", "A9" before "A10". */
export function byName(a: string, b: string): number {
  return collator.compare(a, b) || (a < b ? -1 : a > b ? 1 : 0);
}

/** A pin stands for itself on the whole board; any other node belongs to its net, since vias are numbered per net. */
export function pathNode(net: StoredNet, node: string, pins: ReadonlySet<string>): string {
  return pins.has(node) ? node : `${net.name}/${node}`;
}
