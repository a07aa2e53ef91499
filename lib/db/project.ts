import "server-only";
import { and, asc, desc, eq, isNotNull, isNull, sql } from "drizzle-orm";
import type { z } from "zod";
import { stackupTemplates } from "@/lib/si/stackup";
import type { Actor } from "@/lib/schemas/actor";
import { ConflictError, NotFoundError, RefusedError } from "@/lib/schemas/errors";
import { projectInput, projectUpdate, type ProjectSummary } from "@/lib/schemas/project";
import { ruleSetDoc } from "@/lib/schemas/rule-set";
import { stackupDoc } from "@/lib/schemas/stackup";
import { defaultRuleSet } from "@/lib/si/rules/defaults";
import { requirePermission, within } from "./access";
import { commitAudited } from "./audit";
import { getDb } from "./client";
import { now } from "./clock";
import { newId } from "./ids";
import { net, project, revision, ruleSet, stackup } from "./schema";
import { identify, layerStatements } from "./stackup";
import { guard, GuardError, isUniqueFailure } from "./unit";

export type ProjectInput = z.input<typeof projectInput>;
export type ProjectUpdate = z.input<typeof projectUpdate>;
export interface ProjectRow extends ProjectSummary {
  archivedAt: number | null;
}

/** The team's projects, the latest changed first; the archived ones instead where asked for. */
export async function listProjects(actor: Actor, archived = false): Promise<ProjectRow[]> {
  requirePermission(actor, "project:read", "The list of projects");
  const db = await getDb();
  return db
    .select(summary)
    .from(project)
    .where(
      and(
        within(actor, "project:read", project.teamId),
        archived ? isNotNull(project.archivedAt) : isNull(project.archivedAt),
      ),
    )
    .orderBy(desc(project.updatedAt), asc(project.name));
}

/** @throws NotFoundError */
export async function getProject(actor: Actor, projectId: string): Promise<ProjectRow> {
  const db = await getDb();
  const [row] = await db
    .select(summary)
    .from(project)
    .where(and(within(actor, "project:read", project.teamId), eq(project.id, projectId)));
  if (!row) throw new NotFoundError("This project");
  return row;
}

/** Makes a project with its draft A: the template's stackup, or an empty one, and the default rules. */
export async function createProject(actor: Actor, input: ProjectInput): Promise<ProjectRow> {
  requirePermission(actor, "project:create", "The list of projects");
  const { template, ...fields } = projectInput.parse(input);
  const from =
    template === null
      ? { title: "Stackup", layers: [] }
      : stackupTemplates.find((entry) => entry.id === template);
  if (!from)
    throw new RefusedError(
      `There is no template "${template}". Choose one of: ${stackupTemplates.map((entry) => entry.id).join(", ")}.`,
      "unknown-template",
      { template: "Choose one of the templates." },
    );
  const doc = stackupDoc.parse({ name: from.title, layers: from.layers });
  const db = await getDb();
  const at = now();
  const id = newId();
  const draft = { id: newId(), teamId: actor.teamId };
  const head = { revisionId: draft.id, teamId: actor.teamId };
  await naming(fields.name, () =>
    commitAudited(
      actor,
      [
        db.insert(project).values({
          id,
          teamId: actor.teamId,
          ...fields,
          createdAt: at,
          createdBy: actor.userId,
          updatedAt: at,
        }),
        db.insert(revision).values({
          ...draft,
          projectId: id,
          letter: "A",
          state: "draft",
          createdAt: at,
          createdBy: actor.userId,
        }),
        db.insert(stackup).values({ ...head, name: doc.name }),
        ...layerStatements(db, draft, identify(doc, [])),
        db.insert(ruleSet).values({ ...head, doc: ruleSetDoc.parse(defaultRuleSet()) }),
      ],
      {
        action: "project.create",
        subjectKind: "project",
        subjectId: id,
        projectId: id,
        detail: { name: fields.name, template },
      },
    ),
  );
  return getProject(actor, id);
}

/** @throws ConflictError */
export async function updateProject(
  actor: Actor,
  projectId: string,
  input: ProjectUpdate,
): Promise<ProjectRow> {
  requirePermission(actor, "project:update", "This project");
  const { version, ...fields } = projectUpdate.parse(input);
  const present = await getProject(actor, projectId);
  await naming(fields.name, () =>
    writeProject(actor, present, version, { ...fields, updatedAt: now() }, "project.update", { ...fields }),
  );
  return getProject(actor, projectId);
}

/** Puts a project away: it is read as before, changed no more, and can be restored. */
export async function archiveProject(actor: Actor, projectId: string): Promise<void> {
  await setArchived(actor, projectId, now());
}

export async function restoreProject(actor: Actor, projectId: string): Promise<void> {
  await setArchived(actor, projectId, null);
}

async function setArchived(actor: Actor, projectId: string, archivedAt: number | null): Promise<void> {
  requirePermission(actor, "project:update", "This project");
  const present = await getProject(actor, projectId);
  if ((present.archivedAt === null) === (archivedAt === null)) return;
  const action = archivedAt === null ? "project.restore" : "project.archive";
  await writeProject(actor, present, present.version, { archivedAt }, action, { name: present.name });
}

async function writeProject(
  actor: Actor,
  present: ProjectRow,
  readVersion: number,
  columns: Partial<typeof project.$inferInsert>,
  action: string,
  detail: Record<string, unknown>,
): Promise<void> {
  const db = await getDb();
  const where = and(
    within(actor, "project:update", project.teamId),
    eq(project.id, present.id),
    eq(project.version, readVersion),
  );
  try {
    await commitAudited(
      actor,
      [
        guard(db, sql`exists (select 1 from ${project} where ${where})`),
        db
          .update(project)
          .set({ ...columns, version: readVersion + 1 })
          .where(where),
      ],
      { action, subjectKind: "project", subjectId: present.id, projectId: present.id, detail },
    );
  } catch (error) {
    if (!(error instanceof GuardError)) throw error;
    const current = await getProject(actor, present.id);
    throw new ConflictError(
      `${current.name} was changed after you opened it. Take the present one, or save yours over it.`,
      current,
      (["name", "description", "unit"] as const).filter(
        (field) => field in columns && current[field] !== columns[field],
      ),
    );
  }
}

// Columns in the fields of a select from one table are written without their table, so the outer one is named here.
const newest = (state: "draft" | "released") => sql<string | null>`(
  select r.letter from ${revision} r where r.project_id = "project"."id" and r.state = ${state}
  order by r.created_at desc, r.id desc limit 1)`;

const summary = {
  id: project.id,
  name: project.name,
  description: project.description,
  unit: project.unit,
  version: project.version,
  updatedAt: project.updatedAt,
  archivedAt: project.archivedAt,
  draftLetter: newest("draft"),
  releasedLetter: newest("released"),
  netCount: sql<number>`(
    select count(*) from ${net} n where n.revision_id = (
      select r.id from ${revision} r where r.project_id = "project"."id"
      order by r.created_at desc, r.id desc limit 1))`,
};

async function naming<T>(name: string, act: () => Promise<T>): Promise<T> {
  try {
    return await act();
  } catch (error) {
    if (!isUniqueFailure(error, "project.team_id, project.name")) throw error;
    const message = `There is a project named ${name} already, perhaps among the archived ones. Choose another name.`;
    throw new RefusedError(message, "name-taken", { name: message });
  }
}
