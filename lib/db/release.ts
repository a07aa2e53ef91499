import "server-only";
import { createHash, randomBytes } from "node:crypto";
import { and, desc, eq, gt, isNull, or, sql } from "drizzle-orm";
import { lineConflicts } from "@/lib/resolve/line-conflicts";
import { releaseBlockers } from "@/lib/resolve/release-blockers";
import { can, type Actor } from "@/lib/schemas/actor";
import { NotFoundError, RefusedError } from "@/lib/schemas/errors";
import type { ImpedanceNote, ReleaseBlocker, ReleaseInput } from "@/lib/schemas/release";
import { commitAudited } from "./audit";
import { getDb } from "./client";
import { now } from "./clock";
import { hasEdited } from "./edit";
import { newId } from "./ids";
import { listNetClasses } from "./net-class";
import { countOpenFlags } from "./review";
import { getDraft } from "./revision";
import { getRun, latestRun, listFailing, type RunRow } from "./run";
import { organization, project, release, releaseRecipient, revision, user } from "./schema";
import { getStackup } from "./stackup";
import { guard, GuardError } from "./unit";
import { coveredProblems, listAcceptances, listSignatures, missingInputs } from "./waiver";

export type ReleaseRow = typeof release.$inferSelect;
export type RecipientRow = typeof releaseRecipient.$inferSelect;

const LINK_MS = 30 * 86_400_000;

export interface Readiness {
  run: RunRow | null;
  blockers: ReleaseBlocker[];
  failing: number;
  waived: number;
  signature: { signerName: string | null; signedAt: number } | null;
}

/** What stands between the draft and its release, judged on its newest run. */
export async function releaseReadiness(
  actor: Actor,
  projectId: string,
  draftId: string,
  draftInputHash: string,
): Promise<Readiness> {
  const row = await latestRun(actor, draftId);
  const flags = await countOpenFlags(actor, projectId);
  if (!row || row.state !== "done") {
    const blockers = releaseBlockers({
      run: row,
      draftInputHash,
      judgedPaths: 0,
      failuresNotWaived: 0,
      missingNotAccepted: [],
      lineConflicts: [],
      openFlags: flags,
      signedOff: false,
      signerEdited: false,
    });
    return { run: row, blockers, failing: 0, waived: 0, signature: null };
  }
  const covered = await coveredProblems(actor, projectId, row);
  const failing = await listFailing(actor, row.id);
  const open = failing.filter((problem) => !covered.has(`${problem.pathId} ${problem.mechanism}`));
  const accepted = new Set((await listAcceptances(actor, row.revisionId)).map((entry) => entry.missing));
  const missing = (await missingInputs(actor, row)).filter((entry) => !accepted.has(entry.missing));
  const signature = (await listSignatures(actor, row.revisionId)).find(
    (entry) => entry.inputHash === row.inputHash && entry.runId === row.id,
  );
  const [classes, stackup] = await Promise.all([
    listNetClasses(actor, { id: draftId }),
    getStackup(actor, { id: draftId }),
  ]);
  const blockers = releaseBlockers({
    run: row,
    draftInputHash,
    judgedPaths: judgedCount(row.counts),
    failuresNotWaived: open.length,
    missingNotAccepted: missing,
    lineConflicts: lineConflicts(classes, stackup.layers),
    openFlags: flags,
    signedOff: signature !== undefined,
    signerEdited: await hasEdited(actor, draftId),
  });
  return {
    run: row,
    blockers,
    failing: open.length,
    waived: failing.length - open.length,
    signature: signature ? { signerName: signature.signerName, signedAt: signature.signedAt } : null,
  };
}

function judgedCount(counts: RunRow["counts"]): number {
  return Object.entries(counts ?? {}).reduce(
    (sum, [verdict, count]) => (verdict === "no data" ? sum : sum + count),
    0,
  );
}

