import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { OverviewView } from "@/components/overview/overview-view";
import { Sheet } from "@/components/shell/sheet";
import { requireActor } from "@/lib/auth/require-actor";
import { readOverview } from "@/lib/db/overview";
import { can } from "@/lib/schemas/actor";
import { NotFoundError } from "@/lib/schemas/errors";

export const metadata: Metadata = { title: "Overview" };

interface Props {
  params: Promise<{ projectId: string }>;
  searchParams: Promise<{ rev?: string }>;
}

export default async function OverviewPage({ params, searchParams }: Props) {
  const actor = await requireActor("project:read");
  const [{ projectId }, { rev }] = await Promise.all([params, searchParams]);
  const overview = await readOverview(actor, projectId, rev).catch((error: unknown) => {
    if (error instanceof NotFoundError) notFound();
    throw error;
  });
  return (
    <Sheet>
      <OverviewView initial={overview} revision={rev} mayEdit={can(actor, "draft:edit")} />
    </Sheet>
  );
}
