/** Unit in which the file gives its coordinates. */
export type BoardUnit = "in" | "mm" | "µm";

/** What a file says of a board. All lengths and places in metres, from the file's own origin. */
export interface BoardFile {
  /** As the file states it: "A", "B", "C". */
  revision: string;
  unit: BoardUnit;
  /** The step (board) that was read. */
  step: string;
  layers: BoardLayer[];
  stackup: BoardStackup | null;
  specs: BoardSpec[];
  parts: BoardPart[];
  nets: BoardNet[];
  /** Outline of the board, empty where the file has none. */
  profile: BoardOutline[];
  holeCount: number;
  problems: BoardProblem[];
  /** All of them; `problems` is cut at a few thousand. */
  problemCount: number;
}

export interface BoardLayer {
  name: string;
  /** As in the file, such as CONDUCTOR, PLANE, DRILL. */
  function: string;
  side: string;
  copper: boolean;
  /** Said to be a plane, or more than half covered by one net's pour. */
  plane: boolean;
  /** Of a drill layer: the layers it joins, where the file says so. */
  span: { from: string; to: string } | null;
  specs: string[];
}

export interface BoardStackup {
  name: string;
  thickness_m: number | null;
  plies: BoardPly[];
}

export interface BoardPly {
  layer: string;
  thickness_m: number | null;
  plus_m: number | null;
  minus_m: number | null;
  specs: string[];
}

/** A specification that layers, plies and nets refer to: material, dielectric, conductor, impedance. */
export interface BoardSpec {
  name: string;
  lines: BoardSpecLine[];
}

export interface BoardSpecLine {
  /** Element: General, Dielectric, Conductor, Impedance and so on. */
  about: string;
  type: string;
  text: string;
  value: number | null;
  unit: string;
  plus: number | null;
  minus: number | null;
  comment: string;
}

export interface BoardPart {
  reference: string;
  partNumber: string;
  value: string;
  package: string;
  layer: string;
  pins: string[];
}

export interface BoardNet {
  name: string;
  /** REFERENCE.PIN, of the net list and of the pads. */
  pins: string[];
  /** Plated holes of the net that hold no pin. */
  vias: number;
  sections: BoardSection[];
  /** Areas of copper, which carry the net as a plane and are no sections. */
  pours: BoardPour[];
  /** Specifications named on the net's copper, such as its impedance. */
  specs: string[];
}

export interface BoardSection {
  from: string;
  to: string;
  layer: string;
  width_m: number;
  /** Along the centre line, arcs along their curve. */
  length_m: number;
  /** Centre line, x and y in turn; arcs as chords of a few degrees. */
  path: number[];
  line: number;
}

export interface BoardPour {
  layer: string;
  area_m2: number;
  outline: BoardOutline;
}

/** Corners, x and y in turn, closed by itself. */
export type BoardOutline = number[];

/** An element that was left out, or taken with a remark. */
export interface BoardProblem {
  line: number;
  element: string;
  reason: string;
}

/** What is read so far: bytes of the file as it came. */
export type ReadProgress = (bytes: number, total: number | null) => void;
