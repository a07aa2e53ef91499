import "server-only";
import { and, desc, eq, sql, type SQL } from "drizzle-orm";
import type { Actor } from "@/lib/schemas/actor";
import { NotFoundError, RefusedError } from "@/lib/schemas/errors";
import type { RevisionSummary } from "@/lib/schemas/project";
import type { Permission } from "@/lib/schemas/role";
import { within } from "./access";
import { getDb } from "./client";
import { project, revision } from "./schema";

/** A revision with what one needs of its project; in hand only after the actor's team and role were checked. */
export interface RevisionRef extends RevisionSummary {
  teamId: string;
  projectId: string;
  projectName: string;
  projectUnit: "mm" | "mil";
  projectVersion: number;
  archived: boolean;
  editCount: number;
  parentRevisionId: string | null;
  snapshotHash: string | null;
  createdBy: string;
}

/** The revisions of a project, the newest first. */
export async function listRevisions(actor: Actor, projectId: string): Promise<RevisionRef[]> {
  const rows = await readRevisions(actor, "project:read", eq(revision.projectId, projectId));
  if (rows.length === 0) throw new NotFoundError("This project");
  return rows;
}

/**
 * The revision of this letter; without one the draft, or the newest release where there is no draft.
 * @throws NotFoundError
 */
export async function findRevision(
  actor: Actor,
  projectId: string,
  letter?: string | null,
): Promise<RevisionRef> {
  const rows = await listRevisions(actor, projectId);
  const found = letter
    ? rows.find((row) => row.letter === letter)
    : (rows.find((row) => row.state === "draft") ?? rows[0]);
  if (!found) throw new NotFoundError(`Revision ${letter ?? ""} of this project`);
  return found;
}

/** @throws NotFoundError */
export async function getRevision(actor: Actor, revisionId: string): Promise<RevisionRef> {
  const [found] = await readRevisions(actor, "project:read", eq(revision.id, revisionId));
  if (!found) throw new NotFoundError("This revision");
  return found;
}

/**
 * The draft of a project, to be edited.
 * @throws NotFoundError where project, team or role do not fit
 * @throws RefusedError where there is no draft or the project is archived
 */
export async function getDraft(
  actor: Actor,
  projectId: string,
  permission: Permission = "draft:edit",
): Promise<RevisionRef> {
  const rows = await readRevisions(actor, permission, eq(revision.projectId, projectId));
  const newest = rows[0];
  if (!newest) throw new NotFoundError("This project");
  if (newest.archived)
    throw new RefusedError(`${newest.projectName} is archived. Restore it to go on with it.`, "archived");
  const draft = rows.find((row) => row.state === "draft");
  if (!draft)
    throw new RefusedError(
      `Revision ${newest.letter} is released and stays as it is. Start a new draft to change something.`,
      "no-draft",
    );
  return draft;
}

/** Holds while the revision is the actor's team's, a draft, and of a project that is not archived. */
export function stillDraft(actor: Actor, revisionId: string): SQL {
  return sql`exists (
    select 1 from ${revision} join ${project} on ${project.id} = ${revision.projectId}
    where ${revision.id} = ${revisionId} and ${revision.teamId} = ${actor.teamId}
      and ${revision.state} = 'draft' and ${project.archivedAt} is null)`;
}

async function readRevisions(actor: Actor, permission: Permission, which: SQL): Promise<RevisionRef[]> {
  const db = await getDb();
  const rows = await db
    .select({ revision, project })
    .from(revision)
    .innerJoin(project, eq(project.id, revision.projectId))
    .where(and(which, within(actor, permission, revision.teamId), within(actor, permission, project.teamId)))
    .orderBy(desc(revision.createdAt), desc(revision.id));
  return rows.map((row) => ({
    id: row.revision.id,
    letter: row.revision.letter,
    state: row.revision.state,
    createdAt: row.revision.createdAt,
    releasedAt: row.revision.releasedAt,
    teamId: row.revision.teamId,
    projectId: row.project.id,
    projectName: row.project.name,
    projectUnit: row.project.unit,
    projectVersion: row.project.version,
    archived: row.project.archivedAt !== null,
    editCount: row.revision.editCount,
    parentRevisionId: row.revision.parentRevisionId,
    snapshotHash: row.revision.snapshotHash,
    createdBy: row.revision.createdBy,
  }));
}
