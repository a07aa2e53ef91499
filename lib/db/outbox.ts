import "server-only";
import { desc } from "drizzle-orm";
import { getDb } from "./client";
import { now } from "./clock";
import { newId } from "./ids";
import { outboxMessage } from "./schema";

/** Mail belongs to no team, so these functions take no actor; the page that lists it decides whether it exists. */

export type OutboxMessage = typeof outboxMessage.$inferSelect;

export async function keepMessage(message: Omit<OutboxMessage, "id" | "at">): Promise<void> {
  const db = await getDb();
  await db.insert(outboxMessage).values({ id: newId(), at: now(), ...message });
}

/** The messages kept here, newest first. */
export async function listOutbox(limit = 100): Promise<OutboxMessage[]> {
  const db = await getDb();
  return db.select().from(outboxMessage).orderBy(desc(outboxMessage.at), desc(outboxMessage.id)).limit(limit);
}
