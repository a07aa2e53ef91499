import type { z } from "zod";
import { limitProblem } from "@/lib/si/rules/limit-range";

/** Refuses limits of unknown rules and such as no rule can mean, each at its rule. What is stored already is left alone. */
export function sensibleLimits(
  limits: Readonly<Record<string, { limit: string | null }>> | undefined,
  ctx: z.core.$RefinementCtx,
  ...path: string[]
): void {
  for (const [rule, { limit }] of Object.entries(limits ?? {})) {
    const message = limitProblem(rule, limit);
    if (message) ctx.addIssue({ code: "custom", message, path: [...path, rule, "limit"] });
  }
}
