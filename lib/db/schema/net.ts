import { blob, index, integer, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { atColumn, idColumn, teamColumn, versionColumn } from "./columns";
import type { NetDoc, PartDoc } from "./documents";
import { revision } from "./project";

export const net = sqliteTable(
  "net",
  {
    id: idColumn(),
    lineageId: text("lineage_id").notNull(),
    teamId: teamColumn(),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    name: text("name").notNull(),
    classLineageId: text("class_lineage_id"),
    scope: text("scope", { enum: ["in", "out", "incomplete"] }).notNull(),
    scopeKind: text("scope_kind").notNull().default("signal"),
    /** the whole net as checked; the columns beside it are for lists */
    doc: text("doc", { mode: "json" }).$type<NetDoc>().notNull(),
    pinCount: integer("pin_count").notNull(),
    sectionCount: integer("section_count").notNull(),
    viaCount: integer("via_count").notNull(),
    length_m: real("length_m").notNull(),
    layers: text("layers").notNull().default(""),
    version: versionColumn(),
  },
  (t) => [
    uniqueIndex("net_lineage").on(t.revisionId, t.lineageId),
    uniqueIndex("net_name").on(t.revisionId, t.name),
    index("net_team").on(t.teamId),
  ],
);

export const part = sqliteTable(
  "part",
  {
    id: idColumn(),
    lineageId: text("lineage_id").notNull(),
    teamId: teamColumn(),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    reference: text("reference").notNull(),
    partNumber: text("part_number").notNull().default(""),
    kind: text("kind").notNull(),
    doc: text("doc", { mode: "json" }).$type<PartDoc>().notNull(),
  },
  (t) => [uniqueIndex("part_reference").on(t.revisionId, t.reference), index("part_team").on(t.teamId)],
);

export const neighbour = sqliteTable(
  "neighbour",
  {
    id: idColumn(),
    teamId: teamColumn(),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    net: text("net").notNull(),
    neighbour: text("neighbour").notNull(),
    layer: text("layer").notNull(),
    gapValue: text("gap_value").notNull(),
    gapUnit: text("gap_unit").notNull(),
    gap_m: real("gap_m").notNull(),
    parallelValue: text("parallel_value").notNull(),
    parallelUnit: text("parallel_unit").notNull(),
    parallel_m: real("parallel_m").notNull(),
  },
  (t) => [index("neighbour_revision_net").on(t.revisionId, t.net)],
);

/** One upload on its way in: parsed, shown, confirmed or dropped. */
export const importBatch = sqliteTable(
  "import_batch",
  {
    id: idColumn(),
    teamId: teamColumn(),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    kind: text("kind", { enum: ["net list", "section list", "parts list", "neighbour list"] }).notNull(),
    fileName: text("file_name").notNull(),
    state: text("state", { enum: ["parsed", "applying", "applied", "cancelled", "failed"] }).notNull(),
    mapping: text("mapping", { mode: "json" }).$type<unknown>().notNull(),
    /** the text as received, gzip */
    source: blob("source", { mode: "buffer" }),
    report: text("report", { mode: "json" }).$type<unknown>(),
    total: integer("total").notNull().default(0),
    done: integer("done").notNull().default(0),
    createdBy: text("created_by").notNull(),
    createdAt: atColumn("created_at").notNull(),
    finishedAt: atColumn("finished_at"),
    error: text("error"),
  },
  (t) => [index("import_batch_revision").on(t.revisionId, t.createdAt)],
);
