import type { Metadata } from "next";
import { AuditView } from "@/components/audit/audit-view";
import { Sheet } from "@/components/shell/sheet";
import { PageHeader } from "@/components/ui/page-header";
import { requireActor } from "@/lib/auth/require-actor";
import { listAudit, verifyAuditChain } from "@/lib/db/audit";

export const metadata: Metadata = { title: "Audit" };

const SHOWN_AT_FIRST = 500;

export default async function AuditPage() {
  const actor = await requireActor("audit:read");
  const [entries, chain] = await Promise.all([
    listAudit(actor, { limit: SHOWN_AT_FIRST }),
    verifyAuditChain(actor),
  ]);
  return (
    <Sheet>
      <PageHeader
        title="Audit"
        description="Who did what to which thing, and when. Entries are added and never changed; each carries the hash of the one before."
      />
      <AuditView initial={{ entries, chain }} />
    </Sheet>
  );
}
