import "server-only";
import { createClient, type Client } from "@libsql/client";

/** Opens a file for reading it through, apart from the process's own database; closes it whatever happens. */
export async function withFile<T>(file: string, act: (client: Client) => Promise<T>): Promise<T> {
  const client = createClient({ url: `file:${file}`, timeout: 0 });
  try {
    return await act(client);
  } finally {
    client.close();
  }
}

/** What is wrong with a database file, as one sentence each; empty where it is sound and ours. */
export async function findFaults(client: Client): Promise<string[]> {
  const faults: string[] = [];
  const integrity = await client.execute("PRAGMA integrity_check(20)");
  for (const row of integrity.rows) {
    const said = row[0];
    if (said !== "ok") faults.push(`Integrity: ${typeof said === "string" ? said : "no answer"}.`);
  }
  const dangling = await client.execute("PRAGMA foreign_key_check");
  if (dangling.rows.length > 0) faults.push(`${dangling.rows.length} rows point at rows that are not there.`);
  const ours = await client.execute(
    "SELECT count(*) AS n FROM sqlite_master WHERE type = 'table' AND name IN ('organization', 'project', 'audit_entry')",
  );
  if (Number(ours.rows[0]?.n) !== 3) faults.push("It holds no tables of this program.");
  return faults;
}

/** @throws Error naming the file and everything that is wrong with it */
export async function requireSound(file: string): Promise<void> {
  const faults = await withFile(file, findFaults).catch((error: unknown) => [
    `It cannot be read as a database: ${error instanceof Error ? error.message : String(error)}.`,
  ]);
  if (faults.length > 0) throw new Error(`${file} is not sound. ${faults.join(" ")}`);
}
