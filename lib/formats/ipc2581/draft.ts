import type { BoardLayer, BoardOutline, BoardProblem, BoardSpec, BoardStackup, BoardUnit } from "./document";
import { BoardFileError } from "./errors";
import type { Shape } from "./shape";

const KEPT_PROBLEMS = 2_000;

/** A line of copper: its centre, already placed on the board. */
export interface DraftTrace {
  net: string;
  layer: string;
  width_m: number;
  path: number[];
  /** Length of each chord along the curve that it stands for [m]. */
  chords: number[];
  line: number;
}

export interface DraftPad {
  net: string | null;
  layer: string;
  x: number;
  y: number;
  shape: Shape | null;
  pins: string[];
  via: boolean;
  line: number;
}

export interface DraftHole {
  net: string | null;
  layer: string;
  x: number;
  y: number;
  diameter_m: number;
  plated: boolean;
  span: { from: string; to: string } | null;
  line: number;
}

export interface DraftComponent {
  reference: string;
  package: string;
  part: string;
  layer: string;
  x: number;
  y: number;
  rotation: number;
  mirror: boolean;
}

export interface DraftPackage {
  pins: { name: string; x: number; y: number }[];
}

/** One step: a board, or a panel of them. */
export interface DraftStep {
  name: string;
  components: DraftComponent[];
  packages: Map<string, DraftPackage>;
  padstacks: Map<string, Map<string, Shape>>;
  logicalNets: Map<string, string[]>;
  traces: DraftTrace[];
  pads: DraftPad[];
  holes: DraftHole[];
  pours: { net: string | null; layer: string; outline: BoardOutline; cutout: boolean }[];
  netSpecs: Map<string, Set<string>>;
  profile: BoardOutline[];
}

/** What was read so far; the readers of the file's parts write into it. */
export class BoardDraft {
  revision = "";
  wantedStep: string | null = null;
  /** Of coordinates in the step; null until the header said it. */
  unit: { name: BoardUnit; metres: number } | null = null;
  readonly lineWidths = new Map<string, number>();
  readonly shapes = new Map<string, Shape>();
  readonly specs: BoardSpec[] = [];
  readonly layers: BoardLayer[] = [];
  stackup: BoardStackup | null = null;
  readonly boms = new Map<string, { partNumber: string; value: string }>();
  readonly steps: DraftStep[] = [];
  readonly problems: BoardProblem[] = [];
  problemCount = 0;
  private items = 0;

  constructor(private readonly maxItems: number) {}

  /** The step that is being read; places outside of any step have their own. */
  get step(): DraftStep {
    return this.steps.at(-1) ?? this.beginStep("");
  }

  beginStep(name: string): DraftStep {
    const step: DraftStep = {
      name,
      components: [],
      packages: new Map(),
      padstacks: new Map(),
      logicalNets: new Map(),
      traces: [],
      pads: [],
      holes: [],
      pours: [],
      netSpecs: new Map(),
      profile: [],
    };
    this.steps.push(step);
    return step;
  }

  /** Metres in a unit of the step's coordinates. @throws BoardFileError where the header gave none */
  get metres(): number {
    if (!this.unit)
      throw new BoardFileError(
        "units",
        "This file gives places before it says in which unit (CadHeader units). Export it with units INCH, MILLIMETER or MICRON.",
      );
    return this.unit.metres;
  }

  problem(line: number, element: string, reason: string): void {
    this.problemCount++;
    if (this.problems.length < KEPT_PROBLEMS) this.problems.push({ line, element, reason });
  }

  /** Counts what is kept. @throws BoardFileError where the file holds more than any board */
  count(items: number): void {
    this.items += items;
    if (this.items > this.maxItems)
      throw new BoardFileError(
        "too large",
        `This file holds more than ${this.maxItems.toLocaleString("en")} lines, pads and corners. Export only the conductor and drill layers.`,
      );
  }
}
