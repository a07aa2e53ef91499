import { sql } from "drizzle-orm";
import { index, real, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { atColumn, idColumn, teamColumn, versionColumn } from "./columns";
import type { MaterialDoc } from "./documents";

/** A team's own laminates, prepregs, foils and masks, beside the generic library. */
export const material = sqliteTable(
  "material",
  {
    id: idColumn(),
    teamId: teamColumn(),
    name: text("name").notNull(),
    kind: text("kind", { enum: ["laminate", "prepreg", "foil", "mask"] }).notNull(),
    /** typed values and units: the truth */
    doc: text("doc", { mode: "json" }).$type<MaterialDoc>().notNull(),
    /** derived from doc */
    thickness_m: real("thickness_m"),
    roughness_m: real("roughness_m"),
    dkFrequency_hz: real("dk_frequency_hz"),
    version: versionColumn(),
    createdAt: atColumn("created_at").notNull(),
    createdBy: text("created_by").notNull(),
    updatedAt: atColumn("updated_at").notNull(),
    /** set: taken away, and can be brought back */
    removedAt: atColumn("removed_at"),
  },
  (t) => [
    uniqueIndex("material_team_name")
      .on(t.teamId, t.name)
      .where(sql`removed_at is null`),
    index("material_team").on(t.teamId, t.kind),
  ],
);
