/** What an IBIS file says, in SI units, each thing with the line it stands at. */
export interface IbisDocument {
  /** as written, "5.0" */
  version: string;
  fileName: string;
  fileRevision: string;
  date: string;
  components: IbisComponent[];
  selectors: IbisSelector[];
  models: IbisModel[];
  submodels: IbisSubmodel[];
}

/** A quantity's three columns; null is NA or missing. */
export interface Triple {
  typ: number | null;
  min: number | null;
  max: number | null;
  line: number;
}

export interface IbisComponent {
  name: string;
  line: number;
  package: { resistance: Triple | null; inductance: Triple | null; capacitance: Triple | null };
  pins: IbisPin[];
  differential: IbisDifferential[];
}

export interface IbisPin {
  pin: string;
  signal: string;
  /** a model or selector; POWER, GND, NC and CIRCUITCALL are no models */
  model: string;
  /** of this pin alone [Ω, H, F]; null where the package's values hold */
  resistance: number | null;
  inductance: number | null;
  capacitance: number | null;
  line: number;
}

export interface IbisDifferential {
  pin: string;
  inverting: string;
  /** [V] */
  threshold: number | null;
  /** launch delay of the pin after the inverting one [s] */
  delay: Triple;
  line: number;
}

export interface IbisSelector {
  name: string;
  line: number;
  /** the first is the default */
  choices: { model: string; description: string; line: number }[];
}

/** A row of a table: voltage or time, then the three columns. */
export interface TableRow {
  x: number;
  typ: number | null;
  min: number | null;
  max: number | null;
  line: number;
}

/** Volts (as the standard counts them, see conversion) and amperes into the part; ascending. */
export interface IvData {
  line: number;
  rows: TableRow[];
}

export interface IbisWaveform {
  line: number;
  edge: "rise" | "fall";
  /** [Ω] */
  resistance: number;
  /** [V] */
  fixture: Triple;
  /** of the fixture [F], [H] */
  capacitance: number;
  inductance: number;
  /** between die and fixture, in series R and L, and C */
  hasPackage: boolean;
  /** [s], [V] */
  rows: TableRow[];
}

/** 20–80 % swing [V] over its time [s]. */
export interface Slope {
  volts: number;
  seconds: number;
}

export interface IbisRamp {
  line: number;
  rise: { typ: Slope | null; min: Slope | null; max: Slope | null };
  fall: { typ: Slope | null; min: Slope | null; max: Slope | null };
  /** [Ω]; 50 where the file does not say */
  load: number;
}

export const ivTables = ["pulldown", "pullup", "gndClamp", "powerClamp"] as const;
export type IvTableName = (typeof ivTables)[number];

export interface IbisModel {
  name: string;
  line: number;
  type: ModelType;
  polarity: "inverting" | "non-inverting" | null;
  enable: "active-high" | "active-low" | null;
  /** vinl, vinh, vmeas, vref [V], cref [F], rref [Ω] and the like, by name in lower case */
  levels: Record<string, { value: number; line: number }>;
  /** [F] */
  capacitance: Triple | null;
  /** C_comp_pullup and its kin [F], which stand for C_comp where they are given */
  splitCapacitance: Triple[];
  voltageRange: Triple | null;
  temperatureRange: Triple | null;
  /** [V]; where absent the voltage range, or 0 V below */
  references: Partial<Record<IvTableName, Triple>>;
  tables: Partial<Record<IvTableName, IvData>>;
  /** [Rgnd], [Rpower], [Rac] in Ω, [Cac] in F */
  terminator: Partial<Record<"rgnd" | "rpower" | "rac" | "cac", Triple>>;
  ramp: IbisRamp | null;
  waveforms: IbisWaveform[];
  /** of [Model Spec], by name in lower case */
  spec: Record<string, Triple>;
  /** of [Receiver Thresholds], by name in lower case */
  thresholds: Record<string, { value: number; line: number }>;
  submodels: { name: string; mode: string; line: number }[];
}

export interface IbisSubmodel {
  name: string;
  line: number;
  type: string;
}

/** Types by the standard's words; `drives` and `receives` say which of the two a pin can do. */
export const modelTypes = {
  Input: { drives: false, receives: true },
  Output: { drives: true, receives: false },
  "I/O": { drives: true, receives: true },
  "3-state": { drives: true, receives: false },
  Open_drain: { drives: true, receives: false },
  "I/O_open_drain": { drives: true, receives: true },
  Open_sink: { drives: true, receives: false },
  "I/O_open_sink": { drives: true, receives: true },
  Open_source: { drives: true, receives: false },
  "I/O_open_source": { drives: true, receives: true },
  Input_ECL: { drives: false, receives: true },
  Output_ECL: { drives: true, receives: false },
  "I/O_ECL": { drives: true, receives: true },
  "3-state_ECL": { drives: true, receives: false },
  Terminator: { drives: false, receives: true },
  Series: { drives: false, receives: false },
  Series_switch: { drives: false, receives: false },
  Input_diff: { drives: false, receives: true },
  Output_diff: { drives: true, receives: false },
  "I/O_diff": { drives: true, receives: true },
  "3-state_diff": { drives: true, receives: false },
} as const satisfies Record<string, { drives: boolean; receives: boolean }>;
export type ModelType = keyof typeof modelTypes;

export function isEcl(type: ModelType): boolean {
  return type.endsWith("ECL");
}
