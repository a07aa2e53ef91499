import type { ResolvedPath } from "../path/types";
import { explain } from "./cause/explain";
import { cornerName, NOMINAL } from "./corners";
import type { Missing, StaticReading } from "./rule";
import { judge, restsOnAssumed, type Tally } from "./tally";
import type { CornerValue, Finding, RuleDefinition } from "./types";

type HasLimits = Pick<ResolvedPath, "limits">;

function severityOf(path: HasLimits, definition: RuleDefinition): Finding["severity"] {
  return path.limits[definition.id]?.severity ?? definition.severity;
}

/** No data: the rule with the input that would let it be judged. */
export function missingFinding(path: HasLimits, definition: RuleDefinition, missing: Missing): Finding {
  const entry = path.limits[definition.id];
  return {
    rule: definition.id,
    verdict: "no data",
    value: null,
    limit: entry?.limit ?? definition.defaultLimit,
    limitOrigin: entry?.origin ?? "default",
    unit: definition.unit,
    margin: null,
    severity: severityOf(path, definition),
    counts: true,
    corner: null,
    pin: null,
    driver: null,
    edge: null,
    time: null,
    failsAt: 0,
    ofCorners: 0,
    failsAtNominal: false,
    missing: missing.input,
    mechanism: "missing input",
    cause: missing.detail,
    restsOnAssumed: false,
  };
}

/**
 * A simulated rule's finding at its worst. A failure stands even where another receiver lacks an input; otherwise the
 * lack makes it no data. Null: no receiver the rule speaks of.
 */
export function edgeFinding(path: ResolvedPath, tally: Tally, ofCorners: number): Finding | null {
  const { rule, worst, missing } = tally;
  if (missing && worst?.verdict !== "fail") return missingFinding(path, rule.definition, missing);
  if (!worst?.seen) return null;
  const { seen } = worst;
  const explained = worst.verdict === "pass" ? null : explain(rule, seen);
  return {
    rule: rule.definition.id,
    verdict: worst.verdict,
    value: worst.value,
    limit: worst.limit.limit,
    limitOrigin: worst.limit.origin,
    unit: rule.definition.unit,
    margin: worst.margin,
    severity: severityOf(path, rule.definition),
    counts: true,
    corner: cornerName(seen.corner),
    pin: seen.receiverPin.pin,
    driver: seen.driverPin.pin,
    edge: seen.edge,
    time: worst.time,
    failsAt: tally.failing.length,
    ofCorners,
    failsAtNominal: tally.failsAtNominal,
    missing: null,
    mechanism: explained?.mechanism ?? rule.family,
    cause: explained?.cause ?? null,
    restsOnAssumed: restsOnAssumed(seen.driverPin, seen.receiverPin),
  };
}

export function staticFinding(
  path: HasLimits,
  definition: RuleDefinition,
  reading: StaticReading,
): { finding: Finding; corners: CornerValue[] } {
  const judged = reading.corners.map(({ corner, value }) => ({
    corner: cornerName(corner),
    value,
    ...judge(definition, value, reading.limit.limit),
  }));
  const worst = judged.reduce((most, entry) =>
    (entry.margin ?? Infinity) < (most.margin ?? Infinity) ? entry : most,
  );
  const finding: Finding = {
    rule: definition.id,
    verdict: worst.verdict,
    value: worst.value,
    limit: reading.limit.limit,
    limitOrigin: reading.limit.origin,
    unit: definition.unit,
    margin: worst.margin,
    severity: severityOf(path, definition),
    counts: true,
    corner: worst.corner,
    pin: reading.pin,
    driver: null,
    edge: null,
    time: null,
    failsAt: judged.filter((entry) => entry.verdict === "fail").length,
    ofCorners: judged.length,
    failsAtNominal: judged.some((entry) => entry.corner === NOMINAL && entry.verdict === "fail"),
    missing: null,
    mechanism: reading.mechanism,
    cause: worst.verdict === "pass" ? null : reading.cause(worst.value),
    restsOnAssumed: reading.restsOnAssumed,
  };
  return {
    finding,
    corners: judged.map(({ corner, value, verdict }) => ({ rule: definition.id, corner, value, verdict })),
  };
}
