/** A server process of its own that works queued runs; killed in the middle by tests. Run with tsx. */
import { closeDb } from "@/lib/db/client";
import { expireLeases } from "@/lib/db/run";
import { closeCheckPool } from "@/lib/jobs/check-pool";
import { runWorkerIdle, wakeRunWorker } from "@/lib/jobs/run-worker";

process.stdout.write("working\n");
await expireLeases();
wakeRunWorker();
await runWorkerIdle();
await closeCheckPool();
await closeDb();
process.stdout.write("idle\n");
