import type { Metadata } from "next";
import { Cautions } from "@/components/landing/cautions";
import { rightsOf } from "@/components/runs/rights";
import { RunsView } from "@/components/runs/runs-view";
import { Sheet } from "@/components/shell/sheet";
import { requireActor } from "@/lib/auth/require-actor";

export const metadata: Metadata = { title: "Runs" };

export default async function RunsPage({ params }: { params: Promise<{ projectId: string }> }) {
  const actor = await requireActor("project:read");
  const { projectId } = await params;
  return (
    <Sheet>
      <RunsView projectId={projectId} rights={rightsOf(actor)} />
      <div className="mt-8">
        <Cautions />
      </div>
    </Sheet>
  );
}
