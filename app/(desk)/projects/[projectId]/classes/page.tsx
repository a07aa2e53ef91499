import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { ClassesView } from "@/components/classes/classes-view";
import { Sheet } from "@/components/shell/sheet";
import { requireActor } from "@/lib/auth/require-actor";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import { getBindings } from "@/lib/db/binding";
import { listModels } from "@/lib/db/model";
import { listNetClasses } from "@/lib/db/net-class";
import { findRevision, type RevisionRef } from "@/lib/db/revision";
import { getRuleSet } from "@/lib/db/rule-set";
import { getStackup } from "@/lib/db/stackup";
import { can, type Actor } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";

export const metadata: Metadata = { title: "Classes" };

interface Props {
  params: Promise<{ projectId: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function ClassesPage({ params, searchParams }: Props) {
  const [{ projectId }, query] = await Promise.all([params, searchParams]);
  const actor = await requireActor("project:read");
  const letter = query[REVISION_PARAM];
  const { revision, stackup, ...inputs } = await read(
    actor,
    projectId,
    typeof letter === "string" ? letter : null,
  );
  return (
    <Sheet>
      <ClassesView
        // Another revision is another document.
        key={revision.id}
        projectId={projectId}
        revision={revision.letter}
        search={typeof letter === "string" ? `?${REVISION_PARAM}=${encodeURIComponent(letter)}` : ""}
        unit={revision.projectUnit}
        layers={stackup.layers
          .filter(({ kind }) => kind === "signal")
          .map(({ lineageId, name }) => ({ lineageId, name }))}
        readOnly={
          stays(revision) ??
          (can(actor, "draft:edit")
            ? null
            : can(actor, "limits:set")
              ? "Designers edit classes, models and bindings; you set the limits of each class."
              : "Designers edit classes, models and bindings.")
        }
        limitsReadOnly={
          stays(revision) ??
          (can(actor, "limits:set")
            ? null
            : "A reviewer or the owner of the team sets limits. Flag a path to propose another.")
        }
        {...inputs}
      />
    </Sheet>
  );
}

async function read(actor: Actor, projectId: string, letter: string | null) {
  try {
    const revision = await findRevision(actor, projectId, letter);
    const [stackup, classes, models, bindings, ruleSet] = await Promise.all([
      getStackup(actor, revision),
      listNetClasses(actor, revision),
      listModels(actor, revision),
      getBindings(actor, revision),
      getRuleSet(actor, revision),
    ]);
    return { revision, stackup, classes, models, bindings, ruleSet };
  } catch (error) {
    if (error instanceof NotFoundError) notFound();
    throw error;
  }
}

/** Why nobody changes this revision; null for a draft at work. */
function stays(revision: RevisionRef): string | null {
  if (revision.state === "released") return `Revision ${revision.letter} is released and stays as it is.`;
  if (revision.archived) return "This project is archived. Restore it to change its classes.";
  return null;
}
