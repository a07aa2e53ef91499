import "server-only";
import { and, asc, desc, eq, isNull, sql } from "drizzle-orm";
import { can, type Actor } from "@/lib/schemas/actor";
import { ConflictError, NotFoundError, RefusedError } from "@/lib/schemas/errors";
import type { Subject } from "@/lib/schemas/review";
import { commitAudited, recordAudit } from "./audit";
import { getDb } from "./client";
import { now } from "./clock";
import { newId } from "./ids";
import { flag, flagEntry, member, pathResult, problem, project, run, user } from "./schema";

export type FlagRow = typeof flag.$inferSelect;

export interface FlagView extends FlagRow {
  authorName: string | null;
  assigneeName: string | null;
  entryCount: number;
}

export interface FlagEntryView {
  id: string;
  at: number;
  comment: string;
  authorId: string;
  authorName: string | null;
}

/** Open flags first, then the newest. */
export async function listFlags(actor: Actor, projectId: string): Promise<FlagView[]> {
  if (!can(actor, "project:read")) throw new NotFoundError("The project");
  const db = await getDb();
  const rows = await db
    .select({
      flag,
      authorName: sql<string | null>`(SELECT name FROM ${user} WHERE id = ${flag.createdBy})`,
      assigneeName: sql<string | null>`(SELECT name FROM ${user} WHERE id = ${flag.assigneeUserId})`,
      entryCount: sql<number>`(SELECT count(*) FROM ${flagEntry} WHERE flag_id = "flag"."id")`,
    })
    .from(flag)
    .where(and(eq(flag.projectId, projectId), eq(flag.teamId, actor.teamId)))
    .orderBy(asc(flag.state), desc(flag.createdAt));
  return rows.map(({ flag: row, ...names }) => ({ ...row, ...names }));
}

export async function getFlag(
  actor: Actor,
  projectId: string,
  flagId: string,
): Promise<{ flag: FlagView; entries: FlagEntryView[] }> {
  const found = (await listFlags(actor, projectId)).find((row) => row.id === flagId);
  if (!found) throw new NotFoundError("The flag");
  const db = await getDb();
  const entries = await db
    .select({
      id: flagEntry.id,
      at: flagEntry.at,
      comment: flagEntry.comment,
      authorId: flagEntry.authorId,
      authorName: sql<string | null>`(SELECT name FROM ${user} WHERE id = ${flagEntry.authorId})`,
    })
    .from(flagEntry)
    .where(and(eq(flagEntry.flagId, flagId), eq(flagEntry.teamId, actor.teamId)))
    .orderBy(asc(flagEntry.at));
  return { flag: found, entries };
}

/** Marks a problem, path or layer with a first comment and, if wanted, somebody to look after it. */
export async function raiseFlag(
  actor: Actor,
  projectId: string,
  input: { subject: Subject; title: string; comment: string; assigneeUserId: string | null },
): Promise<string> {
  if (!can(actor, "review:flag")) throw new NotFoundError("The project");
  await requireProject(actor, projectId);
  await requireAssignee(actor, projectId, input.assigneeUserId);
  const db = await getDb();
  const id = newId();
  const at = now();
  const statements = [
    db.insert(flag).values({
      id,
      teamId: actor.teamId,
      projectId,
      subjectKind: input.subject.kind,
      subjectLineageId: input.subject.lineageId,
      mechanism: input.subject.mechanism,
      title: input.title,
      state: "open",
      assigneeUserId: input.assigneeUserId,
      createdBy: actor.userId,
      createdAt: at,
    }),
    db.insert(flagEntry).values({
      id: newId(),
      teamId: actor.teamId,
      flagId: id,
      authorId: actor.userId,
      at,
      comment: input.comment,
    }),
  ];
  await commitAudited(actor, statements, {
    action: "flag.raise",
    subjectKind: "flag",
    subjectId: id,
    projectId,
    detail: { title: input.title },
  });
  return id;
}

export async function commentOnFlag(
  actor: Actor,
  projectId: string,
  flagId: string,
  comment: string,
): Promise<void> {
  if (!can(actor, "review:comment")) throw new NotFoundError("The flag");
  await getFlag(actor, projectId, flagId);
  const db = await getDb();
  await db
    .insert(flagEntry)
    .values({ id: newId(), teamId: actor.teamId, flagId, authorId: actor.userId, at: now(), comment });
}

