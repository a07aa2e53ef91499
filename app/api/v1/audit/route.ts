import { listAudit, verifyAuditChain } from "@/lib/db/audit";
import { route } from "@/lib/auth/route";
import { auditQuery } from "@/lib/schemas/project-query";

export const GET = route({
  access: "audit:read",
  query: auditQuery,
  handler: async ({ actor, query: { project, ...filter } }) => {
    const [entries, chain] = await Promise.all([
      listAudit(actor, { ...filter, projectId: project }),
      verifyAuditChain(actor),
    ]);
    return { entries, chain };
  },
});
