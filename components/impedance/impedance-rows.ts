import type { CellAnswer, CellJob } from "@/lib/client/engine-impedance";
import type { FoundDimension, LineFacts, LineKind, Outcome } from "@/lib/client/engine-line";
import type { SpreadFacts, SpreadJob } from "@/lib/client/engine-spread";
import type { NetClassDoc, StoredNetClass } from "@/lib/schemas/net-class";
import type { ProcessDoc } from "@/lib/schemas/process";
import type { StoredStackupLayer } from "@/lib/schemas/stackup";
import type { ResolvedLimit } from "@/lib/si/path/types";
import type { Capability, Stackup } from "@/lib/si/stackup";
import { isSignal } from "@/lib/si/stackup/model";
import { toSi } from "@/lib/si/units";
import { type RowVerdict, verdictsOf } from "./row-verdicts";

/** One class on one layer, as class and stackup have it. */
export interface RowInput {
  /** `<class lineage>.<layer lineage>` */
  id: string;
  netClass: StoredNetClass;
  layer: Pick<StoredStackupLayer, "lineageId" | "name">;
  /** of the layer in the stackup */
  index: number;
  /** The class names this layer, or none at all, which allows each. */
  allowed: boolean;
  line: LineKind;
  /** [Ω] */
  target: number;
  /** ± [%] */
  tolerance: number;
  /** as the class has it [m] */
  width: number | null;
  /** of a pair: as the class has it, else the one taken to find a width [m] */
  gap: number | null;
  /** True where no class gave the gap and it was taken by us. */
  gapAssumed: boolean;
}

/** The same with what the engine has answered so far. */
export interface ImpedanceRow extends RowInput {
  /** not answered yet */
  pending: boolean;
  /** What the class's width gives; null where it has none. */
  now: Outcome<LineFacts> | null;
  /** (now − target) / target, signed [%] */
  off: number | null;
  centring: RowVerdict;
  /** The width that meets the target, at that gap. */
  meets: Outcome<FoundDimension> | null;
  /** Of a pair with a width: the gap that meets the target at that width. */
  gapMeets: Outcome<FoundDimension> | null;
  spreadPending: boolean;
  /** of the class's width in production; null where it has none */
  spread: Outcome<SpreadFacts> | null;
  yielding: RowVerdict;
  /** what can be etched there; null where it is not known */
  least: Capability | null;
}

interface Inputs {
  layers: readonly StoredStackupLayer[];
  classes: readonly StoredNetClass[];
}

/** A gap to begin with where a pair's class tells none [m]; common practice, no source. */
const USUAL_GAP = 0.15e-3;

/** Every class with a target on every signal layer, in the order of classes and layers. */
export function rowInputs({ layers, classes }: Inputs): RowInput[] {
  return classes.flatMap((netClass) => {
    if (!netClass.targetImpedance) return [];
    const target = toSi(netClass.targetImpedance, "resistance");
    if (!(target > 0)) return [];
    return layers.flatMap((layer, index) =>
      isSignal(layer) ? [inputOf(netClass, layer, index, target)] : [],
    );
  });
}

function inputOf(
  netClass: StoredNetClass,
  layer: StoredStackupLayer,
  index: number,
  target: number,
): RowInput {
  const entry = netClass.layers.find(({ layerLineageId }) => layerLineageId === layer.lineageId);
  const pair = netClass.kind === "differential";
  const ownGap = pair && entry?.gap ? toSi(entry.gap, "length") : null;
  return {
    id: `${netClass.lineageId}.${layer.lineageId}`,
    netClass,
    layer,
    index,
    allowed: entry !== undefined || netClass.layers.length === 0,
    line: netClass.kind,
    target,
    tolerance: Number(netClass.tolerancePercent),
    width: entry?.width ? toSi(entry.width, "length") : null,
    gap: pair ? (ownGap ?? gapElsewhere(netClass) ?? USUAL_GAP) : null,
    gapAssumed: pair && ownGap === null,
  };
}

function gapElsewhere(netClass: NetClassDoc): number | null {
  const given = netClass.layers.find(({ gap }) => gap !== null)?.gap;
  return given ? toSi(given, "length") : null;
}

export function cellJobOf(row: RowInput, stackup: Stackup, grid: number): CellJob {
  const { index, line, target, width, gap, gapAssumed } = row;
  return { kind: "line-cell", stackup, index, line, ohms: target, grid, width, gap, gapAssumed };
}

/** Null where the class has no line on this layer yet. */
export function spreadJobOf(row: RowInput, stackup: Stackup, process: ProcessDoc): SpreadJob | null {
  const { index, width, gap, gapAssumed, target, tolerance } = row;
  if (width === null || gapAssumed) return null;
  return { kind: "line-spread", stackup, index, shape: { width, gap }, process, ohms: target, tolerance };
}

export interface RowAnswers {
  /** undefined: not yet */
  cell: CellAnswer | undefined;
  /** undefined: not yet; null: nothing is asked */
  spread: Outcome<SpreadFacts> | null | undefined;
}

type ClassLimit = Readonly<Record<string, ResolvedLimit>>;

/** Rows as they were last made: most stay as they are while others are answered. */
const made = new WeakMap<RowInput, { from: readonly unknown[]; row: ImpedanceRow }>();

/** @param limits of the class, by rule id */
export function rowOf(
  input: RowInput,
  answers: RowAnswers,
  least: Capability | null,
  limits: ClassLimit,
): ImpedanceRow {
  const from = [answers.cell, answers.spread, least, limits];
  const before = made.get(input);
  if (before && from.every((value, i) => value === before.from[i])) return before.row;
  const row = newRow(input, answers, least, limits);
  made.set(input, { from, row });
  return row;
}

function newRow(
  input: RowInput,
  { cell, spread }: RowAnswers,
  least: Capability | null,
  limits: ClassLimit,
): ImpedanceRow {
  const now = cell?.now ?? null;
  const impedance = now?.ok ? now.value.impedance : null;
  const verdicts = verdictsOf(
    input,
    { impedance, width: input.width ?? 0, gap: input.gap, spread: spread?.ok ? spread.value : null },
    limits,
  );
  return {
    ...input,
    pending: cell === undefined,
    now,
    off: impedance === null ? null : (100 * (impedance - input.target)) / input.target,
    centring: verdicts.centring,
    meets: cell?.meets ?? null,
    gapMeets: cell?.gapMeets ?? null,
    spreadPending: spread === undefined,
    spread: spread ?? null,
    yielding: verdicts.yielding,
    least,
  };
}
