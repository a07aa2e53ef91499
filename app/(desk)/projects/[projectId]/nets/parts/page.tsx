import type { Metadata } from "next";
import { PartsView } from "@/components/nets/parts-view";
import { Sheet } from "@/components/shell/sheet";
import { PageHeader } from "@/components/ui/page-header";
import { readRevision, type NetsPageProps } from "../read-revision";

export const metadata: Metadata = { title: "Parts" };

export default async function PartsPage(props: NetsPageProps) {
  const { projectId, revision, readOnly } = await readRevision(props);
  return (
    <Sheet>
      <PageHeader
        title="Parts"
        description="What joins nets into signal paths, and what drives and receives."
      />
      <PartsView projectId={projectId} revision={revision} mayImport={readOnly === null} />
    </Sheet>
  );
}
