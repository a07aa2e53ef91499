"use client";

import { parseAsBoolean, parseAsString, parseAsStringLiteral, useQueryStates } from "nuqs";
import { useMemo } from "react";
import { GROUPINGS } from "./problem-groups";

const YES_NO = ["yes", "no"] as const;

/** What the page of a run shows, all of it in the address. */
export const problemParams = {
  verdict: parseAsStringLiteral(["fail", "near", "no data"] as const),
  class: parseAsString,
  rule: parseAsString,
  severity: parseAsStringLiteral(["error", "warning", "info"] as const),
  waived: parseAsStringLiteral(YES_NO),
  flagged: parseAsStringLiteral(YES_NO),
  mine: parseAsBoolean.withDefault(false),
  nominal: parseAsStringLiteral(["nominal", "corner"] as const),
  missing: parseAsString,
  q: parseAsString.withDefault(""),
  group: parseAsStringLiteral(GROUPINGS).withDefault("mechanism"),
  /** the group whose members are listed */
  in: parseAsString,
  /** the problem on which one stands */
  at: parseAsString,
  sort: parseAsString,
  view: parseAsStringLiteral(["problems", "selectors"] as const).withDefault("problems"),
};

export function useProblemParams() {
  const [params, setParams] = useQueryStates(problemParams, { history: "replace" });
  const {
    verdict,
    class: className,
    rule,
    severity,
    waived,
    flagged,
    mine,
    nominal,
    missing,
    q: text,
  } = params;
  const filter = useMemo(
    () => ({ verdict, className, rule, severity, waived, flagged, mine, nominal, missing, text }),
    [verdict, className, rule, severity, waived, flagged, mine, nominal, missing, text],
  );
  return { params, setParams, filter };
}

/** Takes every filter off; the grouping and the row stay. */
export const NO_FILTERS = {
  verdict: null,
  class: null,
  rule: null,
  severity: null,
  waived: null,
  flagged: null,
  mine: null,
  nominal: null,
  missing: null,
  q: null,
  in: null,
} as const;