/**
 * Freezes a revision with the run that allowed it, in one unit: the draft becomes released and immutable, the
 * note is written, every recipient gets a link of their own.
 * @returns the links' tokens, which nothing but the message to the recipient ever holds
 * @throws RefusedError naming everything that stands in the way
 */
export async function createRelease(
  actor: Actor,
  projectId: string,
  input: ReleaseInput,
  /** what the draft hashes to, and its edit count read before it was hashed */
  frozen: { inputHash: string; editCount: number },
  note: (heading: { releasedAt: number; signedBy: string; team: string }) => ImpedanceNote,
  noteHash: (note: ImpedanceNote) => string,
): Promise<{
  releaseId: string;
  links: { email: string; name: string; token: string; expiresAt: number }[];
}> {
  if (!can(actor, "release:create")) throw new NotFoundError("The project");
  const draft = await getDraft(actor, projectId, "release:create");
  const row = await getRun(actor, projectId, input.runId);
  const readiness = await releaseReadiness(actor, projectId, draft.id, frozen.inputHash);
  if (readiness.run?.id !== row.id)
    throw new RefusedError("A newer run exists. Look at it, then release with that one.", "stale-run");
  if (readiness.blockers.length > 0)
    throw new RefusedError(
      readiness.blockers.map((blocker) => blocker.text).join(" "),
      "blocked",
      {},
      readiness.blockers,
    );
  const signature = (await listSignatures(actor, draft.id)).find((entry) => entry.runId === row.id);
  if (!signature) throw new RefusedError("Nobody has signed off this run.", "blocked");
  const db = await getDb();
  const [team] = await db
    .select({ name: organization.name })
    .from(organization)
    .where(eq(organization.id, actor.teamId));
  const releasedAt = now();
  const id = newId();
  const written = note({ releasedAt, signedBy: signature.signerName ?? "", team: team?.name ?? "" });
  const links = input.recipients.map((recipient) => ({ ...recipient, ...newLink(releasedAt) }));
  const emails = new Set(links.map((link) => link.email.toLowerCase()));
  if (emails.size < links.length)
    throw new RefusedError("A recipient is named twice. Name each address once.", "recipients", {
      recipients: "Name each address once.",
    });
  await commitAudited(
    actor,
    [
      guard(
        db,
        sql`exists (select 1 from ${revision} where ${revision.id} = ${draft.id} and ${revision.teamId} = ${actor.teamId}
          and ${revision.state} = 'draft' and ${revision.editCount} = ${frozen.editCount})`,
      ),
      db
        .update(revision)
        .set({ state: "released", releasedAt, snapshotHash: row.inputHash })
        .where(
          and(eq(revision.id, draft.id), eq(revision.teamId, actor.teamId), eq(revision.state, "draft")),
        ),
      db.insert(release).values({
        id,
        teamId: actor.teamId,
        projectId,
        revisionId: draft.id,
        runId: row.id,
        letter: draft.letter,
        title: input.title,
        snapshotChunks: row.inputChunks,
        snapshotHash: row.inputHash,
        note: written,
        noteHash: noteHash(written),
        signOffId: signature.id,
        releasedBy: actor.userId,
        releasedAt,
      }),
      ...links.map((link) =>
        db.insert(releaseRecipient).values({
          id: newId(),
          teamId: actor.teamId,
          releaseId: id,
          name: link.name,
          email: link.email.toLowerCase(),
          company: link.company,
          tokenHash: hashToken(link.token),
          tokenExpiresAt: link.expiresAt,
          sends: 1,
        }),
      ),
    ],
    {
      action: "release.create",
      subjectKind: "release",
      subjectId: id,
      projectId,
      detail: { revision: draft.letter, run: row.number, recipients: [...emails] },
    },
  ).catch((error: unknown) => {
    if (error instanceof GuardError)
      throw new RefusedError("The draft was edited or released a moment ago. Look at it again.", "stale-run");
    throw error;
  });
  return {
    releaseId: id,
    links: links.map(({ email, name, token, expiresAt }) => ({ email, name, token, expiresAt })),
  };
}

