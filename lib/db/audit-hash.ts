import "server-only";
import { createHash } from "node:crypto";
import { canonicalJson } from "@/lib/schemas/canonical-json";

/** What an audit entry says, with its place in the chain. */
export interface ChainedEntry {
  id: string;
  teamId: string;
  seq: number;
  at: number;
  actorId: string;
  actorName: string;
  action: string;
  subjectKind: string;
  subjectId: string | null;
  projectId: string | null;
  detail: Record<string, unknown>;
  previousHash: string;
}

/** Hash of the entry before the first. */
export const CHAIN_START = "0".repeat(64);

/** SHA-256 over the entry and the hash before it: whoever alters one entry must rewrite all that follow. */
export function auditHash(entry: ChainedEntry): string {
  const {
    id,
    teamId,
    seq,
    at,
    actorId,
    actorName,
    action,
    subjectKind,
    subjectId,
    projectId,
    detail,
    previousHash,
  } = entry;
  return createHash("sha256")
    .update(
      canonicalJson({
        id,
        teamId,
        seq,
        at,
        actorId,
        actorName,
        action,
        subjectKind,
        subjectId,
        projectId,
        detail,
        previousHash,
      }),
    )
    .digest("hex");
}
