import "server-only";
import { and, asc, desc, eq, gt, like, lt, or, sql, type SQL } from "drizzle-orm";
import type { Actor } from "@/lib/schemas/actor";
import { requirePermission, within } from "./access";
import { auditHash, CHAIN_START } from "./audit-hash";
import { getDb, type Database } from "./client";
import { now } from "./clock";
import { newId } from "./ids";
import { auditEntry } from "./schema";
import { commitUnit, isUniqueFailure, type Statement } from "./unit";

export interface AuditInput {
  /** Thing and verb: "project.create", "draft.edit". */
  action: string;
  subjectKind: string;
  subjectId: string | null;
  projectId: string | null;
  detail?: Record<string, unknown>;
}

export type AuditRow = Omit<typeof auditEntry.$inferSelect, "teamId">;

/** Only another process can take a place in the chain between our reading and writing; it does not do so often. */
const MAX_ATTEMPTS = 20;

/**
 * Writes the statements and their audit entries as one unit. The entries continue the team's chain: each place in
 * it is unique, so of two writers who read the same end one is turned back whole, reads again and follows the other.
 * @throws GuardError where a guard among the statements failed
 */
export async function commitAudited(
  actor: Actor,
  statements: readonly Statement[],
  audit: AuditInput | readonly AuditInput[],
): Promise<void> {
  const db = await getDb();
  const entries: readonly AuditInput[] = Array.isArray(audit) ? audit : [audit as AuditInput];
  await inTurn(actor.teamId, async () => {
    for (let attempt = 1; ; attempt++) {
      try {
        return await commitUnit([...statements, ...(await chainEntries(db, actor, entries))]);
      } catch (error) {
        if (!isUniqueFailure(error, "audit_entry.team_id, audit_entry.seq") || attempt >= MAX_ATTEMPTS)
          throw error;
      }
    }
  });
}

/** An entry about what was no change of the database's own, such as a download. */
export async function recordAudit(actor: Actor, audit: AuditInput): Promise<void> {
  await commitAudited(actor, [], audit);
}

export interface AuditFilter {
  /** Text in the action, the person's name or the kind of thing. */
  search?: string;
  projectId?: string;
  from?: number;
  to?: number;
  /** Entries before this place; for the next page. */
  before?: number;
  limit?: number;
}

/** The team's entries, newest first. */
export async function listAudit(actor: Actor, filter: AuditFilter = {}): Promise<AuditRow[]> {
  requirePermission(actor, "audit:read", "The audit log");
  const db = await getDb();
  const conditions: (SQL | undefined)[] = [within(actor, "audit:read", auditEntry.teamId)];
  if (filter.search) {
    const pattern = `%${filter.search.replace(/[%_]/g, "")}%`;
    conditions.push(
      or(
        like(auditEntry.action, pattern),
        like(auditEntry.actorName, pattern),
        like(auditEntry.subjectKind, pattern),
        sql`${auditEntry.detail} like ${pattern}`,
      ),
    );
  }
  if (filter.projectId) conditions.push(eq(auditEntry.projectId, filter.projectId));
  if (filter.from !== undefined) conditions.push(gt(auditEntry.at, filter.from - 1));
  if (filter.to !== undefined) conditions.push(lt(auditEntry.at, filter.to));
  if (filter.before !== undefined) conditions.push(lt(auditEntry.seq, filter.before));
  const rows = await db
    .select()
    .from(auditEntry)
    .where(and(...conditions))
    .orderBy(desc(auditEntry.seq))
    .limit(filter.limit ?? 500);
  return rows.map(({ teamId: _teamId, ...row }) => row);
}

export interface ChainCheck {
  entries: number;
  intact: boolean;
  /** Place of the first entry that does not follow from the one before. */
  brokenAt: number | null;
  lastHash: string;
}

/** Reads the whole chain and recomputes each hash. Says nothing of entries cut off at the end: keep `lastHash` aside for that. */
export async function verifyAuditChain(actor: Actor): Promise<ChainCheck> {
  requirePermission(actor, "audit:read", "The audit log");
  const db = await getDb();
  let lastHash = CHAIN_START;
  let seq = 0;
  for (;;) {
    const rows = await db
      .select()
      .from(auditEntry)
      .where(and(within(actor, "audit:read", auditEntry.teamId), gt(auditEntry.seq, seq)))
      .orderBy(asc(auditEntry.seq))
      .limit(1000);
    for (const row of rows) {
      if (row.seq !== seq + 1 || row.previousHash !== lastHash || auditHash(row) !== row.hash)
        return { entries: seq, intact: false, brokenAt: seq + 1, lastHash };
      seq = row.seq;
      lastHash = row.hash;
    }
    if (rows.length < 1000) return { entries: seq, intact: true, brokenAt: null, lastHash };
  }
}

async function chainEntries(
  db: Database,
  actor: Actor,
  entries: readonly AuditInput[],
): Promise<Statement[]> {
  if (entries.length === 0) return [];
  const [end] = await db
    .select({ seq: auditEntry.seq, hash: auditEntry.hash })
    .from(auditEntry)
    .where(eq(auditEntry.teamId, actor.teamId))
    .orderBy(desc(auditEntry.seq))
    .limit(1);
  let seq = end?.seq ?? 0;
  let previousHash = end?.hash ?? CHAIN_START;
  return entries.map((input) => {
    const entry = {
      id: newId(),
      teamId: actor.teamId,
      seq: ++seq,
      at: now(),
      actorId: actor.userId,
      actorName: actor.name,
      action: input.action,
      subjectKind: input.subjectKind,
      subjectId: input.subjectId,
      projectId: input.projectId,
      detail: input.detail ?? {},
      previousHash,
    };
    const hash = auditHash(entry);
    previousHash = hash;
    return db.insert(auditEntry).values({ ...entry, hash });
  });
}

const holder = globalThis as typeof globalThis & { ringfenceChains?: Map<string, Promise<unknown>> };

/** One writer of a team's chain at a time within this process, so that none is turned back by its own kin. */
function inTurn<T>(teamId: string, act: () => Promise<T>): Promise<T> {
  const chains = (holder.ringfenceChains ??= new Map<string, Promise<unknown>>());
  const result = (chains.get(teamId) ?? Promise.resolve()).then(act);
  const settled = result
    .catch(() => undefined)
    .then(() => {
      if (chains.get(teamId) === settled) chains.delete(teamId);
    });
  chains.set(teamId, settled);
  return result;
}
