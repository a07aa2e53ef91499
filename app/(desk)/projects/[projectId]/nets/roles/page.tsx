import type { Metadata } from "next";
import { RolesView } from "@/components/roles/roles-view";
import { Sheet } from "@/components/shell/sheet";
import { PageHeader } from "@/components/ui/page-header";
import { readRevision, type NetsPageProps } from "../read-revision";

export const metadata: Metadata = { title: "Roles and names" };

export default async function RolesPage(props: NetsPageProps) {
  const { projectId, readOnly } = await readRevision(props);
  return (
    <Sheet>
      <PageHeader
        title="Roles and names"
        description="Which pins drive, and what names suggest: supplies, pairs, buses, match groups. You confirm, and can undo."
      />
      {readOnly === null ? <RolesView projectId={projectId} /> : <p className="text-ink-soft">{readOnly}</p>}
    </Sheet>
  );
}
