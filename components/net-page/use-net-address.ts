"use client";

import { useQueryStates } from "nuqs";
import { useCallback, useMemo } from "react";
import type { WhatIf } from "@/lib/resolve/what-if";
import type { Finding } from "@/lib/si/rules/types";
import { netParams, whatIfOf, whatIfParams } from "./net-state";

const OPTIONS = { history: "replace", shallow: true, throttleMs: 200 } as const;

/** The state that the address of the page holds: what is looked at, and the changes on trial. */
export function useNetAddress() {
  const [asked, setAsked] = useQueryStates(netParams, OPTIONS);
  const [trial, setTrial] = useQueryStates(whatIfParams, OPTIONS);
  const change = useMemo(() => whatIfOf(trial), [trial]);

  /** Everything else follows from the finding. */
  const chooseFinding = useCallback(
    (finding: Finding) =>
      void setAsked({ rule: finding.rule, corner: null, edge: null, driver: null, pin: null, t: null }),
    [setAsked],
  );
  const look = useCallback((at: Partial<typeof asked>) => void setAsked({ ...at }), [setAsked]);
  const tryChange = useCallback(
    (part: Partial<WhatIf>) =>
      void setTrial({
        ...("seriesOhms" in part ? { series: rounded(part.seriesOhms, 1) } : {}),
        ...("driverOhms" in part ? { source: rounded(part.driverOhms, 1) } : {}),
        ...("riseTime" in part ? { rise: rounded(part.riseTime, 1e12) } : {}),
        ...("lengthScale" in part ? { length: rounded(part.lengthScale, 100) } : {}),
        ...("impedance" in part ? { line: rounded(part.impedance, 1) } : {}),
        ...("capacitance" in part ? { load: rounded(part.capacitance, 1e12) } : {}),
        ...("endOhms" in part ? { end: rounded(part.endOhms, 1) } : {}),
        ...("endTo" in part ? { endTo: part.endTo } : {}),
      }),
    [setTrial],
  );
  const reset = useCallback(() => void setTrial(null), [setTrial]);
  return { asked, change, chooseFinding, look, tryChange, reset };
}

/** Six digits are more than any of these is known to, and keep the address short. */
function rounded(value: number | null | undefined, scale: number): number | null {
  return value === null || value === undefined ? null : Number((value * scale).toPrecision(6));
}
