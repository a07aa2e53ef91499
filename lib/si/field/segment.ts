/** What a vertex of the outline does to the field: copper corners are strong, dielectric corners weak. */
export const PLAIN = 0;
export const WEAK = 1;
export const CORNER = 2;
export const EDGE = 3;

/** A straight piece of copper surface or dielectric interface, from (x1, y1) to (x2, y2). */
export interface Segment {
  x1: number;
  y1: number;
  x2: number;
  y2: number;
  /** PLAIN, WEAK, CORNER or EDGE (of a strip without thickness) */
  end1: number;
  end2: number;
  /** index of the trace; GROUND for coplanar copper; INTERFACE */
  owner: number;
  /** permittivity to the right and left of the direction; on copper: both what counts its charge as free charge */
  right: number;
  left: number;
  /** true where the segment runs out to where the fields have faded, at its end 2 (end 1: -1) */
  outward: number;
}

export const GROUND = -1;
export const INTERFACE = -2;

/** A line inside copper at the height of an interface: the flux through it joins the charges counted on both sides. */
export interface Cut {
  owner: number;
  x1: number;
  x2: number;
  y: number;
  /** permittivity below minus above */
  step: number;
}

export interface Outline {
  segments: Segment[];
  cuts: Cut[];
  /** height of the upper plane [m], 0 without one */
  upper: number;
}
