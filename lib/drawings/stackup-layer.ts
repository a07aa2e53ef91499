/** One layer as it is drawn, top to bottom. */
export interface SectionLayer {
  id: string;
  kind: "mask" | "foil" | "signal" | "plane" | "core" | "prepreg";
  name: string;
  material?: string;
  /** finished [m]; mask: over the laminate; null when it is not known yet */
  thickness_m: number | null;
  /** mask: over a trace [m] */
  maskOverTrace_m?: number | null;
  dk?: number | null;
  df?: number | null;
  /** foot minus crown, both sides together [m] */
  etch_m?: number | null;
  /** foot width of the traces drawn on a signal layer [m]; left out: three times the layer's thickness */
  traceWidth_m?: number | null;
  planeNet?: string;
}

/** A layer with its place on the drawing. */
export interface PlacedLayer {
  layer: SectionLayer;
  y: number;
  height: number;
  exaggerated: boolean;
}
