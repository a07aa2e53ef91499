/** A server process of its own that works confirmed imports; killed in the middle by tests. Run with tsx. */
import { closeDb } from "@/lib/db/client";
import { importWorkerIdle, wakeImportWorker } from "@/lib/jobs/import-worker";

process.stdout.write("working\n");
wakeImportWorker();
await importWorkerIdle();
await closeDb();
process.stdout.write("idle\n");