/** Newest first. */
export async function listReleases(actor: Actor, projectId: string) {
  if (!can(actor, "release:read")) throw new NotFoundError("The project");
  const db = await getDb();
  return db
    .select({
      id: release.id,
      letter: release.letter,
      title: release.title,
      releasedAt: release.releasedAt,
      releasedByName: sql<string | null>`(SELECT name FROM ${user} WHERE id = ${release.releasedBy})`,
      recipients: sql<number>`(SELECT count(*) FROM ${releaseRecipient} WHERE release_id = "release"."id")`,
      acknowledged: sql<number>`(SELECT count(*) FROM ${releaseRecipient} WHERE release_id = "release"."id" AND acknowledged_at IS NOT NULL)`,
    })
    .from(release)
    .where(and(eq(release.projectId, projectId), eq(release.teamId, actor.teamId)))
    .orderBy(desc(release.releasedAt));
}

export async function getRelease(
  actor: Actor,
  projectId: string,
  releaseId: string,
): Promise<{ release: ReleaseRow; recipients: RecipientRow[] }> {
  if (!can(actor, "release:read")) throw new NotFoundError("The release");
  const db = await getDb();
  const [[row], recipients] = await db.batch([
    db
      .select()
      .from(release)
      .where(
        and(eq(release.id, releaseId), eq(release.projectId, projectId), eq(release.teamId, actor.teamId)),
      ),
    db
      .select()
      .from(releaseRecipient)
      .where(and(eq(releaseRecipient.releaseId, releaseId), eq(releaseRecipient.teamId, actor.teamId))),
  ]);
  if (!row) throw new NotFoundError("The release");
  return { release: row, recipients };
}

/** Gives a recipient a fresh link; the old one ends at once. */
export async function renewLink(actor: Actor, projectId: string, releaseId: string, recipientId: string) {
  if (!can(actor, "release:create")) throw new NotFoundError("The recipient");
  const { recipients, release: row } = await getRelease(actor, projectId, releaseId);
  const recipient = recipients.find((entry) => entry.id === recipientId);
  if (!recipient) throw new NotFoundError("The recipient");
  const link = newLink(now());
  const db = await getDb();
  await commitAudited(
    actor,
    [
      db
        .update(releaseRecipient)
        .set({
          tokenHash: hashToken(link.token),
          tokenExpiresAt: link.expiresAt,
          revokedAt: null,
          sends: sql`${releaseRecipient.sends} + 1`,
        })
        .where(and(eq(releaseRecipient.id, recipientId), eq(releaseRecipient.teamId, actor.teamId))),
    ],
    {
      action: "release.link",
      subjectKind: "release",
      subjectId: releaseId,
      projectId,
      detail: { email: recipient.email },
    },
  );
  return {
    ...link,
    email: recipient.email,
    name: recipient.name,
    letter: row.letter,
    board: row.note.project,
    team: row.note.team,
  };
}

/** Ends a recipient's access, by link and by account. */
export async function revokeRecipient(
  actor: Actor,
  projectId: string,
  releaseId: string,
  recipientId: string,
): Promise<void> {
  if (!can(actor, "release:create")) throw new NotFoundError("The recipient");
  const { recipients } = await getRelease(actor, projectId, releaseId);
  const recipient = recipients.find((entry) => entry.id === recipientId);
  if (!recipient) throw new NotFoundError("The recipient");
  const db = await getDb();
  await commitAudited(
    actor,
    [
      db
        .update(releaseRecipient)
        .set({ revokedAt: now() })
        .where(and(eq(releaseRecipient.id, recipientId), eq(releaseRecipient.teamId, actor.teamId))),
    ],
    {
      action: "release.revoke",
      subjectKind: "release",
      subjectId: releaseId,
      projectId,
      detail: { email: recipient.email },
    },
  );
}

