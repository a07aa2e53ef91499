/**
 * Writes a checked copy of the database, while it is served or not.
 *
 *     npm run db:backup [FILE]      default: backups/ringfence-TIME.db in the data folder
 */
import path from "node:path";
import { backupDatabase } from "@/lib/db/backup";
import { databaseUrl } from "@/lib/db/client";
import { report } from "./database-report";

await report(async () => {
  const url = databaseUrl();
  const stamp = new Date().toISOString().replace(/[:.]/g, "-");
  const folder = path.dirname(url.replace(/^file:/, ""));
  const file = path.resolve(process.argv[2] ?? path.join(folder, "backups", `ringfence-${stamp}.db`));
  await backupDatabase(url, file);
  return `The copy is whole: ${file}`;
});
