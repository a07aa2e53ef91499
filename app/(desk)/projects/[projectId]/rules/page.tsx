import type { Metadata } from "next";
import { RulesView } from "@/components/rules/rules-view";
import { rightsOf } from "@/components/runs/rights";
import { Sheet } from "@/components/shell/sheet";
import { requireActor } from "@/lib/auth/require-actor";

export const metadata: Metadata = { title: "Rules" };

export default async function RulesPage({ params }: { params: Promise<{ projectId: string }> }) {
  const actor = await requireActor("project:read");
  const { projectId } = await params;
  return (
    <Sheet>
      <RulesView projectId={projectId} rights={rightsOf(actor)} />
    </Sheet>
  );
}
