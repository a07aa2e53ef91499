import type { ResolvedPath } from "../path/types";

export type Verdict = "pass" | "near" | "fail" | "no data";
export type DriverSpeed = "slow" | "typical" | "fast";
export type ImpedanceSide = "low" | "nominal" | "high";
export interface Corner {
  driver: DriverSpeed;
  impedance: ImpedanceSide;
}
/** "fast/low": how a corner is written in results */
export type CornerName = `${DriverSpeed}/${ImpedanceSide}`;

export interface Finding {
  rule: string;
  verdict: Verdict;
  /** in the rule's unit */
  value: number | null;
  limit: number | null;
  limitOrigin: string | null;
  unit: string;
  /** signed, positive is good; in the rule's unit */
  margin: number | null;
  severity: "error" | "warning" | "info";
  /** selectors are shown but do not count once simulation has judged the path */
  counts: boolean;
  corner: CornerName | null;
  pin: string | null;
  /** driving pin */
  driver: string | null;
  edge: "rise" | "fall" | null;
  /** [s] from the start of the source's edge */
  time: number | null;
  failsAt: number;
  ofCorners: number;
  failsAtNominal: boolean;
  /** input that is missing, when there is no data; the key that groups them */
  missing: string | null;
  /** groups the findings of a path that one cause makes */
  mechanism: string;
  /** one computed sentence: what makes it so, with its numbers */
  cause: string | null;
  restsOnAssumed: boolean;
}

/** The findings of one path that share a mechanism: listed, flagged, assigned, waived as one. */
export interface Problem {
  mechanism: string;
  title: string;
  verdict: Exclude<Verdict, "pass">;
  /** index into PathResult.findings; worst first */
  findings: number[];
  cause: string | null;
}

export interface CornerValue {
  rule: string;
  corner: CornerName;
  value: number | null;
  verdict: Verdict;
}

export interface PathResult {
  pathId: string;
  verdict: Verdict;
  findings: Finding[];
  problems: Problem[];
  /** every rule at every corner: the compact record */
  corners: CornerValue[];
  /** how many networks were simulated */
  simulations: number;
}

export interface RuleDefinition {
  id: string;
  title: string;
  /** one sentence: what is measured */
  measures: string;
  unit: string;
  /** "max": value ≤ limit passes; "min": value ≥ limit passes */
  direction: "max" | "min";
  defaultLimit: number | null;
  /** width of the near band in the rule's unit (or as a share of the limit) */
  near: { absolute: number } | { share: number } | null;
  severity: "error" | "warning" | "info";
  /** chooses what to look at; does not count as a failure once the path is simulated */
  selector: boolean;
  enabledByDefault: boolean;
  source: string;
}

export interface CheckContext {
  path: ResolvedPath;
  corners: readonly Corner[];
}
