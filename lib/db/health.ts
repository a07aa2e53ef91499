import "server-only";
import { openedDatabase, readPragmas, type PragmaHealth } from "./client";

export interface DatabaseHealth {
  ok: boolean;
  /** null for a remote database, whose server sees to it. */
  pragmas: PragmaHealth | null;
  /** What is wrong, as one sentence each. */
  faults: string[];
}

/** Whether the database answers and keeps what it acknowledges. Throws nothing: an unreachable one is a fault. */
export async function databaseHealth(): Promise<DatabaseHealth> {
  try {
    const { client, url } = await openedDatabase();
    await client.execute("SELECT 1");
    if (!url.startsWith("file:")) return { ok: true, pragmas: null, faults: [] };
    const pragmas = await readPragmas(client);
    const faults = [
      pragmas.journalMode === "wal"
        ? null
        : `The journal is '${pragmas.journalMode}', not a write-ahead log.`,
      pragmas.foreignKeys ? null : "Foreign keys are not enforced.",
      pragmas.synchronousFull ? null : "Commits are not flushed to the disk.",
    ].filter((fault) => fault !== null);
    return { ok: faults.length === 0, pragmas, faults };
  } catch (cause) {
    const reason = cause instanceof Error ? cause.message : String(cause);
    return { ok: false, pragmas: null, faults: [`The database does not answer: ${reason}`] };
  }
}
