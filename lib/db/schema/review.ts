import { index, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { atColumn, idColumn, teamColumn, versionColumn } from "./columns";
import { project, revision } from "./project";
import { run } from "./run";

export const flag = sqliteTable(
  "flag",
  {
    id: idColumn(),
    teamId: teamColumn(),
    projectId: text("project_id")
      .notNull()
      .references(() => project.id, { onDelete: "cascade" }),
    subjectKind: text("subject_kind", { enum: ["problem", "path", "layer"] }).notNull(),
    subjectLineageId: text("subject_lineage_id").notNull(),
    mechanism: text("mechanism"),
    title: text("title").notNull(),
    state: text("state", { enum: ["open", "resolved"] }).notNull(),
    assigneeUserId: text("assignee_user_id"),
    createdBy: text("created_by").notNull(),
    createdAt: atColumn("created_at").notNull(),
    resolvedAt: atColumn("resolved_at"),
    resolvedBy: text("resolved_by"),
    version: versionColumn(),
  },
  (t) => [
    index("flag_project").on(t.projectId, t.state),
    index("flag_subject").on(t.projectId, t.subjectLineageId),
  ],
);

export const flagEntry = sqliteTable(
  "flag_entry",
  {
    id: idColumn(),
    teamId: teamColumn(),
    flagId: text("flag_id")
      .notNull()
      .references(() => flag.id, { onDelete: "cascade" }),
    authorId: text("author_id").notNull(),
    at: atColumn("at").notNull(),
    comment: text("comment").notNull(),
  },
  (t) => [index("flag_entry_flag").on(t.flagId, t.at)],
);

/** Bound to the value it waived; checked again on every run. */
export const waiver = sqliteTable(
  "waiver",
  {
    id: idColumn(),
    teamId: teamColumn(),
    projectId: text("project_id")
      .notNull()
      .references(() => project.id, { onDelete: "cascade" }),
    pathLineageId: text("path_lineage_id").notNull(),
    pathName: text("path_name").notNull(),
    mechanism: text("mechanism").notNull(),
    /** the run it was granted on, and what it waived: rule, value, limit, unit, margin, corner */
    runId: text("run_id")
      .notNull()
      .references(() => run.id),
    waived: text("waived", { mode: "json" })
      .$type<
        { rule: string; value: number; limit: number; unit: string; margin: number; corner: string | null }[]
      >()
      .notNull(),
    worstMargin: real("worst_margin"),
    reason: text("reason").notNull(),
    expiresAt: atColumn("expires_at").notNull(),
    createdBy: text("created_by").notNull(),
    createdAt: atColumn("created_at").notNull(),
    revokedAt: atColumn("revoked_at"),
    revokedBy: text("revoked_by"),
  },
  (t) => [index("waiver_project").on(t.projectId, t.pathLineageId)],
);

export const noDataAcceptance = sqliteTable(
  "no_data_acceptance",
  {
    id: idColumn(),
    teamId: teamColumn(),
    projectId: text("project_id")
      .notNull()
      .references(() => project.id, { onDelete: "cascade" }),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    missing: text("missing").notNull(),
    reason: text("reason").notNull(),
    createdBy: text("created_by").notNull(),
    createdAt: atColumn("created_at").notNull(),
    revokedAt: atColumn("revoked_at"),
  },
  (t) => [uniqueIndex("no_data_acceptance_once").on(t.revisionId, t.missing, t.revokedAt)],
);

/** A reviewer's signature on one run of one revision. */
export const signOff = sqliteTable(
  "sign_off",
  {
    id: idColumn(),
    teamId: teamColumn(),
    projectId: text("project_id")
      .notNull()
      .references(() => project.id, { onDelete: "cascade" }),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    runId: text("run_id")
      .notNull()
      .references(() => run.id),
    inputHash: text("input_hash").notNull(),
    signedBy: text("signed_by").notNull(),
    signedAt: atColumn("signed_at").notNull(),
    remark: text("remark").notNull().default(""),
    withdrawnAt: atColumn("withdrawn_at"),
  },
  (t) => [index("sign_off_revision").on(t.revisionId)],
);
