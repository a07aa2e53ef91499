export interface SectionLength {
  from: string;
  to: string;
  /** [m], ≥ 0 */
  length: number;
}

/**
 * Two pins between which the route has no length at all, or null. Pads do not lie upon each other: a length of zero is
 * how an export writes what is not routed. A via in a pad is a section of no length too, and joins one pin only.
 *
 * @param pins names of the nodes that are pins, in the order in which they are named
 */
export function pinsInOnePlace(
  sections: readonly SectionLength[],
  pins: readonly string[],
): [string, string] | null {
  const next = new Map<string, string[]>();
  const link = (a: string, b: string) => {
    const known = next.get(a);
    if (known) known.push(b);
    else next.set(a, [b]);
  };
  for (const { from, to, length } of sections) {
    if (length > 0) continue;
    link(from, to);
    link(to, from);
  }
  const isPin = new Set(pins);
  for (const pin of pins) {
    const seen = new Set([pin]);
    for (const node of seen)
      for (const other of next.get(node) ?? []) {
        if (!seen.has(other) && isPin.has(other)) return [pin, other];
        seen.add(other);
      }
  }
  return null;
}
