import "server-only";
import { log } from "@/lib/db/log";
import { expireLeases } from "@/lib/db/run";
import { wakeImportWorker } from "./import-worker";
import { wakeRunWorker } from "./run-worker";

/**
 * Takes up the runs and imports that a stopped process left. A database that cannot be reached yet must not keep the
 * server from starting: the next run or import that somebody starts wakes the workers too.
 */
export async function resumeJobs(): Promise<void> {
  try {
    await expireLeases();
  } catch (error) {
    log().error({ err: error }, "Interrupted runs were not taken up; the next run takes them up.");
    return;
  }
  wakeRunWorker();
  wakeImportWorker();
}
