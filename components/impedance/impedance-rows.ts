import type { NetClassDoc, StoredNetClass } from "@/lib/schemas/net-class";
import type { StoredStackupLayer } from "@/lib/schemas/stackup";
import type { ResolvedLimit } from "@/lib/si/path/types";
import { checkImpedance } from "@/lib/si/rules/check-impedance";
import { impedanceCentring } from "@/lib/si/rules/impedance-centring";
import { isSignal, type Stackup } from "@/lib/si/stackup";
import { toSi } from "@/lib/si/units";
import { gapFor, lineFacts, type FoundDimension, type LineFacts, type Outcome, widthFor } from "./solve-line";

export type RowVerdict = "pass" | "near" | "fail" | "no data";

/** One class on one layer: what its width gives, and what would meet its target. */
export interface ImpedanceRow {
  /** `<class lineage>.<layer lineage>` */
  id: string;
  netClass: StoredNetClass;
  layer: Pick<StoredStackupLayer, "lineageId" | "name">;
  /** of the layer in the stackup */
  index: number;
  /** The class names this layer, or none at all, which allows each. */
  allowed: boolean;
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
  /** What the class's width gives; null where it has none. */
  now: Outcome<LineFacts> | null;
  /** |now − target| / target, signed [%] */
  off: number | null;
  verdict: RowVerdict;
  /** The width that meets the target, at that gap. */
  width0: Outcome<FoundDimension>;
  /** Of a pair with a width: the gap that meets the target at that width. */
  gap0: Outcome<FoundDimension> | null;
}

interface Inputs {
  stackup: Stackup;
  layers: readonly StoredStackupLayer[];
  classes: readonly StoredNetClass[];
  /** limit of impedance centring, by class lineage */
  limits: Readonly<Record<string, ResolvedLimit>>;
  /** [m] */
  grid: number;
}

/** A gap to begin with where a pair's class tells none [m]; common practice, no source. */
const USUAL_GAP = 0.15e-3;

/** Every class with a target on every signal layer, in the order of classes and layers. */
export function impedanceRows({ stackup, layers, classes, limits, grid }: Inputs): ImpedanceRow[] {
  return classes.flatMap((netClass) => {
    if (!netClass.targetImpedance) return [];
    const target = toSi(netClass.targetImpedance, "resistance");
    if (!(target > 0)) return [];
    return layers.flatMap((layer, index) =>
      isSignal(layer)
        ? [rowOf({ stackup, netClass, layer, index, target, grid, limit: limits[netClass.lineageId] })]
        : [],
    );
  });
}

interface RowInputs {
  stackup: Stackup;
  netClass: StoredNetClass;
  layer: StoredStackupLayer;
  index: number;
  target: number;
  grid: number;
  limit: ResolvedLimit | undefined;
}

function rowOf({ stackup, netClass, layer, index, target, grid, limit }: RowInputs): ImpedanceRow {
  const entry = netClass.layers.find(({ layerLineageId }) => layerLineageId === layer.lineageId);
  const pair = netClass.kind === "differential";
  const width = entry?.width ? toSi(entry.width, "length") : null;
  const ownGap = pair && entry?.gap ? toSi(entry.gap, "length") : null;
  const gap = pair ? (ownGap ?? gapElsewhere(netClass) ?? USUAL_GAP) : null;
  const search = { stackup, index, kind: netClass.kind, ohms: target, grid };
  const now = width === null || (pair && ownGap === null) ? null : lineFacts(stackup, index, { width, gap });
  const impedance = now?.ok ? now.value.impedance : null;
  return {
    id: `${netClass.lineageId}.${layer.lineageId}`,
    netClass,
    layer,
    index,
    allowed: entry !== undefined || netClass.layers.length === 0,
    target,
    tolerance: Number(netClass.tolerancePercent),
    width,
    gap,
    gapAssumed: pair && ownGap === null,
    now,
    off: impedance === null ? null : (100 * (impedance - target)) / target,
    verdict: verdictOf(netClass, layer, { target, impedance, width: width ?? 0, gap, limit }),
    width0: widthFor(search, gap),
    gap0: pair && width !== null ? gapFor(search, width) : null,
  };
}

function gapElsewhere(netClass: NetClassDoc): number | null {
  const given = netClass.layers.find(({ gap }) => gap !== null)?.gap;
  return given ? toSi(given, "length") : null;
}

/** How an impedance stands to its target, by the rule that judges centring in a run: both say the same. */
export function verdictOf(
  netClass: Pick<StoredNetClass, "name" | "lineageId" | "kind">,
  layer: { lineageId: string; name: string },
  line: {
    target: number;
    impedance: number | null;
    width: number;
    gap: number | null;
    limit: ResolvedLimit | undefined;
  },
): RowVerdict {
  if (line.impedance === null || !line.limit) return "no data";
  const [judged] = checkImpedance([
    {
      id: layer.lineageId,
      className: netClass.name,
      classLineageId: netClass.lineageId,
      layer: layer.name,
      layerLineageId: layer.lineageId,
      kind: netClass.kind,
      width: line.width,
      gap: line.gap,
      target: line.target,
      nominal: line.impedance,
      method: null,
      tolerance: 0,
      closedForm: null,
      spread: null,
      missing: null,
      limits: { [impedanceCentring.id]: line.limit },
    },
  ]);
  const verdict = judged?.result.verdict;
  return verdict === "pass" || verdict === "near" || verdict === "fail" ? verdict : "no data";
}
