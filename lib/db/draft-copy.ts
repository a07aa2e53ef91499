import "server-only";
import { and, eq, getTableColumns, sql } from "drizzle-orm";
import type { SQLiteTable } from "drizzle-orm/sqlite-core";
import type { Actor } from "@/lib/schemas/actor";
import { RefusedError } from "@/lib/schemas/errors";
import { requirePermission } from "./access";
import { commitAudited } from "./audit";
import { getDb, type Database } from "./client";
import { now } from "./clock";
import { newId } from "./ids";
import { getRevision, listRevisions, type RevisionRef } from "./revision";
import {
  binding,
  model,
  neighbour,
  net,
  netClass,
  part,
  revision,
  ruleSet,
  stackup,
  stackupLayer,
} from "./schema";
import { guard, GuardError, type Statement } from "./unit";

/** What a revision holds, row by row; each row gets a new id and keeps its lineage. */
const HELD = [stackupLayer, netClass, model, binding, part, net, neighbour] as const;

/**
 * Starts a new draft as a copy of the newest release.
 * @throws NotFoundError
 * @throws RefusedError where the project has a draft already or is archived
 */
export async function startDraft(actor: Actor, projectId: string): Promise<RevisionRef> {
  requirePermission(actor, "draft:edit", "This project");
  const [newest, ...older] = await listRevisions(actor, projectId);
  const draft = [newest, ...older].find((row) => row?.state === "draft");
  if (!newest || draft) throw draftExists(draft?.letter ?? "");
  if (newest.archived)
    throw new RefusedError(`${newest.projectName} is archived. Restore it to go on with it.`, "archived");
  const db = await getDb();
  const made = { id: newId(), letter: nextLetter(newest.letter) };
  const copies = await Promise.all(HELD.map((table) => copyRows(db, table, newest, made.id)));
  try {
    await commitAudited(
      actor,
      [
        guard(
          db,
          sql`not exists (select 1 from ${revision} where ${revision.projectId} = ${projectId} and ${revision.state} = 'draft')`,
        ),
        db.insert(revision).values({
          ...made,
          teamId: actor.teamId,
          projectId,
          state: "draft",
          parentRevisionId: newest.id,
          createdAt: now(),
          createdBy: actor.userId,
        }),
        copyHead(db, stackup, newest, made.id),
        copyHead(db, ruleSet, newest, made.id),
        ...copies.flat(),
      ],
      {
        action: "revision.start",
        subjectKind: "revision",
        subjectId: made.id,
        projectId,
        detail: { revision: made.letter, copyOf: newest.letter },
      },
    );
  } catch (error) {
    if (error instanceof GuardError) throw draftExists(made.letter);
    throw error;
  }
  return getRevision(actor, made.id);
}

/** A, B … Z, AA, AB … */
export function nextLetter(letter: string): string {
  const head = letter.slice(0, -1);
  const last = letter.at(-1);
  if (last === undefined) return "A";
  return last === "Z" ? `${nextLetter(head)}A` : `${head}${String.fromCharCode(last.charCodeAt(0) + 1)}`;
}

async function copyRows(
  db: Database,
  table: (typeof HELD)[number],
  from: RevisionRef,
  to: string,
): Promise<Statement[]> {
  const rows = await db
    .select({ id: table.id })
    .from(table)
    .where(and(eq(table.teamId, from.teamId), eq(table.revisionId, from.id)));
  if (rows.length === 0) return [];
  const others = sql.raw(columnsOf(table, ["id", "revision_id"]));
  const ids = JSON.stringify(rows.map((row) => [row.id, newId()]));
  return [
    db.run(sql`
      insert into ${table} (id, revision_id, ${others})
      select j.value ->> 1, ${to}, ${others} from json_each(${ids}) as j
      join ${table} as held on held.id = j.value ->> 0`),
  ];
}

function copyHead(
  db: Database,
  table: typeof stackup | typeof ruleSet,
  from: RevisionRef,
  to: string,
): Statement {
  const others = sql.raw(columnsOf(table, ["revision_id"]));
  return db.run(sql`
    insert into ${table} (revision_id, ${others})
    select ${to}, ${others} from ${table} where revision_id = ${from.id} and team_id = ${from.teamId}`);
}

function columnsOf(table: SQLiteTable, except: readonly string[]): string {
  return Object.values(getTableColumns(table))
    .map((column) => column.name)
    .filter((name) => !except.includes(name))
    .map((name) => `"${name}"`)
    .join(", ");
}

function draftExists(letter: string): RefusedError {
  return new RefusedError(
    `Revision ${letter} is a draft already. Release it before you start another.`,
    "draft-exists",
  );
}
