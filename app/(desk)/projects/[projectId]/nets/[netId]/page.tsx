import type { Metadata, Route } from "next";
import Link from "next/link";
import { notFound } from "next/navigation";
import { NetPage } from "@/components/net-page/net-page";
import { Sheet } from "@/components/shell/sheet";
import { EmptyState } from "@/components/ui/empty-state";
import { requireActor } from "@/lib/auth/require-actor";
import { REVISION_PARAM } from "@/lib/client/revision-param";
import { can, type Actor } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";
import { type Asked, readNetFacts } from "./read-net-facts";

export const metadata: Metadata = { title: "Net" };

interface Props {
  params: Promise<{ projectId: string; netId: string }>;
  searchParams: Promise<Record<string, string | string[] | undefined>>;
}

/** The signal path that holds a net: of a run, or without one as the revision is now. */
export default async function NetOfProject({ params, searchParams }: Props) {
  const [{ projectId, netId }, query] = await Promise.all([params, searchParams]);
  const actor = await requireActor("project:read");
  const one = (value: string | string[] | undefined) => (typeof value === "string" ? value : null);
  const read = await readOr404(actor, projectId, netId, {
    run: one(query.run),
    revision: one(query[REVISION_PARAM]),
  });
  if (read.kind === "out of scope")
    return (
      <Sheet>
        <EmptyState
          title={`${read.name} is not checked`}
          actions={
            <Link className="prose-link" href={`/projects/${projectId}/nets` as Route}>
              All nets
            </Link>
          }
        >
          It is out of scope ({read.scope}). {read.reason} To have it judged, take it into scope in the table
          of nets.
        </EmptyState>
      </Sheet>
    );
  const { facts } = read;
  const mayEdit = can(actor, "draft:edit") && facts.revision.state === "draft";
  return (
    <Sheet>
      <NetPage key={`${facts.path.id} ${facts.run?.id ?? "now"}`} facts={facts} mayEdit={mayEdit} />
    </Sheet>
  );
}

async function readOr404(actor: Actor, projectId: string, netId: string, asked: Asked) {
  try {
    return await readNetFacts(actor, projectId, netId, asked);
  } catch (error) {
    if (error instanceof NotFoundError) notFound();
    throw error;
  }
}
