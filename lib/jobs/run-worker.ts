import "server-only";
import { setImmediate } from "node:timers/promises";
import { log } from "@/lib/db/log";
import {
  claimRun,
  checkedPathIds,
  countVerdicts,
  failRun,
  finishRun,
  thinOldRuns,
  saveBatch,
  type RunRow,
} from "@/lib/db/run";
import { thawInputs } from "@/lib/db/snapshot";
import type { ControlledLine } from "@/lib/si/rules/check-impedance";
import { controlledLines } from "@/lib/resolve/controlled-lines";
import { resolvePaths } from "@/lib/resolve/resolve-paths";
import { systemActor } from "@/lib/schemas/actor";
import { parseCorner } from "@/lib/si";
import { checkLines } from "./check-lines";
import { checkInWorker, checkThreads } from "./check-pool";
import { resultRows } from "./result-rows";

/** Paths a worker judges before its results are written: small enough for a lively bar, large enough to pay. */
const BATCH = 40;

interface RunLoop {
  active: Promise<void> | null;
  again: boolean;
  aborts: Map<string, AbortController>;
}

const shared = globalThis as typeof globalThis & {
  __ringfenceRunLoop?: RunLoop;
};
const loop = (): RunLoop => (shared.__ringfenceRunLoop ??= { active: null, again: false, aborts: new Map() });

/** Works queued runs, one after the other, until none is left. Called after a run is queued and at start. */
export function wakeRunWorker(): void {
  const state = loop();
  state.again = true;
  state.active ??= work()
    .catch((error: unknown) => log().error({ err: error }, "Runs stopped; the next one wakes them."))
    .finally(() => {
      state.active = null;
      if (state.again) wakeRunWorker();
    });
}

/** Settles when nothing is being worked; for scripts and tests. */
export async function runWorkerIdle(): Promise<void> {
  while (loop().active) await loop().active;
}

/** Stops the threads of a run that was cancelled. */
export function abortRun(runId: string): void {
  loop().aborts.get(runId)?.abort();
}

async function work(): Promise<void> {
  const state = loop();
  while (state.again) {
    state.again = false;
    for (let claimed = await claimRun(); claimed; claimed = await claimRun()) await workRun(claimed);
  }
}

async function workRun(row: RunRow): Promise<void> {
  const abort = new AbortController();
  loop().aborts.set(row.id, abort);
  try {
    const inputs = await thawInputs(systemActor(row.teamId), row.inputChunks);
    const done = await checkedPathIds(row.id);
    const controlled: ControlledLine[] = [];
    for (const line of controlledLines(inputs)) {
      controlled.push(line);
      // Others are served between one field solution and the next.
      await setImmediate();
    }
    const lines = checkLines(controlled).filter((line) => !done.has(line.pathId));
    if (lines.length > 0 && !(await saveBatch(row.id, resultRows(row.id, row.teamId, lines)))) return;
    const paths = resolvePaths(inputs).paths.filter((path) => !done.has(path.id));
    const corners = row.corners.map(parseCorner);
    let next = 0;
    let running = true;
    const feed = async (): Promise<void> => {
      while (running && next < paths.length) {
        const batch = paths.slice(next, (next += BATCH));
        const checked = await checkInWorker({ paths: batch, corners }, abort.signal);
        if (!(await saveBatch(row.id, resultRows(row.id, row.teamId, checked)))) running = false;
      }
    };
    // One feeder more than threads keeps every thread busy while a batch is being written.
    await Promise.all(Array.from({ length: checkThreads() + 1 }, feed));
    if (!running) return;
    await finishRun(row.id, await countVerdicts(row.id));
    await thinOldRuns(row.projectId);
  } catch (error) {
    if (abort.signal.aborted) return;
    await failRun(row.id, error instanceof Error ? error.message : "It stopped for an unknown reason.");
  } finally {
    loop().aborts.delete(row.id);
  }
}
