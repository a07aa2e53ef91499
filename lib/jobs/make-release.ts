import "server-only";
import { createHash } from "node:crypto";
import { createRelease } from "@/lib/db/release";
import { getDraft } from "@/lib/db/revision";
import { hashInputs, readInputs } from "@/lib/db/snapshot";
import { impedanceNote } from "@/lib/resolve/impedance-note";
import type { Actor } from "@/lib/schemas/actor";
import { canonicalJson } from "@/lib/schemas/canonical-json";
import type { ReleaseInput } from "@/lib/schemas/release";

export interface MadeRelease {
  releaseId: string;
  letter: string;
  projectName: string;
  teamName: string;
  /** one a recipient; whoever called sends them */
  links: { email: string; token: string; expiresAt: number }[];
}

/** Releases the draft; what stands in the way is thrown as one refusal. */
export async function makeRelease(
  actor: Actor,
  projectId: string,
  input: ReleaseInput,
): Promise<MadeRelease> {
  const draft = await getDraft(actor, projectId, "release:create");
  const inputs = await readInputs(actor, draft.id);
  const frozen = { inputHash: await hashInputs(inputs), editCount: draft.editCount };
  let teamName = "";
  const { releaseId, links } = await createRelease(
    actor,
    projectId,
    input,
    frozen,
    (heading) => {
      teamName = heading.team;
      return impedanceNote(inputs, { ...heading, title: input.title, remarks: input.remarks });
    },
    (note) => createHash("sha256").update(canonicalJson(note)).digest("hex"),
  );
  return { releaseId, letter: draft.letter, projectName: inputs.project.name, teamName, links };
}
