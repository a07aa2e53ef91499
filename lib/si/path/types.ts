/** The signal path: nets joined through two-terminal parts; what is simulated and judged. SI units throughout. */

/** Three values of one quantity over process or manufacturing. */
export interface Spread {
  low: number;
  nominal: number;
  high: number;
}

export interface PathSection {
  id: string;
  net: string;
  a: string;
  b: string;
  layer: string;
  /** foot width [m] */
  width: number;
  /** [m], ≥ 0 */
  length: number;
  /** [Ω]; null when the layer or its planes are not known (then `missing` says what) */
  impedance: Spread | null;
  /** [s/m] */
  delayPerMeter: number | null;
  /** formula the impedance came from */
  method: string | null;
  missing: string | null;
}

export interface PathPart {
  reference: string;
  kind: "R" | "C" | "L";
  a: string;
  b: string;
  /** [Ω], [F] or [H]; null when its value could not be read */
  value: number | null;
  role: "series" | "termination";
}

/** Driver at its three speeds; rise time is 10–90 % [s] of a linear ramp. */
export interface DriverModel {
  name: string;
  vdd: number;
  resistance: { slow: number; typical: number; fast: number };
  riseTime: { slow: number; typical: number; fast: number };
  capacitance: number | null;
  assumed: boolean;
}

export interface ReceiverModel {
  name: string;
  vdd: number;
  capacitance: { min: number; typical: number; max: number };
  vil: number | null;
  vih: number | null;
  vilAc: number | null;
  vihAc: number | null;
  vmeas: number | null;
  /** absolute maximum beyond each rail [V] */
  maxAbove: number | null;
  maxBelow: number | null;
  assumed: boolean;
}

export interface PathPin {
  /** "U1.E10" */
  pin: string;
  node: string;
  net: string;
  driver: DriverModel | null;
  receiver: ReceiverModel | null;
}

export interface ResolvedLimit {
  enabled: boolean;
  /** in the rule's own unit; null: no limit known */
  limit: number | null;
  severity: "error" | "warning" | "info";
  origin: "model" | "data sheet" | "net" | "class" | "project" | "default";
}

export interface ResolvedPath {
  /** lineage id of the net that holds the driving pin (else the first net by name) */
  id: string;
  name: string;
  nets: { lineageId: string; name: string }[];
  className: string | null;
  classLineageId: string | null;
  signal: "data" | "clock" | "strobe" | "slow";
  /** [s] from one source edge to the next: a bit, or half a clock period; null when no rate is given */
  bitTime: number | null;
  target: { ohms: number; tolerance: number /* fraction */; kind: "single" | "differential" } | null;
  sections: PathSection[];
  parts: PathPart[];
  /** rails that termination parts go to */
  rails: { name: string; node: string; volts: number }[];
  drivers: PathPin[];
  receivers: PathPin[];
  viaCount: number;
  neighbours: {
    neighbour: string;
    layer: string;
    gap: number;
    parallelLength: number;
    heightOverPlane: number | null;
  }[];
  geometryKnown: boolean;
  termination: {
    scheme: string;
    resistance: number | null;
    resistanceLow: number | null;
    capacitance: number | null;
    voltage: number | null;
  };
  flightTimeMax: number | null;
  /** least edge-to-edge spacing the class asks for [m] */
  spacing: number | null;
  /** whatever keeps it from simulation, by the input that is missing ("driver model of U7") */
  missing: { input: string; detail: string }[];
  limits: Record<string, ResolvedLimit>;
}
