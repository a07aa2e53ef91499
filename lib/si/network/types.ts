/**
 * What the lattice simulates: drivers, transmission-line sections, lumped parts, ideal rails and the observed nodes.
 * SI units. Ground is node "0". Before t = 0 the circuit is in DC steady state. Every item carries a name, and errors
 * name it.
 */
export interface Network {
  /** ideal DC voltages [V] */
  rails: Rail[];
  drivers: Driver[];
  sections: Section[];
  parts: Part[];
  probes: Probe[];
}

export interface Rail {
  name: string;
  node: string;
  volts: number;
}

/** Straight between points, constant outside; a repeated time is a jump (value before, value after). */
export interface Pwl {
  kind: "pwl";
  /** [s], never decreasing */
  time: number[];
  value: number[];
}

/** offset + amplitude · sin(2π · frequency · (t − start) + phase) from `start` on; its value at `start` before that. */
export interface Sine {
  kind: "sine";
  /** [V] */
  offset: number;
  /** [V] */
  amplitude: number;
  /** [Hz], > 0 */
  frequency: number;
  /** [rad] */
  phase: number;
  /** [s], ≥ 0 */
  start: number;
}

/** [volts, amperes], volts ascending, straight between points, end pieces extended. */
export type IvTable = [volts: number, amperes: number][];

/** Open-circuit voltage `wave` behind `resistance` [Ω], ≥ 0; 0 is an ideal source. */
export interface TheveninDriver {
  name: string;
  kind: "thevenin";
  node: string;
  resistance: number;
  wave: Pwl | Sine;
}

/** Current into the node = pullupWeight(t) · pullup(vdd − v) − pulldownWeight(t) · pulldown(v). */
export interface IvDriver {
  name: string;
  kind: "iv";
  node: string;
  /** [V] */
  vdd: number;
  pullup: IvTable;
  pulldown: IvTable;
  pullupWeight: Pwl;
  pulldownWeight: Pwl;
  /** at the node, to ground [F], ≥ 0 */
  capacitance?: number;
}

export type Driver = TheveninDriver | IvDriver;

export interface LineSection {
  name: string;
  kind: "line";
  a: string;
  b: string;
  /** [Ω], > 0 */
  impedance: number;
  /** one way [s], > 0 */
  delay: number;
  /** [√s], ≥ 0: propagation exp(−s · delay − skin · √s), impedance held */
  skin?: number;
}

/** Two equal coupled lines. V1 = Ve + Vo, V2 = Ve − Vo, Ie = (I1 + I2)/2, Io = (I1 − I2)/2. */
export interface PairSection {
  name: string;
  kind: "pair";
  a1: string;
  a2: string;
  b1: string;
  b2: string;
  even: LineMode;
  odd: LineMode;
}

export interface LineMode {
  /** [Ω], > 0 */
  impedance: number;
  /** one way [s], > 0 */
  delay: number;
}

/** Constant series resistance, no shunt conductance. */
export interface RlcSection {
  name: string;
  kind: "rlc";
  a: string;
  b: string;
  /** [H/m], > 0 */
  l: number;
  /** [F/m], > 0 */
  c: number;
  /** [Ω/m], ≥ 0 */
  r: number;
  /** [m], > 0 */
  length: number;
}

export type Section = LineSection | PairSection | RlcSection;

/** `value` in Ω (0 is a short), F or H, ≥ 0. */
export interface LinearPart {
  name: string;
  kind: "R" | "C" | "L";
  a: string;
  b: string;
  value: number;
}

/** Anode a: I = saturationCurrent · (exp(Vj / (emission · thermalVoltage)) − 1) behind seriesResistance; no charge storage. */
export interface DiodePart {
  name: string;
  kind: "diode";
  a: string;
  b: string;
  /** [A], > 0 */
  saturationCurrent: number;
  /** [1], > 0 */
  emission: number;
  /** [V], > 0 */
  thermalVoltage: number;
  /** [Ω], ≥ 0 */
  seriesResistance: number;
}

/** Current from a to b as a function of V(a) − V(b). */
export interface IvPart {
  name: string;
  kind: "iv";
  a: string;
  b: string;
  points: IvTable;
}

export type Part = LinearPart | DiodePart | IvPart;

export interface Probe {
  name: string;
  node: string;
}
