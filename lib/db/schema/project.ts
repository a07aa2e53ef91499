import { index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { ModelDoc, NetClassDoc, ProcessDoc, RuleSetDoc, StackupLayerDoc } from "./documents";
import { atColumn, idColumn, teamColumn, versionColumn } from "./columns";

export const project = sqliteTable(
  "project",
  {
    id: idColumn(),
    teamId: teamColumn(),
    name: text("name").notNull(),
    description: text("description").notNull().default(""),
    unit: text("unit", { enum: ["mm", "mil"] })
      .notNull()
      .default("mm"),
    version: versionColumn(),
    createdAt: atColumn("created_at").notNull(),
    createdBy: text("created_by").notNull(),
    updatedAt: atColumn("updated_at").notNull(),
    archivedAt: atColumn("archived_at"),
  },
  (t) => [uniqueIndex("project_team_name").on(t.teamId, t.name)],
);

export const revision = sqliteTable(
  "revision",
  {
    id: idColumn(),
    teamId: teamColumn(),
    projectId: text("project_id")
      .notNull()
      .references(() => project.id, { onDelete: "cascade" }),
    letter: text("letter").notNull(),
    state: text("state", { enum: ["draft", "released"] }).notNull(),
    parentRevisionId: text("parent_revision_id"),
    /** counts every edit of the draft; a run remembers the value it read */
    editCount: integer("edit_count").notNull().default(0),
    /** SHA-256 of the snapshot's index; set when released */
    snapshotHash: text("snapshot_hash"),
    createdAt: atColumn("created_at").notNull(),
    createdBy: text("created_by").notNull(),
    releasedAt: atColumn("released_at"),
  },
  (t) => [
    uniqueIndex("revision_project_letter").on(t.projectId, t.letter),
    index("revision_team").on(t.teamId),
  ],
);

export const stackup = sqliteTable("stackup", {
  revisionId: text("revision_id")
    .primaryKey()
    .references(() => revision.id, { onDelete: "cascade" }),
  teamId: teamColumn(),
  name: text("name").notNull(),
  /** what the fabricator's process holds; null until it was entered */
  process: text("process", { mode: "json" }).$type<ProcessDoc>(),
  version: versionColumn(),
});

export const stackupLayer = sqliteTable(
  "stackup_layer",
  {
    id: idColumn(),
    lineageId: text("lineage_id").notNull(),
    teamId: teamColumn(),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    position: integer("position").notNull(),
    kind: text("kind").notNull(),
    name: text("name").notNull(),
    /** typed values and units: the truth */
    doc: text("doc", { mode: "json" }).$type<StackupLayerDoc>().notNull(),
    /** derived from doc: finished thickness */
    thickness_m: real("thickness_m"),
  },
  (t) => [
    uniqueIndex("stackup_layer_position").on(t.revisionId, t.position),
    index("stackup_layer_team").on(t.teamId),
  ],
);

export const netClass = sqliteTable(
  "net_class",
  {
    id: idColumn(),
    lineageId: text("lineage_id").notNull(),
    teamId: teamColumn(),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    name: text("name").notNull(),
    doc: text("doc", { mode: "json" }).$type<NetClassDoc>().notNull(),
    targetImpedance_ohm: real("target_impedance_ohm"),
    version: versionColumn(),
  },
  (t) => [
    uniqueIndex("net_class_lineage").on(t.revisionId, t.lineageId),
    uniqueIndex("net_class_name").on(t.revisionId, t.name),
  ],
);

export const model = sqliteTable(
  "model",
  {
    id: idColumn(),
    lineageId: text("lineage_id").notNull(),
    teamId: teamColumn(),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    name: text("name").notNull(),
    doc: text("doc", { mode: "json" }).$type<ModelDoc>().notNull(),
    version: versionColumn(),
  },
  (t) => [
    uniqueIndex("model_lineage").on(t.revisionId, t.lineageId),
    uniqueIndex("model_name").on(t.revisionId, t.name),
  ],
);

/** Bindings are edited as one ordered list. */
export const binding = sqliteTable(
  "binding",
  {
    id: idColumn(),
    teamId: teamColumn(),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    position: integer("position").notNull(),
    referencePattern: text("reference_pattern").notNull(),
    partNumberPattern: text("part_number_pattern").notNull(),
    pinPattern: text("pin_pattern").notNull(),
    netPattern: text("net_pattern").notNull(),
    role: text("role").notNull(),
    modelLineageId: text("model_lineage_id"),
  },
  (t) => [index("binding_revision").on(t.revisionId, t.position)],
);

export const ruleSet = sqliteTable("rule_set", {
  revisionId: text("revision_id")
    .primaryKey()
    .references(() => revision.id, { onDelete: "cascade" }),
  teamId: teamColumn(),
  doc: text("doc", { mode: "json" }).$type<RuleSetDoc>().notNull(),
  bindingsVersion: integer("bindings_version").notNull().default(0),
  version: versionColumn(),
});

/** One edit of a draft: who, what, before and after; the record that undo and the "editor does not sign" rule read. */
export const edit = sqliteTable(
  "edit",
  {
    id: idColumn(),
    teamId: teamColumn(),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    actorId: text("actor_id").notNull(),
    at: atColumn("at").notNull(),
    /** stackup, class, model, bindings, rules, nets, parts, import, neighbours */
    entity: text("entity").notNull(),
    entityId: text("entity_id"),
    summary: text("summary").notNull(),
    /** null: cannot be undone (an import) */
    before: text("before", { mode: "json" }).$type<unknown>(),
    after: text("after", { mode: "json" }).$type<unknown>(),
    undoneAt: atColumn("undone_at"),
  },
  (t) => [index("edit_revision_at").on(t.revisionId, t.at), index("edit_team").on(t.teamId)],
);
