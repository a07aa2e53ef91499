import type { Placement, TraceSectionShape } from "./trace-shape";

/** Room for the dimensions around the body [px]; a narrow drawing writes those beside it on two lines. */
const ROOM = { left: 92, right: 172 };
const COMPACT_ROOM = { left: 86, right: 100 };
const COMPACT_BELOW = 600;
const ABOVE = 58;
const BELOW = 66;
/** of the air over an outer trace in which lines of equal potential are drawn [px] */
export const AIR = 52;

/** Where the section stands on a drawing of that size. */
export function placeTrace(
  shape: TraceSectionShape,
  first: TraceSectionShape["traces"][number],
  laminate: number,
  width: number,
  height: number,
) {
  const crest = Math.max(
    laminate,
    ...shape.traces.map((t) => t.y + t.thickness + (shape.mask?.overTrace ?? 0)),
  );
  const half = Math.max(...shape.traces.map((t) => Math.abs(t.x) + Math.max(t.widthBottom, t.widthTop) / 2));
  const reach = half + Math.max(0.7 * first.widthBottom, 0.5 * laminate, (shape.coplanar?.gap ?? 0) * 1.6);
  const compact = width < COMPACT_BELOW;
  const { left: LEFT, right: RIGHT } = compact ? COMPACT_ROOM : ROOM;
  const scale = Math.min((width - LEFT - RIGHT) / (2 * reach), (height - ABOVE - BELOW) / crest);
  const centre = (LEFT + width - RIGHT) / 2;
  const base = height - BELOW - (height - ABOVE - BELOW - crest * scale) / 2;
  const at: Placement = { x: (m) => centre + m * scale, y: (m) => base - m * scale, scale };
  // The body runs on to the sides, whatever the height left of the scale.
  return { at, left: LEFT, right: width - RIGHT, centre, base, crest, compact };
}

/** Part of the cross-section [m]. */
interface Window {
  left: number;
  right: number;
  bottom: number;
  top: number;
}

/** What drawings of these sizes show of the section: where lines of equal potential are wanted. */
export function sectionWindow(
  shape: TraceSectionShape,
  sizes: readonly { width: number; height: number }[],
): Window | null {
  const first = shape.traces[0];
  const laminate = shape.layers.reduce((sum, l) => sum + l.thickness, 0);
  if (!first || !(laminate > 0)) return null;
  const placements = sizes.map(({ width, height }) => placeTrace(shape, first, laminate, width, height));
  const reach = Math.max(...placements.map(({ at, right, centre }) => (right - centre) / at.scale));
  const air = Math.max(...placements.map(({ at }) => AIR / at.scale));
  return {
    left: -reach,
    right: reach,
    bottom: 0,
    top: shape.upperPlane ? laminate : (placements[0]?.crest ?? laminate) + air,
  };
}
