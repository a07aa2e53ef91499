import type { SpreadFacts } from "@/lib/client/engine-spread";
import type { ResolvedLimit } from "@/lib/si/path/types";
import { checkImpedance } from "@/lib/si/rules/check-impedance";
import { impedanceCentring } from "@/lib/si/rules/impedance-centring";
import { impedanceYield } from "@/lib/si/rules/impedance-yield";
import type { RowInput } from "./impedance-rows";

/** null: the project does not ask */
export type RowVerdict = "pass" | "near" | "fail" | "no data" | null;

interface Line {
  /** [Ω] */
  impedance: number | null;
  /** [m] */
  width: number;
  gap: number | null;
  spread: SpreadFacts | null;
}

/** How a line stands to its target and tolerance, by the rules that judge a run: both say the same. */
export function verdictsOf(
  { netClass, layer, line, target, tolerance }: RowInput,
  { impedance, width, gap, spread }: Line,
  limits: Readonly<Record<string, ResolvedLimit>>,
): { centring: RowVerdict; yielding: RowVerdict } {
  const [chief] = spread?.sensitivities ?? [];
  const [judged] = checkImpedance([
    {
      id: layer.lineageId,
      className: netClass.name,
      classLineageId: netClass.lineageId,
      layer: layer.name,
      layerLineageId: layer.lineageId,
      kind: line,
      width,
      gap,
      target,
      tolerance: tolerance / 100,
      nominal: impedance,
      method: null,
      closedForm: null,
      spread: spread && {
        yield: spread.yield,
        low: spread.low,
        high: spread.high,
        chief: chief?.name ?? "",
        chiefShare: chief?.share ?? 0,
        method: spread.method,
      },
      missing: null,
      limits: { ...limits },
    },
  ]);
  const of = (rule: string): RowVerdict => {
    const verdict = judged?.result.findings.find((finding) => finding.rule === rule)?.verdict;
    if (verdict === undefined) return null;
    return verdict === "pass" || verdict === "near" || verdict === "fail" ? verdict : "no data";
  };
  return { centring: of(impedanceCentring.id), yielding: of(impedanceYield.id) };
}
