import type { DraftHole, DraftPad } from "./draft";
import { PlaceGrid } from "./place-grid";
import { covers, type Shape } from "./shape";

/** A pin, a via or a lone pad of a net: a place at which lines of several layers may meet. */
export interface Anchor {
  /** REFERENCE.PIN; null for a via or a lone pad. */
  pin: string | null;
  plated: boolean;
  x: number;
  y: number;
  /** What its copper covers, layer by layer; null where only its place is known. */
  shapes: Map<string, { x: number; y: number; shape: Shape | null }>;
  /** Of a plated hole, whatever layer a line comes on. */
  hole_m: number;
}

/** A pin's place that no pad gives, from its part's place and the package. */
export interface PlacedPin {
  pin: string;
  x: number;
  y: number;
  layer: string;
}

const CELL_M = 1e-3;

/**
 * The anchors of one net. Pads of one pin are one anchor; a plated hole joins the pads about it on the layers that it
 * goes through; pads and holes of one place are one anchor.
 *
 * @param through layers of a hole
 * @param tolerance places nearer than this are one [m]
 */
export function findAnchors(
  pads: readonly DraftPad[],
  holes: readonly DraftHole[],
  placedPins: readonly PlacedPin[],
  through: (hole: DraftHole) => readonly string[],
  tolerance: number,
): Anchor[] {
  const anchors: Anchor[] = [];
  const byPin = new Map<string, Anchor>();
  const near = new PlaceGrid<Anchor>(CELL_M);
  const make = (pin: string | null, x: number, y: number): Anchor => {
    const anchor: Anchor = { pin, plated: false, x, y, shapes: new Map(), hole_m: 0 };
    anchors.push(anchor);
    if (pin !== null) byPin.set(pin, anchor);
    near.add(x - tolerance, y - tolerance, x + tolerance, y + tolerance, anchor);
    return anchor;
  };
  const cover = (anchor: Anchor, { layer, x, y, shape }: Pick<DraftPad, "layer" | "x" | "y" | "shape">) => {
    const known = anchor.shapes.get(layer);
    if (!known || (shape && (!known.shape || size(shape) > size(known.shape))))
      anchor.shapes.set(layer, { x, y, shape });
  };
  const here = (x: number, y: number) => {
    for (const anchor of near.at(x, y))
      if (Math.abs(anchor.x - x) <= tolerance && Math.abs(anchor.y - y) <= tolerance) return anchor;
    return null;
  };

  for (const pad of pads) for (const pin of pad.pins) cover(byPin.get(pin) ?? make(pin, pad.x, pad.y), pad);
  for (const { pin, ...pad } of placedPins)
    if (!byPin.has(pin)) cover(make(pin, pad.x, pad.y), { ...pad, shape: null });
  for (const hole of holes) {
    if (!hole.plated) continue;
    const anchor = here(hole.x, hole.y) ?? make(null, hole.x, hole.y);
    anchor.plated = true;
    anchor.hole_m = Math.max(anchor.hole_m, hole.diameter_m);
    const shape: Shape = { halfX: hole.diameter_m / 2, halfY: hole.diameter_m / 2, round: true, angle: 0 };
    for (const layer of through(hole)) cover(anchor, { layer, x: hole.x, y: hole.y, shape });
  }
  for (const pad of pads) {
    if (pad.pins.length > 0) continue;
    const anchor = here(pad.x, pad.y) ?? make(null, pad.x, pad.y);
    if (pad.via) anchor.plated = true;
    cover(anchor, pad);
  }
  return anchors;
}

/** Anchors of one net by layer and place, to ask which one an end of a line lies in. */
export class AnchorMap {
  private readonly layers = new Map<string, PlaceGrid<Anchor>>();

  constructor(
    anchors: readonly Anchor[],
    private readonly tolerance: number,
  ) {
    for (const anchor of anchors)
      for (const [layer, { x, y, shape }] of anchor.shapes) {
        let grid = this.layers.get(layer);
        if (!grid) this.layers.set(layer, (grid = new PlaceGrid<Anchor>(CELL_M)));
        const reach = (shape ? Math.hypot(shape.halfX, shape.halfY) : 0) + tolerance;
        grid.add(x - reach, y - reach, x + reach, y + reach, anchor);
      }
  }

  /** The anchor in whose copper this point lies; of several, the one whose centre is nearest. */
  find(layer: string, x: number, y: number): Anchor | null {
    let best: Anchor | null = null;
    let bestDistance = Infinity;
    for (const anchor of this.layers.get(layer)?.at(x, y) ?? []) {
      const place = anchor.shapes.get(layer);
      if (!place) continue;
      const distance = Math.hypot(x - place.x, y - place.y);
      const inside = place.shape
        ? covers(place.shape, x - place.x, y - place.y, this.tolerance)
        : distance <= this.tolerance;
      if (inside && distance < bestDistance) {
        best = anchor;
        bestDistance = distance;
      }
    }
    return best;
  }
}

function size(shape: Shape): number {
  return shape.halfX * shape.halfY;
}
