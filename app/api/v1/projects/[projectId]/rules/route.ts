import { findRevision } from "@/lib/db/revision";
import { getRuleSet, putRuleSet } from "@/lib/db/rule-set";
import { route } from "@/lib/auth/route";
import { revisionQuery } from "@/lib/schemas/project-query";
import { projectParams } from "@/lib/schemas/route-params";
import { ruleSetUpdate } from "@/lib/schemas/rule-set";

export const GET = route({
  access: "project:read",
  params: projectParams,
  query: revisionQuery,
  handler: async ({ actor, params, query }) =>
    getRuleSet(actor, await findRevision(actor, params.projectId, query.revision)),
});

export const PUT = route({
  access: "limits:set",
  params: projectParams,
  body: ruleSetUpdate,
  handler: ({ actor, params, body }) => putRuleSet(actor, params.projectId, body.version, body.ruleSet),
});
