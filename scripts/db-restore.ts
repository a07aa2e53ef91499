/**
 * Puts a copy back in place of the database. Stop the server first.
 *
 *     npm run db:restore FILE [--force]      --force: although the database is newer than the copy
 */
import path from "node:path";
import { databaseUrl } from "@/lib/db/client";
import { restoreDatabase } from "@/lib/db/restore";
import { report } from "./database-report";

await report(async () => {
  const names = process.argv.slice(2);
  const file = names.find((name) => !name.startsWith("--"));
  if (!file) throw new Error("Which copy? Write: npm run db:restore FILE");
  const { kept } = await restoreDatabase(path.resolve(file), databaseUrl(), {
    force: names.includes("--force"),
  });
  return kept ? `Restored. What was there before is kept: ${kept}` : "Restored.";
});
