/** A flat dielectric; it also fills the space beside a trace that lies in it. */
export interface DielectricLayer {
  /** [m], > 0 */
  thickness: number;
  /** relative permittivity [1], ≥ 1 */
  er: number;
  /** loss tangent [1] */
  tanD?: number;
}

/** A trapezoid with symmetric sides. */
export interface Trace {
  /** centre [m] */
  x: number;
  /** bottom face [m] */
  y: number;
  /** [m]; 0 is a strip without thickness */
  thickness: number;
  /** [m] */
  widthBottom: number;
  /** [m] */
  widthTop: number;
}

/** Conformal solder mask; see CrossSection. */
export interface Mask {
  overLaminate: number;
  overTrace: number;
  side: number;
  er: number;
  tanD?: number;
}

/** y = 0 is the lower reference plane's face; y grows upward; infinite in x. Lengths in metres. */
export interface CrossSection {
  /** From the lower plane upward, contiguous. A layer fills the space beside a trace that lies in it. */
  layers: DielectricLayer[];
  /** true: a reference plane closes the top of the last layer; false: air above it. */
  upperPlane: boolean;
  /** One trace, or two (left to right; or lower first when broadside). */
  traces: Trace[];
  /**
   * Coplanar ground on both outer sides: slot between facing edges of the bottom faces; same thickness and side slope
   * as the trace; at plane potential; wide.
   */
  coplanar?: { gap: number };
  /**
   * Conformal solder mask (outer layers). Side face = copper side face shifted horizontally outward by `side`,
   * prolonged straight up; top at copper + overTrace, elsewhere at laminate + overLaminate (< copper thickness).
   * Humps that meet merge with a flat top. Covers coplanar copper too.
   */
  mask?: Mask;
}

export interface Mode {
  /** [Ω] */
  impedance: number;
  effectivePermittivity: number;
  /** [s/m] */
  delay: number;
}

export interface LineParameters {
  /** F/m, Maxwell form (off-diagonal < 0) */
  capacitance: number[][];
  /** F/m, every dielectric replaced by vacuum */
  airCapacitance: number[][];
  /** H/m = μ0 ε0 airCapacitance⁻¹ */
  inductance: number[][];
  single?: Mode;
  /** odd and even only for mirror-equal pairs; otherwise `modes` */
  pair?: {
    odd?: Mode;
    even?: Mode;
    modes: Mode[];
    differential: number;
    common: number;
    /** ¼(−C12/√(C11C22) + L12/√(L11L22)) */
    backwardCrosstalk: number;
  };
  unknowns: number;
  /** relative; the largest over all impedances, permittivities and C11 */
  errorEstimate: number;
}
