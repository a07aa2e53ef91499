import "server-only";
import { createHash } from "node:crypto";
import { baseUrl } from "@/lib/auth/environment";
import { createRelease } from "@/lib/db/release";
import { getDraft } from "@/lib/db/revision";
import { hashInputs, readInputs } from "@/lib/db/snapshot";
import { sendMailLater } from "@/lib/email/transport";
import { releaseMessage } from "@/lib/email/work-messages";
import { impedanceNote } from "@/lib/resolve/impedance-note";
import type { Actor } from "@/lib/schemas/actor";
import { canonicalJson } from "@/lib/schemas/canonical-json";
import type { ReleaseInput } from "@/lib/schemas/release";

/** Releases the draft and writes to every recipient; what stands in the way is thrown as one refusal. */
export async function makeRelease(actor: Actor, projectId: string, input: ReleaseInput): Promise<string> {
  const draft = await getDraft(actor, projectId, "release:create");
  const inputs = await readInputs(actor, draft.id);
  const frozen = { inputHash: await hashInputs(inputs), editCount: draft.editCount };
  let board = { project: "", team: "" };
  const { releaseId, links } = await createRelease(
    actor,
    projectId,
    input,
    frozen,
    (heading) => {
      const note = impedanceNote(inputs, { ...heading, title: input.title, remarks: input.remarks });
      board = note;
      return note;
    },
    (note) => createHash("sha256").update(canonicalJson(note)).digest("hex"),
  );
  for (const link of links)
    sendMailLater(
      releaseMessage(link.email, {
        teamName: board.team,
        projectName: board.project,
        letter: draft.letter,
        url: `${baseUrl()}/note/${link.token}`,
        expires: new Date(link.expiresAt).toISOString().slice(0, 10),
      }),
    );
  return releaseId;
}
