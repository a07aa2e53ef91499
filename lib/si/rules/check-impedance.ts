import type { ResolvedLimit } from "../path/types";
import { missingFinding, staticFinding } from "./findings";
import { impedanceCentring } from "./impedance-centring";
import { impedanceYield } from "./impedance-yield";
import { groupProblems, pathVerdict } from "./problems";
import type { Missing } from "./rule";
import type { CornerValue, Finding, PathResult, RuleDefinition } from "./types";
import { millimetres, number, ohms, percent } from "./words";

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
  /** of the target, as a fraction */
  tolerance: number;
  /** nominal [Ω]; null with `missing` */
  nominal: number | null;
  /** what computed it: "field solution" */
  method: string | null;
  /** what the published formula says beside it; null where none fits */
  closedForm: { ohms: number; title: string; inRange: boolean } | null;
  /** how production is predicted to spread; null with `missing` */
  spread: LineSpread | null;
  missing: Missing | null;
  /** by rule id */
  limits: Readonly<Record<string, ResolvedLimit>>;
}

export interface LineSpread {
  /** share of production within target ± tolerance, as a fraction */
  yield: number;
  /** 0.5th and 99.5th percentile [Ω] */
  low: number;
  high: number;
  /** the tolerance that matters most: "width", "height of …" */
  chief: string;
  /** of the variance that it makes, as a fraction */
  chiefShare: number;
  /** "1,000 samples of a second-order model" */
  method: string;
}

const NOMINAL_CORNER = { driver: "typical", impedance: "nominal" } as const;

/**
 * Impedance centring and yield of every distinct cross-section: |nominal − target| / target [%], and the predicted share
 * of production within the tolerance [%]. One result a line, in the shape of a path's, its id the line's; a line whose
 * section cannot be computed has no data.
 */
export function checkImpedance(
  lines: readonly ControlledLine[],
): { line: ControlledLine; result: PathResult }[] {
  return lines.flatMap((line) => {
    const rules = [impedanceCentring, impedanceYield].filter(({ id }) => line.limits[id]?.enabled);
    return rules.length === 0 ? [] : [{ line, result: checkLine(line, rules) }];
  });
}

function checkLine(line: ControlledLine, rules: readonly RuleDefinition[]): PathResult {
  const judged = rules.map((rule) => judgeLine(line, rule));
  const findings = judged.map(({ finding }) => finding);
  return {
    pathId: line.id,
    verdict: pathVerdict(findings),
    findings,
    problems: groupProblems(findings),
    corners: judged.flatMap(({ corners }) => corners),
    simulations: 0,
  };
}

function judgeLine(line: ControlledLine, rule: RuleDefinition): { finding: Finding; corners: CornerValue[] } {
  const { nominal, spread, missing } = line;
  const limit = line.limits[rule.id];
  const told = rule === impedanceYield ? spread !== null : nominal !== null;
  if (!limit || missing || nominal === null || !told) {
    const without = missing ?? {
      input: rule === impedanceYield ? `spread of ${line.layer}` : `impedance of ${line.layer}`,
      detail: "Nothing computes it for this cross-section.",
    };
    return { finding: missingFinding(line, rule, without), corners: [] };
  }
  return staticFinding(line, rule, {
    corners: [{ corner: NOMINAL_CORNER, value: valueOf(line, rule, nominal) }],
    limit: { limit: limit.limit, origin: limit.origin },
    pin: null,
    mechanism: rule === impedanceYield ? "spread" : "cross-section",
    restsOnAssumed: false,
    cause: (value) =>
      rule === impedanceYield ? spreadCause(line, value) : centringCause(line, nominal, value),
  });
}

function valueOf(line: ControlledLine, rule: RuleDefinition, nominal: number): number {
  if (rule === impedanceYield) return 100 * (line.spread?.yield ?? 0);
  return (100 * Math.abs(nominal - line.target)) / line.target;
}

const shapeOf = ({ width, gap, layer }: ControlledLine) =>
  `${millimetres(width)}${gap === null ? "" : ` with a gap of ${millimetres(gap)}`} on ${layer}`;

function centringCause(line: ControlledLine, nominal: number, value: number): string {
  const { closedForm } = line;
  const beside =
    closedForm === null
      ? ""
      : ` (${closedForm.title}: ${ohms(closedForm.ohms)}${closedForm.inRange ? "" : ", outside its range"})`;
  return `${shapeOf(line)} gives ${ohms(nominal)} by ${line.method ?? "its formula"}${beside}, ${percent(value)} from the target of ${ohms(line.target)}.`;
}

function spreadCause(line: ControlledLine, value: number): string {
  const { spread } = line;
  if (!spread) return "";
  return `${shapeOf(line)} spreads from ${ohms(spread.low)} to ${ohms(spread.high)} in production; ${number(value, 3)} % lies within ±${percent(100 * line.tolerance)} of ${ohms(line.target)}. ${capital(spread.chief)} makes ${percent(100 * spread.chiefShare)} of the spread.`;
}

const capital = (words: string) => words.charAt(0).toUpperCase() + words.slice(1);
