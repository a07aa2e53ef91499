import type { Metadata } from "next";
import { Cautions } from "@/components/landing/cautions";
import { ReviewView } from "@/components/review/review-view";
import { rightsOf } from "@/components/runs/rights";
import { Sheet } from "@/components/shell/sheet";
import { requireActor } from "@/lib/auth/require-actor";

export const metadata: Metadata = { title: "Review" };

export default async function ReviewPage({ params }: { params: Promise<{ projectId: string }> }) {
  const actor = await requireActor("project:read");
  const { projectId } = await params;
  return (
    <Sheet>
      <ReviewView projectId={projectId} rights={rightsOf(actor)} />
      <div className="mt-8">
        <Cautions />
      </div>
    </Sheet>
  );
}
