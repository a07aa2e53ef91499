import type { Metadata } from "next";
import { ReleasesView } from "@/components/releases/releases-view";
import { Sheet } from "@/components/shell/sheet";
import { requireActor } from "@/lib/auth/require-actor";
import { can } from "@/lib/schemas/actor";

export const metadata: Metadata = { title: "Releases" };

export default async function ReleasesPage({ params }: { params: Promise<{ projectId: string }> }) {
  const actor = await requireActor("release:read");
  const { projectId } = await params;
  return (
    <Sheet>
      <ReleasesView
        projectId={projectId}
        mayRelease={can(actor, "release:create")}
        mayDraft={can(actor, "draft:edit")}
      />
    </Sheet>
  );
}
