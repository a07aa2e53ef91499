import type { ResolvedLimit } from "../path/types";
import { missingFinding, staticFinding } from "./findings";
import { impedanceCentring } from "./impedance-centring";
import { groupProblems, pathVerdict } from "./problems";
import type { Missing } from "./rule";
import type { PathResult } from "./types";
import { millimetres, ohms, percent } from "./words";

/** A class's line on one layer: one cross-section that the fabricator is asked to control. */
export interface ControlledLine {
  /** `line <class lineage> <layer lineage>` */
  id: string;
  className: string;
  classLineageId: string;
  layer: string;
  layerLineageId: string;
  kind: "single" | "differential";
  /** foot width, and gap of a pair [m] */
  width: number;
  gap: number | null;
  /** [Ω] */
  target: number;
  /** nominal by the closed form [Ω]; null with `missing` */
  nominal: number | null;
  method: string | null;
  missing: Missing | null;
  limit: ResolvedLimit;
}

/**
 * Impedance centring of every distinct cross-section: |nominal − target| / target [%]. One result a line, in the shape
 * of a path's, its id the line's; a line whose section cannot be computed has no data.
 */
export function checkImpedance(
  lines: readonly ControlledLine[],
): { line: ControlledLine; result: PathResult }[] {
  return lines.filter((line) => line.limit.enabled).map((line) => ({ line, result: checkLine(line) }));
}

function checkLine(line: ControlledLine): PathResult {
  const path = { limits: { [impedanceCentring.id]: line.limit } };
  const { nominal, missing } = line;
  if (nominal === null || missing) {
    const finding = missingFinding(
      path,
      impedanceCentring,
      missing ?? { input: `impedance of ${line.layer}`, detail: "No formula fits." },
    );
    return {
      pathId: line.id,
      verdict: "no data",
      findings: [finding],
      problems: groupProblems([finding]),
      corners: [],
      simulations: 0,
    };
  }
  const value = (100 * Math.abs(nominal - line.target)) / line.target;
  const { finding, corners } = staticFinding(path, impedanceCentring, {
    corners: [{ corner: { driver: "typical", impedance: "nominal" }, value }],
    limit: { limit: line.limit.limit, origin: line.limit.origin },
    pin: null,
    mechanism: "cross-section",
    restsOnAssumed: false,
    cause: () =>
      `${millimetres(line.width)}${line.gap === null ? "" : ` with a gap of ${millimetres(line.gap)}`} on ${line.layer} gives ${ohms(nominal)} by ${line.method ?? "its formula"}, ${percent(value)} from the target of ${ohms(line.target)}.`,
  });
  return {
    pathId: line.id,
    verdict: pathVerdict([finding]),
    findings: [finding],
    problems: groupProblems([finding]),
    corners,
    simulations: 0,
  };
}
