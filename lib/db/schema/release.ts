import { index, integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { atColumn, idColumn, teamColumn } from "./columns";
import type { ImpedanceNote } from "./documents";
import { project, revision } from "./project";
import { run } from "./run";

export const release = sqliteTable(
  "release",
  {
    id: idColumn(),
    teamId: teamColumn(),
    projectId: text("project_id")
      .notNull()
      .references(() => project.id, { onDelete: "cascade" }),
    revisionId: text("revision_id")
      .notNull()
      .references(() => revision.id),
    runId: text("run_id")
      .notNull()
      .references(() => run.id),
    letter: text("letter").notNull(),
    title: text("title").notNull(),
    /** chunks of the frozen snapshot, in order; released pages read only these */
    snapshotChunks: text("snapshot_chunks", { mode: "json" })
      .$type<{ name: string; sha256: string }[]>()
      .notNull(),
    snapshotHash: text("snapshot_hash").notNull(),
    note: text("note", { mode: "json" }).$type<ImpedanceNote>().notNull(),
    noteHash: text("note_hash").notNull(),
    signOffId: text("sign_off_id").notNull(),
    releasedBy: text("released_by").notNull(),
    releasedAt: atColumn("released_at").notNull(),
  },
  (t) => [uniqueIndex("release_revision").on(t.revisionId), index("release_team").on(t.teamId)],
);

export const releaseRecipient = sqliteTable(
  "release_recipient",
  {
    id: idColumn(),
    teamId: teamColumn(),
    releaseId: text("release_id")
      .notNull()
      .references(() => release.id, { onDelete: "cascade" }),
    name: text("name").notNull(),
    email: text("email").notNull(),
    company: text("company").notNull().default(""),
    /** SHA-256 of the link's token; the token itself is only in the message */
    tokenHash: text("token_hash"),
    tokenExpiresAt: atColumn("token_expires_at"),
    revokedAt: atColumn("revoked_at"),
    viewedAt: atColumn("viewed_at"),
    downloadedAt: atColumn("downloaded_at"),
    acknowledgedAt: atColumn("acknowledged_at"),
    acknowledgedBy: text("acknowledged_by"),
    acknowledgement: text("acknowledgement").notNull().default(""),
    sends: integer("sends").notNull().default(0),
  },
  (t) => [
    uniqueIndex("release_recipient_email").on(t.releaseId, t.email),
    uniqueIndex("release_recipient_token").on(t.tokenHash),
  ],
);
