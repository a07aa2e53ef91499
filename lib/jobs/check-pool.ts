import "server-only";
import { existsSync } from "node:fs";
import { availableParallelism } from "node:os";
import path from "node:path";
import { Piscina } from "piscina";
import type { CheckBatch, CheckedPath } from "./check-worker";

const shared = globalThis as typeof globalThis & { __ringfenceCheckPool?: Piscina };

/** Bundled by scripts/build-workers.mjs. */
const workerFile = () =>
  path.resolve(/* turbopackIgnore: true */ process.env.WORKERS_DIR ?? "dist/workers", "check-worker.mjs");

/** The process's worker threads, started at first use. */
function checkPool(): Piscina {
  if (shared.__ringfenceCheckPool) return shared.__ringfenceCheckPool;
  const filename = workerFile();
  // Without the file piscina waits for ever; say so instead.
  if (!existsSync(/* turbopackIgnore: true */ filename))
    throw new Error("The check's worker is not built. Run npm run workers.");
  shared.__ringfenceCheckPool = new Piscina({
    filename,
    minThreads: 1,
    maxThreads: Math.max(1, Math.min(8, availableParallelism())),
    idleTimeout: 10_000,
  });
  return shared.__ringfenceCheckPool;
}

export function checkThreads(): number {
  return checkPool().options.maxThreads;
}

/** Judges one batch in a worker thread. */
export function checkInWorker(batch: CheckBatch, signal: AbortSignal): Promise<CheckedPath[]> {
  return checkPool().run(batch, { signal }) as Promise<CheckedPath[]>;
}

export async function closeCheckPool(): Promise<void> {
  const pool = shared.__ringfenceCheckPool;
  shared.__ringfenceCheckPool = undefined;
  await pool?.destroy();
}
