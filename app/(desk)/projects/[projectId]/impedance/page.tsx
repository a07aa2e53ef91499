import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { ImpedanceView } from "@/components/impedance/impedance-view";
import { Sheet } from "@/components/shell/sheet";
import { requireActor } from "@/lib/auth/require-actor";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import { listNetClasses } from "@/lib/db/net-class";
import { findRevision, type RevisionRef } from "@/lib/db/revision";
import { getRuleSet } from "@/lib/db/rule-set";
import { getStackup } from "@/lib/db/stackup";
import { LimitResolver } from "@/lib/resolve/limits";
import { can, type Actor } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";
import { impedanceCentring } from "@/lib/si/rules/impedance-centring";
import { impedanceYield } from "@/lib/si/rules/impedance-yield";

export const metadata: Metadata = { title: "Impedance" };

interface Props {
  params: Promise<{ projectId: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

export default async function ImpedancePage({ params, searchParams }: Props) {
  const [{ projectId }, query] = await Promise.all([params, searchParams]);
  const actor = await requireActor("project:read");
  const letter = query[REVISION_PARAM];
  const { revision, ...inputs } = await read(actor, projectId, typeof letter === "string" ? letter : null);
  return (
    <Sheet>
      <ImpedanceView
        key={revision.id}
        projectId={projectId}
        projectName={revision.projectName}
        revision={revision.letter}
        readOnly={whyReadOnly(actor, revision)}
        search={typeof letter === "string" ? `?${REVISION_PARAM}=${encodeURIComponent(letter)}` : ""}
        {...inputs}
      />
    </Sheet>
  );
}

async function read(actor: Actor, projectId: string, letter: string | null) {
  try {
    const revision = await findRevision(actor, projectId, letter);
    const [stackup, classes, ruleSet] = await Promise.all([
      getStackup(actor, revision),
      listNetClasses(actor, revision),
      getRuleSet(actor, revision),
    ]);
    const resolver = new LimitResolver(ruleSet);
    const limits = Object.fromEntries(
      classes.flatMap((netClass) => {
        const all = resolver.of([], netClass, null);
        const own = [impedanceCentring.id, impedanceYield.id].flatMap((rule) => {
          const limit = all[rule];
          return limit ? [[rule, limit] as const] : [];
        });
        return [[netClass.lineageId, Object.fromEntries(own)]];
      }),
    );
    return { revision, stackup, classes, limits };
  } catch (error) {
    if (error instanceof NotFoundError) notFound();
    throw error;
  }
}

function whyReadOnly(actor: Actor, revision: RevisionRef): string | null {
  if (revision.state === "released") return `Revision ${revision.letter} is released and stays as it is.`;
  if (revision.archived) return "This project is archived. Restore it to change its classes.";
  return can(actor, "draft:edit")
    ? null
    : "Designers write widths into the classes. Here you may try others without changing them.";
}
