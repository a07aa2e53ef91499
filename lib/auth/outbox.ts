import "server-only";
import { listOutbox, type OutboxMessage } from "@/lib/db/outbox";
import { mailStaysLocal } from "@/lib/email/transport";
import { isTrial } from "./environment";

/** The messages kept here; null where the page that shows them must not exist: they hold links that sign people in. */
export async function readOutboxPage(): Promise<OutboxMessage[] | null> {
  return isTrial() && mailStaysLocal() ? listOutbox() : null;
}
