import { integer, text } from "drizzle-orm/sqlite-core";

/** UUIDv7 text. */
export const idColumn = () => text("id").primaryKey();
/** Every row carries its team; it is in every WHERE. */
export const teamColumn = () => text("team_id").notNull();
/** Integer milliseconds UTC. */
export const atColumn = (name: string) => integer(name, { mode: "number" });
export const versionColumn = () => integer("version").notNull().default(0);
