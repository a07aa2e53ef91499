import {
  blob,
  index,
  integer,
  primaryKey,
  real,
  sqliteTable,
  text,
  uniqueIndex,
} from "drizzle-orm/sqlite-core";
import { atColumn, idColumn, teamColumn } from "./columns";
import { project, revision } from "./project";

/** Content-addressed chunk of canonical JSON, gzip; named by the SHA-256 of the plain text. */
export const chunk = sqliteTable(
  "chunk",
  {
    teamId: teamColumn(),
    sha256: text("sha256").notNull(),
    bytes: integer("bytes").notNull(),
    content: blob("content", { mode: "buffer" }).notNull(),
  },
  (t) => [primaryKey({ columns: [t.teamId, t.sha256] })],
);

export const run = sqliteTable(
  "run",
  {
    id: idColumn(),
    teamId: teamColumn(),
    projectId: text("project_id")
      .notNull()
      .references(() => project.id, { onDelete: "cascade" }),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id, { onDelete: "cascade" }),
    number: integer("number").notNull(),
    state: text("state", { enum: ["queued", "running", "done", "cancelled", "failed"] }).notNull(),
    /** SHA-256 over the snapshot's chunk list */
    inputHash: text("input_hash").notNull(),
    /** chunk names in order: the frozen inputs */
    inputChunks: text("input_chunks", { mode: "json" }).$type<{ name: string; sha256: string }[]>().notNull(),
    engineVersion: text("engine_version").notNull(),
    runtimeVersion: text("runtime_version").notNull(),
    corners: text("corners", { mode: "json" }).$type<string[]>().notNull(),
    total: integer("total").notNull(),
    done: integer("done").notNull().default(0),
    counts: text("counts", { mode: "json" }).$type<Record<string, number>>(),
    createdBy: text("created_by").notNull(),
    createdAt: atColumn("created_at").notNull(),
    startedAt: atColumn("started_at"),
    finishedAt: atColumn("finished_at"),
    /** lease of the process that works on it */
    leaseUntil: atColumn("lease_until"),
    error: text("error"),
  },
  (t) => [
    uniqueIndex("run_project_number").on(t.projectId, t.number),
    index("run_team").on(t.teamId),
    index("run_state").on(t.state),
  ],
);

export const pathResult = sqliteTable(
  "path_result",
  {
    runId: text("run_id")
      .notNull()
      .references(() => run.id, { onDelete: "cascade" }),
    teamId: teamColumn(),
    pathId: text("path_id").notNull(),
    name: text("name").notNull(),
    className: text("class_name"),
    classLineageId: text("class_lineage_id"),
    driver: text("driver"),
    layers: text("layers").notNull().default(""),
    verdict: text("verdict", { enum: ["pass", "near", "fail", "no data"] }).notNull(),
    worstRule: text("worst_rule"),
    worstMargin: real("worst_margin"),
    /** SHA-256 over the resolved path, limits, corners and engine version */
    inputHash: text("input_hash").notNull(),
    /** every rule at every corner, compact */
    detail: blob("detail", { mode: "buffer" }).notNull(),
  },
  (t) => [primaryKey({ columns: [t.runId, t.pathId] }), index("path_result_verdict").on(t.runId, t.verdict)],
);

export const problem = sqliteTable(
  "problem",
  {
    id: idColumn(),
    runId: text("run_id")
      .notNull()
      .references(() => run.id, { onDelete: "cascade" }),
    teamId: teamColumn(),
    pathId: text("path_id").notNull(),
    pathName: text("path_name").notNull(),
    className: text("class_name"),
    mechanism: text("mechanism").notNull(),
    title: text("title").notNull(),
    verdict: text("verdict", { enum: ["near", "fail", "no data"] }).notNull(),
    severity: text("severity").notNull(),
    worstRule: text("worst_rule").notNull(),
    worstMargin: real("worst_margin"),
    /** margin ÷ limit, to compare across rules */
    worstShare: real("worst_share"),
    worstCorner: text("worst_corner"),
    failsAt: integer("fails_at").notNull(),
    ofCorners: integer("of_corners").notNull(),
    failsAtNominal: integer("fails_at_nominal", { mode: "boolean" }).notNull(),
    missing: text("missing"),
    cause: text("cause"),
    restsOnAssumed: integer("rests_on_assumed", { mode: "boolean" }).notNull(),
  },
  (t) => [
    uniqueIndex("problem_path_mechanism").on(t.runId, t.pathId, t.mechanism),
    index("problem_team").on(t.teamId),
  ],
);

export const finding = sqliteTable(
  "finding",
  {
    id: idColumn(),
    runId: text("run_id")
      .notNull()
      .references(() => run.id, { onDelete: "cascade" }),
    teamId: teamColumn(),
    pathId: text("path_id").notNull(),
    mechanism: text("mechanism").notNull(),
    rule: text("rule").notNull(),
    verdict: text("verdict", { enum: ["near", "fail", "no data"] }).notNull(),
    value: real("value"),
    limit: real("limit_value"),
    limitOrigin: text("limit_origin"),
    unit: text("unit").notNull(),
    margin: real("margin"),
    severity: text("severity").notNull(),
    counts: integer("counts", { mode: "boolean" }).notNull(),
    corner: text("corner"),
    pin: text("pin"),
    driver: text("driver"),
    edge: text("edge"),
    time_s: real("time_s"),
    failsAt: integer("fails_at").notNull(),
    ofCorners: integer("of_corners").notNull(),
    failsAtNominal: integer("fails_at_nominal", { mode: "boolean" }).notNull(),
    missing: text("missing"),
    cause: text("cause"),
    restsOnAssumed: integer("rests_on_assumed", { mode: "boolean" }).notNull(),
  },
  (t) => [index("finding_run_path").on(t.runId, t.pathId), index("finding_run_rule").on(t.runId, t.rule)],
);
