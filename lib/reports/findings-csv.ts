import "server-only";
import type { FindingRow, PathResultRow } from "@/lib/db/run";
import { writeDelimited } from "@/lib/formats/delimited/write";

const HEADINGS = [
  "path",
  "class",
  "driver model pin",
  "layers",
  "rule",
  "verdict",
  "value",
  "limit",
  "margin",
  "unit",
  "severity",
  "counts",
  "worst corner",
  "fails at corners",
  "of corners",
  "fails at nominal",
  "pin",
  "driving pin",
  "edge",
  "time [ns]",
  "missing input",
  "problem",
  "rests on assumed input",
  "cause",
];

/** The findings of a run as a spreadsheet reads them, one a row; cells that look like formulas are made harmless. */
export function findingsCsv(
  findings: readonly FindingRow[],
  paths: readonly Pick<PathResultRow, "pathId" | "name" | "className" | "driver" | "layers">[],
): string {
  const pathOf = new Map(paths.map((path) => [path.pathId, path]));
  return writeDelimited([
    HEADINGS,
    ...findings.map((finding) => {
      const path = pathOf.get(finding.pathId);
      return [
        path?.name ?? finding.pathId,
        path?.className ?? "",
        path?.driver ?? "",
        path?.layers ?? "",
        finding.rule,
        finding.verdict,
        digits(finding.value),
        digits(finding.limit),
        digits(finding.margin),
        finding.unit,
        finding.severity,
        yesNo(finding.counts),
        finding.corner ?? "",
        finding.failsAt,
        finding.ofCorners,
        yesNo(finding.failsAtNominal),
        finding.pin ?? "",
        finding.driver ?? "",
        finding.edge ?? "",
        digits(finding.time_s === null ? null : finding.time_s * 1e9),
        finding.missing ?? "",
        finding.mechanism,
        yesNo(finding.restsOnAssumed),
        finding.cause ?? "",
      ];
    }),
  ]);
}

function digits(value: number | null): string {
  return value === null || !Number.isFinite(value) ? "" : String(Number(value.toPrecision(6)));
}

function yesNo(holds: boolean): string {
  return holds ? "yes" : "no";
}
