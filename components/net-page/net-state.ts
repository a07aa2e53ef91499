import { parseAsFloat, parseAsString, parseAsStringLiteral, type UseQueryStatesKeysMap } from "nuqs";
import type { CornerName, Finding, PathResult, Verdict } from "@/lib/si/rules/types";
import type { WhatIf } from "@/lib/resolve/what-if";

export const SPEEDS = ["slow", "typical", "fast"] as const;
export const SIDES = ["low", "nominal", "high"] as const;
export const CORNERS: readonly CornerName[] = SPEEDS.flatMap((speed) =>
  SIDES.map((side): CornerName => `${speed}/${side}`),
);

/** What the address holds; a thing that is left out follows from the finding that is looked at. */
export const netParams = {
  rule: parseAsString,
  corner: parseAsStringLiteral(CORNERS),
  edge: parseAsStringLiteral(["rise", "fall"] as const),
  driver: parseAsString,
  pin: parseAsString,
  /** of the cursor [ps] */
  t: parseAsFloat,
} satisfies UseQueryStatesKeysMap;

/** Changes on trial, in the units of their fields. */
export const whatIfParams = {
  /** [Ω] */
  series: parseAsFloat,
  /** [Ω] */
  source: parseAsFloat,
  /** [ps] */
  rise: parseAsFloat,
  /** [%] */
  length: parseAsFloat,
  /** [Ω] */
  line: parseAsFloat,
  /** [pF] */
  load: parseAsFloat,
  /** [Ω] */
  end: parseAsFloat,
  endTo: parseAsStringLiteral(["ground", "half"] as const).withDefault("half"),
} satisfies UseQueryStatesKeysMap;

type Address = { [K in keyof typeof whatIfParams]: number | null | string };

/** What an address asks to try; a value that no path can have is left out. */
export function whatIfOf(address: Address): WhatIf {
  const take = (value: unknown, scale: number, least: number, most: number): number | null => {
    if (typeof value !== "number" || !Number.isFinite(value) || value < least || value > most) return null;
    return value * scale;
  };
  return {
    seriesOhms: take(address.series, 1, 0, 10_000),
    driverOhms: take(address.source, 1, 0.1, 10_000),
    riseTime: take(address.rise, 1e-12, 1, 1e6),
    lengthScale: take(address.length, 1e-2, 1, 1000),
    impedance: take(address.line, 1, 5, 500),
    capacitance: take(address.load, 1e-12, 0, 1000),
    endOhms: take(address.end, 1, 1, 100_000),
    endTo: address.endTo === "ground" ? "ground" : "half",
  };
}

const RANK: Record<Verdict, number> = { fail: 0, "no data": 1, near: 2, pass: 3 };

const WEIGHT: Record<Finding["severity"], number> = { error: 0, warning: 1, info: 2 };

/** Worst first; of equally bad ones what counts more, then what happens on an edge, then what fails at more corners. */
export function inOrder(findings: readonly Finding[]): Finding[] {
  return [...findings].sort(
    (a, b) =>
      Number(!a.counts) - Number(!b.counts) ||
      RANK[a.verdict] - RANK[b.verdict] ||
      WEIGHT[a.severity] - WEIGHT[b.severity] ||
      Number(a.edge === null) - Number(b.edge === null) ||
      Number(a.time === null) - Number(b.time === null) ||
      b.failsAt - a.failsAt ||
      share(a) - share(b),
  );
}

function share(finding: Finding): number {
  if (finding.margin === null) return 0;
  return finding.margin / Math.max(Math.abs(finding.limit ?? 1), 1e-9);
}

export interface View {
  finding: Finding | null;
  corner: CornerName;
  edge: "rise" | "fall";
  driver: string;
  pin: string | null;
}

interface Asked {
  rule: string | null;
  corner: CornerName | null;
  edge: "rise" | "fall" | null;
  driver: string | null;
  pin: string | null;
}

/** What is looked at: as asked, else where the finding is worst. */
export function viewOf(
  asked: Asked,
  result: PathResult,
  drivers: readonly string[],
  receivers: readonly string[],
): View {
  const ordered = inOrder(result.findings);
  const finding = ordered.find((entry) => entry.rule === asked.rule) ?? ordered[0] ?? null;
  const driver =
    [asked.driver, finding?.driver].find((pin) => pin && drivers.includes(pin)) ?? drivers[0] ?? "";
  const listening = receivers.filter((pin) => pin !== driver);
  return {
    finding,
    corner: asked.corner ?? finding?.corner ?? "typical/nominal",
    edge: asked.edge ?? finding?.edge ?? "rise",
    driver,
    pin: [asked.pin, finding?.pin].find((pin) => pin && listening.includes(pin)) ?? listening[0] ?? null,
  };
}

/** Whether the drawings show the finding where it is worst. */
export function isAtFinding({ finding, corner, edge, driver, pin }: View): boolean {
  return (
    finding !== null &&
    finding.corner === corner &&
    finding.edge === edge &&
    finding.driver === driver &&
    finding.pin === pin
  );
}

/** The worst verdict at each corner, of one rule or, where that is not judged corner by corner, of all that count. */
export function cornerVerdicts(
  result: PathResult,
  rule: string | null,
): { of: string | null; verdicts: Map<CornerName, Verdict> } {
  const own = result.corners.filter((value) => value.rule === rule);
  const counting = new Set(result.findings.filter((entry) => entry.counts).map((entry) => entry.rule));
  const byCorner = own.length === CORNERS.length;
  const verdicts = new Map<CornerName, Verdict>();
  for (const value of byCorner ? own : result.corners.filter((entry) => counting.has(entry.rule))) {
    const held = verdicts.get(value.corner);
    if (held === undefined || RANK[value.verdict] < RANK[held]) verdicts.set(value.corner, value.verdict);
  }
  return { of: byCorner ? rule : null, verdicts };
}
