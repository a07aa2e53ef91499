/** The same shape as the engine's CrossSection [m]: y = 0 at the lower plane's face, y upward. */
export interface TraceSectionShape {
  layers: readonly { thickness: number; er: number; tanD?: number; name?: string }[];
  upperPlane: boolean;
  traces: readonly { x: number; y: number; thickness: number; widthBottom: number; widthTop: number }[];
  coplanar?: { gap: number };
  mask?: { overLaminate: number; overTrace: number; side: number; er: number };
}

/** Places metres on the drawing. */
export interface Placement {
  x: (metres: number) => number;
  y: (metres: number) => number;
  /** [px/m] */
  scale: number;
}
