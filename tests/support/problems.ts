import type { ProblemEntry } from "@/lib/schemas/problem-list";

/** A failing problem of a path, as a run lists it. */
export function aProblem(pathId: string, over: Partial<ProblemEntry> = {}): ProblemEntry {
  return {
    pathId,
    path: pathId,
    className: "Data",
    driver: "U1.1",
    layers: "L1 Top",
    mechanism: "driver mismatch",
    title: "Driver does not match the line",
    verdict: "fail",
    severity: "error",
    rule: "overshoot",
    value: 30,
    limit: 20,
    unit: "%",
    margin: -10,
    share: -0.5,
    corner: "fast/high",
    failsAt: 3,
    ofCorners: 9,
    failsAtNominal: true,
    missing: null,
    assumed: false,
    rules: "overshoot",
    ...over,
  };
}
