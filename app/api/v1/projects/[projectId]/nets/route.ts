import { listNets } from "@/lib/db/net";
import { patchNets } from "@/lib/db/net-fields";
import { findRevision } from "@/lib/db/revision";
import { route } from "@/lib/auth/route";
import { netsPatch, netsQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: netsQuery,
  handler: async ({ actor, params, query }) => {
    const { revision, class: classLineageId, kind: scopeKind, ...filter } = query;
    return listNets(actor, await findRevision(actor, params.projectId, revision), {
      ...filter,
      classLineageId,
      scopeKind,
    });
  },
});

/** The same change to many nets, all or none. */
export const PATCH = route({
  access: ["draft:edit", "limits:set"],
  params: projectParams,
  body: netsPatch,
  maxBodyBytes: 8_388_608,
  handler: async ({ actor, params, body }) => {
    const patches = body.nets.map((net) => ({ ...net, fields: body.change }));
    return { changed: await patchNets(actor, params.projectId, patches, summaryOf) };
  },
});

function summaryOf(fields: string[], nets: number): string {
  const what = fields.map((field) => WORDS[field] ?? field);
  return `${nets === 1 ? "1 net" : `${nets} nets`}: ${what.join(", ")}`;
}

const WORDS: Record<string, string> = {
  classLineageId: "class",
  scopeKind: "kind",
  scopeReason: "reason",
  matchGroup: "match group",
};
