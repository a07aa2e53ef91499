import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { Cautions } from "@/components/landing/cautions";
import { rightsOf } from "@/components/runs/rights";
import { RunView } from "@/components/runs/run-view";
import { Sheet } from "@/components/shell/sheet";
import { requireActor } from "@/lib/auth/require-actor";
import { getRun } from "@/lib/db/run";
import { NotFoundError } from "@/lib/schemas/errors";
import { runParams } from "@/lib/schemas/route-params";

export const metadata: Metadata = { title: "Run" };

interface Props {
  params: Promise<{ projectId: string; runId: string }>;
}

export default async function RunPage({ params }: Props) {
  const actor = await requireActor("project:read");
  const parsed = runParams.safeParse(await params);
  if (!parsed.success) notFound();
  const { projectId, runId } = parsed.data;
  try {
    await getRun(actor, projectId, runId);
  } catch (error) {
    if (error instanceof NotFoundError) notFound();
    throw error;
  }
  return (
    <Sheet>
      <RunView projectId={projectId} runId={runId} rights={rightsOf(actor)} />
      <div className="mt-8">
        <Cautions />
      </div>
    </Sheet>
  );
}
