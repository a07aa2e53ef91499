import { queryOptions } from "@tanstack/react-query";
import type { RuleSetDoc, StoredRuleSet } from "@/lib/schemas/rule-set";
import { apiGet, apiPut } from "./api";

/** The rule set of a revision; without one, the draft's as it is now. */
export const fetchRules = (projectId: string, revision: string | null = null, signal?: AbortSignal) =>
  apiGet<StoredRuleSet>(`/projects/${projectId}/rules`, { revision }, signal);

export const rulesQuery = (projectId: string, revision: string | null) =>
  queryOptions({
    queryKey: ["project", projectId, "rules", revision],
    queryFn: ({ signal }) => fetchRules(projectId, revision, signal),
  });

/** Puts a whole rule set in place of the draft's. @throws ApiError, a conflict where it was changed since `version` */
export const putRules = (projectId: string, version: number, ruleSet: RuleSetDoc) =>
  apiPut<StoredRuleSet>(`/projects/${projectId}/rules`, { version, ruleSet });
