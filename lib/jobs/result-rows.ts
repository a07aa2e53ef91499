import "server-only";
import { newId } from "@/lib/db/ids";
import type { CheckedBatch, NewFinding, NewProblem } from "@/lib/db/run";
import { ruleCatalogue } from "@/lib/si/rules";
import type { Finding, Problem } from "@/lib/si/rules/types";
import type { CheckedPath } from "./check-worker";

/** What the database holds of a batch: one row a path, one a problem, one a near, failing or missing finding. */
export function resultRows(runId: string, teamId: string, checked: CheckedPath[]): CheckedBatch {
  const batch: CheckedBatch = { results: [], problems: [], findings: [] };
  for (const path of checked) {
    const { result } = path;
    const worst = worstOf(
      result.findings.filter((finding) => finding.counts && finding.verdict !== "no data"),
    );
    batch.results.push({
      runId,
      teamId,
      pathId: path.pathId,
      name: path.name,
      className: path.className,
      classLineageId: path.classLineageId,
      driver: path.driver,
      layers: path.layers,
      verdict: result.verdict,
      worstRule: worst?.rule ?? null,
      worstMargin: worst?.margin ?? null,
      inputHash: path.inputHash,
      detail: Buffer.from(path.detail),
    });
    for (const problem of result.problems) batch.problems.push(problemRow(runId, teamId, path, problem));
    for (const finding of result.findings)
      if (finding.verdict !== "pass")
        batch.findings.push(findingRow(runId, teamId, path.pathId, finding, finding.verdict));
  }
  return batch;
}

function problemRow(runId: string, teamId: string, path: CheckedPath, problem: Problem): NewProblem {
  const findings = problem.findings.flatMap((index) => path.result.findings[index] ?? []);
  const judged = findings.filter((finding) => finding.verdict === problem.verdict);
  const worst = worstOf(judged) ?? judged[0] ?? findings[0];
  return {
    id: newId(),
    runId,
    teamId,
    pathId: path.pathId,
    pathName: path.name,
    className: path.className,
    mechanism: problem.mechanism,
    title: problem.title,
    verdict: problem.verdict,
    severity: judged.some((finding) => finding.severity === "error")
      ? "error"
      : (worst?.severity ?? "warning"),
    worstRule: worst?.rule ?? problem.mechanism,
    worstMargin: worst?.margin ?? null,
    worstShare: worst ? share(worst) : null,
    worstCorner: worst?.corner ?? null,
    failsAt: Math.max(0, ...judged.map((finding) => finding.failsAt)),
    ofCorners: Math.max(0, ...judged.map((finding) => finding.ofCorners)),
    failsAtNominal: judged.some((finding) => finding.failsAtNominal),
    missing: judged.find((finding) => finding.missing)?.missing ?? null,
    cause: problem.cause,
    restsOnAssumed: findings.some((finding) => finding.restsOnAssumed),
  };
}

function findingRow(
  runId: string,
  teamId: string,
  pathId: string,
  finding: Finding,
  verdict: NewFinding["verdict"],
): NewFinding {
  const { time, limit, ...same } = finding;
  return { ...same, id: newId(), runId, teamId, pathId, verdict, limit, time_s: time };
}

/** A margin is near within a fifth of its limit, as a rule: a limit of zero is judged by its near band so. */
const NEAR_BANDS_IN_LIMIT = 5;

/** Margin as a share of the limit, so that rules of different units can be put in one order. */
function share(finding: Finding): number | null {
  if (finding.margin === null) return null;
  return finding.margin / scaleOf(finding);
}

function scaleOf({ rule, limit, value }: Finding): number {
  if (limit !== null && Math.abs(limit) > 1e-12) return Math.abs(limit);
  const near = ruleCatalogue.find((definition) => definition.id === rule)?.near;
  if (near && "absolute" in near) return NEAR_BANDS_IN_LIMIT * near.absolute;
  return Math.max(Math.abs(value ?? 0), 1e-12);
}

/** What a simulation saw speaks before what a formula expects: a wrong resistor matters by what it does. */
function worstOf(findings: Finding[]): Finding | null {
  const seen = findings.filter((finding) => finding.edge !== null && finding.verdict === "fail");
  let worst: Finding | null = null;
  for (const finding of seen.length > 0 ? seen : findings) {
    if (finding.margin === null) continue;
    if (!worst || (share(finding) ?? 0) < (share(worst) ?? 0)) worst = finding;
  }
  return worst;
}
