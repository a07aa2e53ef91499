/**
 * Heights of a stack of layers in pixels: to scale, but none below a least height.
 *
 * Layers that would be thinner get the least height; the rest share what remains in proportion
 * (repeated until none of them falls below it too).
 *
 * @param thickness layer thicknesses [m], ≥ 0
 * @param room      height to fill [px]
 * @param least     least height of a layer [px]; 0 draws everything to scale
 * @returns height of each layer [px], the scale of the others [px/m], and which were exaggerated
 */
export function layerHeights(
  thickness: readonly number[],
  room: number,
  least: number,
): { heights: number[]; scale: number; exaggerated: boolean[] } {
  const exaggerated = thickness.map(() => false);
  let scale = 0;
  for (let changed = true; changed;) {
    changed = false;
    const free = thickness.reduce((sum, t, i) => (exaggerated[i] ? sum : sum + t), 0);
    const taken = exaggerated.filter(Boolean).length * least;
    scale = free > 0 ? Math.max(room - taken, 0) / free : 0;
    for (let i = 0; i < thickness.length; i++) {
      if (!exaggerated[i] && (thickness[i] ?? 0) * scale < least) {
        exaggerated[i] = true;
        changed = true;
      }
    }
  }
  return { heights: thickness.map((t, i) => (exaggerated[i] ? least : t * scale)), scale, exaggerated };
}
