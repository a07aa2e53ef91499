import "server-only";
import { writeDelimited } from "@/lib/formats/delimited/write";
import { getRelease, type ReleaseRow } from "@/lib/db/release";
import { getRun, listFindings, listPathResults, listProblems, type FindingRow } from "@/lib/db/run";
import { thawInputs } from "@/lib/db/snapshot";
import { listAcceptances, listWaivers } from "@/lib/db/waiver";
import { CAUTION } from "@/lib/resolve/impedance-note";
import { resolvePaths } from "@/lib/resolve/resolve-paths";
import type { Actor } from "@/lib/schemas/actor";
import { noteCsv } from "./note-csv";
import { fileNames, jsonFile, manifestFile, type ReportFile } from "./report-files";
import { waveformFiles } from "./waveform-files";
import { zipStream } from "./zip";

/**
 * Everything a release rests on, as files: inputs, findings, waivers, note, and the waveform of every failing path
 * at its worst corner. Made from the frozen snapshot alone; the only time in it is the release's, so the same
 * release gives the same bytes.
 */
export async function ruleReport(
  actor: Actor,
  projectId: string,
  releaseId: string,
): Promise<{ release: ReleaseRow; zip: ReadableStream<Uint8Array> }> {
  const { release } = await getRelease(actor, projectId, releaseId);
  return {
    release,
    zip: zipStream(await reportFiles(actor, projectId, release), new Date(release.releasedAt)),
  };
}

/** The report's files, the manifest among them. */
export async function reportFiles(
  actor: Actor,
  projectId: string,
  release: ReleaseRow,
): Promise<ReportFile[]> {
  const run = await getRun(actor, projectId, release.runId);
  const [inputs, findings, problems, results, waivers, acceptances] = await Promise.all([
    thawInputs(actor, release.snapshotChunks),
    listFindings(actor, projectId, run.id),
    listProblems(actor, projectId, run.id),
    listPathResults(actor, projectId, run.id),
    listWaivers(actor, projectId, run),
    listAcceptances(actor, run.revisionId),
  ]);
  const nameOf = new Map(results.map((result) => [result.pathId, result.name]));
  const { nets, ruleSet, ...rest } = inputs;
  const ordered = [...findings].sort(
    (a, b) =>
      compare(nameOf.get(a.pathId) ?? "", nameOf.get(b.pathId) ?? "") ||
      compare(a.rule, b.rule) ||
      compare(a.pin ?? "", b.pin ?? ""),
  );
  const granted = waivers
    .filter(
      (waiver) =>
        waiver.createdAt <= release.releasedAt &&
        (waiver.revokedAt === null || waiver.revokedAt > release.releasedAt),
    )
    .map((waiver) => ({
      path: waiver.pathName,
      mechanism: waiver.mechanism,
      waived: waiver.waived,
      reason: waiver.reason,
      by: waiver.authorName,
    }))
    .sort((a, b) => compare(a.path, b.path) || compare(a.mechanism, b.mechanism));
  const accepted = acceptances
    .filter((entry) => entry.createdAt <= release.releasedAt)
    .map((entry) => ({ missing: entry.missing, reason: entry.reason, by: entry.authorName }))
    .sort((a, b) => compare(a.missing, b.missing));
  const failing = resolvePaths(inputs).paths.filter((path) =>
    results.some((result) => result.pathId === path.id && result.verdict === "fail"),
  );
  const files: ReportFile[] = [
    jsonFile("inputs/board.json", rest),
    jsonFile("inputs/rules.json", ruleSet),
    jsonFile("inputs/nets.json", nets),
    { name: "findings.csv", content: findingsCsv(ordered, nameOf) },
    jsonFile(
      "findings.json",
      ordered.map((finding) => plainFinding(finding, nameOf)),
    ),
    jsonFile(
      "problems.json",
      problems
        .map(({ id: _id, runId: _run, teamId: _team, ...problem }) => problem)
        .sort((a, b) => compare(a.pathName, b.pathName) || compare(a.mechanism, b.mechanism)),
    ),
    jsonFile(
      "paths.json",
      results
        .map(({ runId: _run, teamId: _team, ...result }) => result)
        .sort((a, b) => compare(a.name, b.name) || compare(a.pathId, b.pathId)),
    ),
    jsonFile("waivers.json", { waivers: granted, acceptedWithoutData: accepted }),
    jsonFile("note.json", release.note),
    { name: "note.csv", content: noteCsv(release.note) },
    ...waveformFiles(failing, findings, fileNames(failing.map((path) => path.name))),
  ];
  return [
    ...files,
    manifestFile(files, {
      board: release.note.project,
      revision: release.letter,
      releasedAt: release.releasedAt,
      snapshot: release.snapshotHash,
      engine: run.engineVersion,
      runtime: run.runtimeVersion,
      corners: run.corners,
      counts: run.counts,
      caution: CAUTION,
    }),
  ];
}

function findingsCsv(findings: FindingRow[], nameOf: Map<string, string>): string {
  return writeDelimited([
    [
      "path",
      "rule",
      "verdict",
      "value",
      "limit",
      "margin",
      "unit",
      "corner",
      "driver",
      "pin",
      "edge",
      "time [ns]",
      "fails at",
      "of corners",
      "severity",
      "counts",
      "missing",
      "cause",
    ],
    ...findings.map((finding) => [
      nameOf.get(finding.pathId) ?? finding.pathId,
      finding.rule,
      finding.verdict,
      number(finding.value),
      number(finding.limit),
      number(finding.margin),
      finding.unit,
      finding.corner ?? "",
      finding.driver ?? "",
      finding.pin ?? "",
      finding.edge ?? "",
      finding.time_s === null ? "" : number(finding.time_s * 1e9),
      finding.failsAt,
      finding.ofCorners,
      finding.severity,
      finding.counts ? "yes" : "no",
      finding.missing ?? "",
      finding.cause ?? "",
    ]),
  ]);
}

function plainFinding(
  { id: _id, runId: _run, teamId: _team, ...finding }: FindingRow,
  nameOf: Map<string, string>,
) {
  return { path: nameOf.get(finding.pathId) ?? finding.pathId, ...finding };
}

function number(value: number | null): string {
  return value === null ? "" : String(Number(value.toPrecision(12)));
}

/** By code unit: the same on every machine, whatever its language. */
function compare(a: string, b: string): number {
  return a < b ? -1 : a > b ? 1 : 0;
}
