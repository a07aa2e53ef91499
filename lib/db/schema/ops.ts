import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { atColumn, idColumn, teamColumn } from "./columns";

/** Who did what to which thing when; append-only, chained per team by hash. */
export const auditEntry = sqliteTable(
  "audit_entry",
  {
    id: idColumn(),
    teamId: teamColumn(),
    seq: integer("seq").notNull(),
    at: atColumn("at").notNull(),
    actorId: text("actor_id").notNull(),
    actorName: text("actor_name").notNull(),
    action: text("action").notNull(),
    subjectKind: text("subject_kind").notNull(),
    subjectId: text("subject_id"),
    projectId: text("project_id"),
    detail: text("detail", { mode: "json" }).$type<Record<string, unknown>>().notNull(),
    previousHash: text("previous_hash").notNull(),
    hash: text("hash").notNull(),
  },
  (t) => [uniqueIndex("audit_entry_seq").on(t.teamId, t.seq), index("audit_entry_at").on(t.teamId, t.at)],
);

export const userPreference = sqliteTable("user_preference", {
  userId: text("user_id").primaryKey(),
  lengthUnit: text("length_unit", { enum: ["mm", "mil"] })
    .notNull()
    .default("mm"),
  theme: text("theme", { enum: ["system", "light", "dark"] })
    .notNull()
    .default("system"),
});

/** Attempts per account, so that a forged client address gains nothing. */
export const accountAttempt = sqliteTable(
  "account_attempt",
  {
    account: text("account").notNull(),
    action: text("action").notNull(),
    windowStart: atColumn("window_start").notNull(),
    count: integer("count").notNull(),
  },
  (t) => [primaryKey({ columns: [t.account, t.action, t.windowStart] })],
);

/** Mail that was not sent anywhere: the local outbox. */
export const outboxMessage = sqliteTable(
  "outbox_message",
  {
    id: idColumn(),
    at: atColumn("at").notNull(),
    recipient: text("recipient").notNull(),
    subject: text("subject").notNull(),
    text: text("text").notNull(),
    html: text("html").notNull(),
  },
  (t) => [index("outbox_message_at").on(t.at)],
);