/** A note as its recipient sees it: nothing of nets, runs, comments or other recipients. */
export interface SentNote {
  releaseId: string;
  recipientId: string;
  note: ImpedanceNote;
  noteHash: string;
  recipientName: string;
  acknowledgedAt: number | null;
  acknowledgedBy: string | null;
  acknowledgement: string;
}

/** Notes sent to this person's confirmed address, by any team; newest first. */
export async function listSentNotes(email: string): Promise<SentNote[]> {
  const db = await getDb();
  const rows = await db
    .select(sentColumns)
    .from(releaseRecipient)
    .innerJoin(release, eq(release.id, releaseRecipient.releaseId))
    .innerJoin(project, eq(project.id, release.projectId))
    .where(and(eq(releaseRecipient.email, email.toLowerCase()), isNull(releaseRecipient.revokedAt)))
    .orderBy(desc(release.releasedAt));
  return rows;
}

/** One note sent to this address. */
export async function getSentNote(email: string, releaseId: string): Promise<SentNote> {
  const found = (await listSentNotes(email)).find((entry) => entry.releaseId === releaseId);
  if (!found) throw new NotFoundError("The note");
  return found;
}

/** The note behind a link: unexpired, not revoked. */
export async function getLinkedNote(token: string): Promise<SentNote> {
  const db = await getDb();
  const [row] = await db
    .select(sentColumns)
    .from(releaseRecipient)
    .innerJoin(release, eq(release.id, releaseRecipient.releaseId))
    .where(
      and(
        eq(releaseRecipient.tokenHash, hashToken(token)),
        isNull(releaseRecipient.revokedAt),
        or(isNull(releaseRecipient.tokenExpiresAt), gt(releaseRecipient.tokenExpiresAt, now())),
      ),
    );
  if (!row) throw new NotFoundError("The note");
  return row;
}

/** Remembers that the recipient saw or downloaded the note; the first time counts. */
export async function markSeen(recipientId: string, how: "viewedAt" | "downloadedAt"): Promise<void> {
  const db = await getDb();
  const column = releaseRecipient[how];
  await db
    .update(releaseRecipient)
    .set({ [how]: now() })
    .where(and(eq(releaseRecipient.id, recipientId), isNull(column)));
}

/** The recipient says that they have it; once, with a word if they like. */
export async function acknowledge(sent: SentNote, by: string, words: string): Promise<void> {
  const db = await getDb();
  const changed = await db
    .update(releaseRecipient)
    .set({ acknowledgedAt: now(), acknowledgedBy: by, acknowledgement: words })
    .where(
      and(
        eq(releaseRecipient.id, sent.recipientId),
        isNull(releaseRecipient.acknowledgedAt),
        isNull(releaseRecipient.revokedAt),
      ),
    )
    .returning({ teamId: releaseRecipient.teamId });
  const [row] = changed;
  if (!row) throw new RefusedError("This note was acknowledged already.", "acknowledged");
  const [found] = await db
    .select({ projectId: release.projectId })
    .from(release)
    .where(eq(release.id, sent.releaseId));
  await commitAudited(
    { kind: "system", userId: "system", teamId: row.teamId, role: "owner", email: "", name: "Ringfence" },
    [],
    {
      action: "note.acknowledge",
      subjectKind: "release",
      subjectId: sent.releaseId,
      projectId: found?.projectId ?? null,
      detail: { by },
    },
  );
}

const sentColumns = {
  releaseId: release.id,
  recipientId: releaseRecipient.id,
  note: release.note,
  noteHash: release.noteHash,
  recipientName: releaseRecipient.name,
  acknowledgedAt: releaseRecipient.acknowledgedAt,
  acknowledgedBy: releaseRecipient.acknowledgedBy,
  acknowledgement: releaseRecipient.acknowledgement,
};

function newLink(at: number): { token: string; expiresAt: number } {
  return { token: randomBytes(32).toString("base64url"), expiresAt: at + LINK_MS };
}

function hashToken(token: string): string {
  return createHash("sha256").update(token).digest("hex");
}
