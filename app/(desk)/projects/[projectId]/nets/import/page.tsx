import type { Metadata } from "next";
import { ImportWizard } from "@/components/import/import-wizard";
import { Sheet } from "@/components/shell/sheet";
import { PageHeader } from "@/components/ui/page-header";
import { readRevision, type NetsPageProps } from "../read-revision";

export const metadata: Metadata = { title: "Import a list" };

export default async function ImportPage(props: NetsPageProps) {
  const { projectId, readOnly } = await readRevision(props);
  return (
    <Sheet>
      <PageHeader
        title="Import a list"
        description="Nets, parts and neighbours as a layout program exports them. Nothing is written until you confirm it."
      />
      {readOnly === null ? (
        <ImportWizard projectId={projectId} />
      ) : (
        <p className="text-ink-soft">{readOnly}</p>
      )}
    </Sheet>
  );
}