export async function updateFlag(
  actor: Actor,
  projectId: string,
  flagId: string,
  change: { version: number; state?: "open" | "resolved"; assigneeUserId?: string | null },
): Promise<void> {
  if (!can(actor, "review:flag")) throw new NotFoundError("The flag");
  const { flag: current } = await getFlag(actor, projectId, flagId);
  if (change.assigneeUserId) await requireAssignee(actor, projectId, change.assigneeUserId);
  const db = await getDb();
  const resolved = change.state === "resolved";
  const [changed] = await db
    .update(flag)
    .set({
      ...(change.state
        ? {
            state: change.state,
            resolvedAt: resolved ? now() : null,
            resolvedBy: resolved ? actor.userId : null,
          }
        : {}),
      ...(change.assigneeUserId !== undefined ? { assigneeUserId: change.assigneeUserId } : {}),
      version: sql`${flag.version} + 1`,
    })
    .where(
      and(
        eq(flag.id, flagId),
        eq(flag.teamId, actor.teamId),
        eq(flag.projectId, projectId),
        eq(flag.version, change.version),
      ),
    )
    .returning({ id: flag.id });
  if (!changed)
    throw new ConflictError("Somebody changed this flag meanwhile. Look at it again.", current, [
      "state",
      "assignee",
    ]);
  if (change.state)
    await recordAudit(actor, {
      action: change.state === "resolved" ? "flag.resolve" : "flag.reopen",
      subjectKind: "flag",
      subjectId: flagId,
      projectId,
      detail: { title: current.title },
    });
}

export async function countOpenFlags(actor: Actor, projectId: string): Promise<number> {
  if (!can(actor, "project:read")) throw new NotFoundError("The project");
  const db = await getDb();
  const [row] = await db
    .select({ count: sql<number>`count(*)` })
    .from(flag)
    .where(and(eq(flag.projectId, projectId), eq(flag.teamId, actor.teamId), eq(flag.state, "open")));
  return row?.count ?? 0;
}

/** What a subject is called, from the newest run that knows it. */
export async function subjectTitle(
  actor: Actor,
  projectId: string,
  subject: Subject,
): Promise<string | null> {
  if (subject.kind === "layer") return null;
  const db = await getDb();
  if (subject.kind === "problem" && subject.mechanism) {
    const [row] = await db
      .select({ title: problem.title, name: problem.pathName })
      .from(problem)
      .innerJoin(run, eq(run.id, problem.runId))
      .where(
        and(
          eq(run.projectId, projectId),
          eq(problem.teamId, actor.teamId),
          eq(problem.pathId, subject.lineageId),
          eq(problem.mechanism, subject.mechanism),
        ),
      )
      .orderBy(desc(run.number))
      .limit(1);
    return row ? `${row.name}: ${row.title}` : null;
  }
  const [row] = await db
    .select({ name: pathResult.name })
    .from(pathResult)
    .innerJoin(run, eq(run.id, pathResult.runId))
    .where(
      and(
        eq(run.projectId, projectId),
        eq(pathResult.teamId, actor.teamId),
        eq(pathResult.pathId, subject.lineageId),
      ),
    )
    .orderBy(desc(run.number))
    .limit(1);
  return row?.name ?? null;
}

/** People of the team who may be given a flag: everybody but manufacturers. */
export async function listAssignees(
  actor: Actor,
  projectId: string,
): Promise<{ userId: string; name: string; role: string }[]> {
  if (!can(actor, "project:read")) throw new NotFoundError("The project");
  await requireProject(actor, projectId);
  const db = await getDb();
  return db
    .select({ userId: user.id, name: user.name, role: member.role })
    .from(member)
    .innerJoin(user, eq(user.id, member.userId))
    .where(and(eq(member.organizationId, actor.teamId), sql`${member.role} <> 'manufacturer'`))
    .orderBy(asc(user.name));
}

async function requireAssignee(actor: Actor, projectId: string, userId: string | null): Promise<void> {
  if (userId === null) return;
  const people = await listAssignees(actor, projectId);
  if (!people.some((person) => person.userId === userId))
    throw new RefusedError(
      "That person is not in this team, or cannot see the board. Choose another.",
      "assignee",
      {
        assigneeUserId: "Choose somebody of the team.",
      },
    );
}

/** Name and address of somebody of the team, for a message. */
export async function findColleague(
  actor: Actor,
  userId: string,
): Promise<{ name: string; email: string } | null> {
  const db = await getDb();
  const [row] = await db
    .select({ name: user.name, email: user.email })
    .from(member)
    .innerJoin(user, eq(user.id, member.userId))
    .where(and(eq(member.organizationId, actor.teamId), eq(member.userId, userId)));
  return row ?? null;
}

async function requireProject(actor: Actor, projectId: string): Promise<void> {
  const db = await getDb();
  const [row] = await db
    .select({ id: project.id })
    .from(project)
    .where(and(eq(project.id, projectId), eq(project.teamId, actor.teamId), isNull(project.archivedAt)));
  if (!row) throw new NotFoundError("The project");
}
