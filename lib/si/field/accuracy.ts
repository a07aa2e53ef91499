export type Accuracy = "live" | "standard" | "reference";

/** How finely surfaces are cut into panels. Found by trial against tests/reference/impedance. */
export interface Fineness {
  /** Gauss nodes of a panel on copper, and on an interface */
  copperNodes: number;
  interfaceNodes: number;
  /** length of the panel at a vertex, as a share of the distance to the nearest other vertex: copper, dielectric */
  copperShare: number;
  interfaceShare: number;
  /** panel length over its distance to the nearest vertex, in logarithmic measure: the ratio of neighbours is e^growth */
  growth: number;
  outerGrowth: number;
  /** a vertex facing a segment at distance d refines it to facing·d */
  facing: number;
  /** panels nearer than this many half-lengths are integrated in closed form; no round number, which distances may equal */
  near: number;
  /** error of a line value over the unresolved share of the charge, from random cross-sections: 97 of 100 lie below */
  tail: number;
  /** least error estimate */
  floor: number;
}

export const FINENESS: Record<Accuracy, Fineness> = {
  live: {
    copperNodes: 3,
    interfaceNodes: 3,
    copperShare: 0.5,
    interfaceShare: 0.9,
    growth: 1.5,
    outerGrowth: 1.6,
    facing: 1.1,
    near: 1.763,
    tail: 0.06,
    floor: 5e-5,
  },
  standard: {
    copperNodes: 3,
    interfaceNodes: 3,
    copperShare: 0.4,
    interfaceShare: 0.9,
    growth: 1.1,
    outerGrowth: 1.4,
    facing: 0.7,
    near: 2.037,
    tail: 0.02,
    floor: 2e-5,
  },
  reference: {
    copperNodes: 5,
    interfaceNodes: 5,
    copperShare: 0.3,
    interfaceShare: 0.3,
    growth: 0.9,
    outerGrowth: 1.1,
    facing: 0.5,
    near: 3.517,
    tail: 0.0014,
    floor: 5e-7,
  },
};
