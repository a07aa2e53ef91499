/** Brings the database to this version's tables. Safe to run again. */
import path from "node:path";
import { fileURLToPath } from "node:url";
import { migrate } from "drizzle-orm/libsql/migrator";
import { databaseUrl, openDatabase } from "@/lib/db/client";

const migrationsFolder = path.join(path.dirname(fileURLToPath(import.meta.url)), "..", "drizzle");

const open = await openDatabase(databaseUrl());
try {
  await migrate(open.db, { migrationsFolder });
} finally {
  open.close();
}
