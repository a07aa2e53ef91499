/** Area within a closed outline, x and y in turn [m²]; 0 below three corners. */
export function areaOf(outline: readonly number[]): number {
  let twice = 0;
  for (let at = 0; at + 1 < outline.length; at += 2) {
    const next = (at + 2) % outline.length;
    twice += (outline[at] ?? 0) * (outline[next + 1] ?? 0) - (outline[next] ?? 0) * (outline[at + 1] ?? 0);
  }
  return Math.abs(twice) / 2;
}
