import "server-only";
import { v7 } from "uuid";
import { now } from "./clock";

const holder = globalThis as typeof globalThis & { ringfenceIds?: { at: number; seq: number } };

/** A new id: UUIDv7 text. Ids made later in one process sort later, within one millisecond too. */
export function newId(): string {
  const last = (holder.ringfenceIds ??= { at: 0, seq: 0 });
  const at = Math.max(now(), last.at);
  last.seq = at === last.at ? last.seq + 1 : 0;
  last.at = at;
  return v7({ msecs: at, seq: last.seq });
}
