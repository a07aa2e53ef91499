import "server-only";
import { sql, type SQL } from "drizzle-orm";
import type { BatchItem } from "drizzle-orm/batch";
import { getDb, type Database } from "./client";

export type Statement = BatchItem<"sqlite">;

/** A condition of a unit did not hold when it came to be written; nothing of the unit was. */
export class GuardError extends Error {
  override readonly name = "GuardError";
  constructor(
    /** Place of the condition among the unit's statements. */
    readonly index: number,
    cause: unknown,
  ) {
    super("A condition of this unit no longer holds.", { cause });
  }
}

/** What SQLite says of a guard's JSON; nothing else in a unit parses text that we did not write. */
const GUARD_FAILED = "malformed JSON";

/**
 * A statement that undoes its whole unit unless the condition holds. Units are batches, which know no IF: this
 * reads well-formed JSON where the condition holds and malformed JSON, which is an error, where it does not.
 */
export function guard(db: Database, condition: SQL): Statement {
  return db.run(sql`select json(case when ${condition} then '1' else 'no' end)`);
}

/**
 * Writes all statements, or none, in one immediate transaction of the write queue.
 * @throws GuardError where a guard among them failed
 */
export async function commitUnit(statements: readonly Statement[]): Promise<void> {
  const [first, ...rest] = statements;
  if (!first) return;
  const db = await getDb();
  try {
    await db.batch([first, ...rest]);
  } catch (error) {
    if (error instanceof Error && error.message.includes(GUARD_FAILED))
      throw new GuardError(failedAt(error), error);
    throw error;
  }
}

/** Whether an error is that of a UNIQUE index over these columns, such as "net_class.revision_id, net_class.name". */
export function isUniqueFailure(error: unknown, columns: string): boolean {
  for (let cause: unknown = error; cause instanceof Error; cause = cause.cause)
    if (cause.message.includes(`UNIQUE constraint failed: ${columns}`)) return true;
  return false;
}

function failedAt(error: Error): number {
  return "statementIndex" in error && typeof error.statementIndex === "number" ? error.statementIndex : -1;
}
