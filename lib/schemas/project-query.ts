import { z } from "zod";
import { id, version } from "./common";
import { modelDoc } from "./model";
import { sentNetClass } from "./net-class";
import { netDoc, netScope, scopeKinds } from "./net";
import { projectParams } from "./route-params";
import { sensibleLimits } from "./sensible-limits";

export const classParams = projectParams.extend({ classId: id });
export const modelParams = projectParams.extend({ modelId: id });
export const netParams = projectParams.extend({ netId: id });

/** Which revision is looked at: its letter; absent, the draft (or the newest release where there is none). */
export const revisionQuery = z.object({
  revision: z
    .string()
    .regex(/^[A-Z]{1,3}$/)
    .optional(),
});

const flagText = z.enum(["true", "false"]).transform((text) => text === "true");

export const projectsQuery = z.object({ archived: flagText.default(false) });

export const netsQuery = revisionQuery.extend({
  search: z.string().max(120).optional(),
  class: z.union([id, z.literal("none")]).optional(),
  scope: netScope.optional(),
  kind: z.enum(scopeKinds).optional(),
  layer: z.string().max(60).optional(),
  sort: z.enum(["name", "class", "scope", "length", "pins", "vias", "layers"]).default("name"),
  descending: flagText.default(false),
  limit: z.coerce.number().int().min(1).max(25_000).optional(),
  offset: z.coerce.number().int().min(0).optional(),
});

/** The same change to many nets, each at the version it was read at. */
export const netsPatch = z.object({
  nets: z.array(z.object({ id, version })).min(1, "Tick at least one net.").max(25_000),
  change: z.object({
    // What is not told stays: a field made optional with its default would be put back to that default.
    classLineageId: netDoc.shape.classLineageId.unwrap().optional(),
    scope: netDoc.shape.scope.optional(),
    scopeKind: netDoc.shape.scopeKind.unwrap().optional(),
    scopeReason: netDoc.shape.scopeReason.unwrap().optional(),
    matchGroup: netDoc.shape.matchGroup.unwrap().optional(),
    limits: netDoc.shape.limits
      .unwrap()
      .superRefine((limits, ctx) => sensibleLimits(limits, ctx))
      .optional(),
  }),
});

export const classRemoval = z.object({
  version,
  /** Lineage of the class that takes its nets; null: none; absent: it must have no nets. */
  reassignTo: id.nullable().optional(),
});
export const removal = z.object({ version });
export const netClassInput = z.object({ netClass: sentNetClass });

export const auditQuery = z.object({
  search: z.string().max(120).optional(),
  project: id.optional(),
  from: z.coerce.number().int().optional(),
  to: z.coerce.number().int().optional(),
  before: z.coerce.number().int().optional(),
  limit: z.coerce.number().int().min(1).max(5_000).default(500),
});
export const modelInput = z.object({ model: modelDoc });
