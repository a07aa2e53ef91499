import { closedForms, type ClosedFormResult, type CrossSection } from "@/lib/si/cross-section";
import { buildCrossSection, type Stackup } from "@/lib/si/stackup";
import {
  attempt,
  type FoundDimension,
  gapFor,
  type LineFacts,
  lineFacts,
  type LineKind,
  type LineShape,
  type Outcome,
  traceShape,
  widthFor,
} from "./engine-line";
import { type FieldJob, type FieldLines, fieldLines } from "./engine-field";
import { type LossFacts, type LossJob, lossOf } from "./engine-loss";
import {
  type BandJob,
  type BandPoint,
  lineSpread,
  spreadBand,
  type SpreadFacts,
  type SpreadJob,
} from "./engine-spread";

/** What the impedance page asks of the engine. */
export type ImpedanceJob =
  CellJob | SearchJob | TrialJob | CurveJob | SpreadJob | BandJob | LossJob | FieldJob;

export interface ImpedanceAnswers {
  "line-cell": CellAnswer;
  "line-search": SearchAnswer;
  "line-trial": Trial;
  "line-curve": CurvePoint[];
  "line-spread": Outcome<SpreadFacts>;
  "line-band": BandPoint[];
  "line-loss": Outcome<LossFacts>;
  "line-field": Outcome<FieldLines>;
}

interface OnLayer {
  stackup: Stackup;
  index: number;
}

interface Sought extends OnLayer {
  line: LineKind;
  /** target [Ω] */
  ohms: number;
  /** [m] */
  grid: number;
}

/** A row of the table. */
export interface CellJob extends Sought {
  kind: "line-cell";
  /** as the class has it [m] */
  width: number | null;
  /** of a pair: as the class has it, or taken to find a width [m] */
  gap: number | null;
  /** no class gave the gap */
  gapAssumed: boolean;
}

export interface CellAnswer {
  /** What the class's width gives; null where it has none. */
  now: Outcome<LineFacts> | null;
  /** The width that meets the target, at that gap. */
  meets: Outcome<FoundDimension>;
  /** Of a pair with a width: the gap that meets the target at that width. */
  gapMeets: Outcome<FoundDimension> | null;
}

/** What would meet the target, and what stays within its tolerance. */
export interface SearchJob extends Sought {
  kind: "line-search";
  shape: LineShape;
  /** of the target [%] */
  tolerance: number;
}

export interface SearchAnswer {
  meets: Outcome<FoundDimension>;
  gapMeets: Outcome<FoundDimension> | null;
  /** widths on the grid at the ends of the tolerance [m]; null where one is out of reach */
  band: { narrow: number; wide: number } | null;
}

/** A width, and gap, that is tried. */
export interface TrialJob extends OnLayer {
  kind: "line-trial";
  shape: LineShape;
  accuracy: "live" | "standard";
}

export interface Trial {
  shape: LineShape;
  facts: Outcome<LineFacts>;
  /** null where no section can be built */
  section: CrossSection | null;
  forms: ClosedFormResult[];
  assumptions: string[];
}

export interface CurveJob extends OnLayer {
  kind: "line-curve";
  gap: number | null;
  /** [m] */
  from: number;
  to: number;
}

export interface CurvePoint {
  /** [m] */
  width: number;
  /** [Ω] */
  impedance: number;
}

export function answerImpedance(job: ImpedanceJob): ImpedanceAnswers[ImpedanceJob["kind"]] {
  switch (job.kind) {
    case "line-cell":
      return cell(job);
    case "line-search":
      return search(job);
    case "line-trial":
      return trial(job);
    case "line-curve":
      return curve(job);
    case "line-spread":
      return lineSpread(job);
    case "line-band":
      return spreadBand(job);
    case "line-loss":
      return lossOf(job);
    case "line-field":
      return fieldLines(job);
  }
}

function cell({ width, gap, gapAssumed, ...rest }: CellJob): CellAnswer {
  const sought = { ...rest, kind: rest.line };
  const pair = rest.line === "differential";
  return {
    now: width === null || gapAssumed ? null : lineFacts(rest.stackup, rest.index, { width, gap }),
    meets: widthFor(sought, gap),
    gapMeets: pair && width !== null ? gapFor(sought, width) : null,
  };
}

function search({ shape, tolerance, ...rest }: SearchJob): SearchAnswer {
  const sought = { ...rest, kind: rest.line };
  const at = (percent: number) => widthFor({ ...sought, ohms: rest.ohms * (1 + percent / 100) }, shape.gap);
  const [narrow, wide] = [at(tolerance), at(-tolerance)];
  return {
    meets: widthFor(sought, shape.gap),
    gapMeets: shape.gap === null ? null : gapFor(sought, shape.width),
    band: narrow.ok && wide.ok ? { narrow: narrow.value.dimension, wide: wide.value.dimension } : null,
  };
}

function trial({ stackup, index, shape, accuracy }: TrialJob): Trial {
  const facts = lineFacts(stackup, index, shape, accuracy);
  const built = attempt(() => {
    const { section, assumptions } = buildCrossSection(stackup, index, traceShape(shape));
    return { section, assumptions, forms: closedForms(section) };
  });
  return { shape, facts, ...(built.ok ? built.value : { section: null, forms: [], assumptions: [] }) };
}

const POINTS = 40;

/** Impedance over a range of widths; widths without a value are left out. */
function curve({ stackup, index, gap, from, to }: CurveJob): CurvePoint[] {
  const widths = Array.from({ length: POINTS }, (_, point) => from * (to / from) ** (point / (POINTS - 1)));
  return widths.flatMap((width) => {
    const facts = lineFacts(stackup, index, { width, gap }, "live");
    return facts.ok ? [{ width, impedance: facts.value.impedance }] : [];
  });
}
