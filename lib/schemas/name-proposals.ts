import { z } from "zod";
import { id } from "./common";
import { bindingsUpdate, type StoredBinding } from "./model";
import { scopeKinds } from "./net";

/** What names suggest of a draft's nets, and its pins for the roles step. */
export interface DraftProposals {
  outOfScope: { id: string; net: string; kind: (typeof scopeKinds)[number]; reason: string; sure: boolean }[];
  pairs: {
    name: string;
    positive: { id: string; net: string };
    negative: { id: string; net: string };
    how: string;
  }[];
  buses: { name: string; label: string; members: { id: string; index: number }[] }[];
  matchGroups: { name: string; reason: string; ids: string[] }[];
  bindings: { version: number; bindings: StoredBinding[] };
  /** Pins of nets that are not out of scope, by index into nets and references: short, since there are thousands. */
  pins: {
    nets: string[];
    references: { reference: string; partNumber: string; kind: string }[];
    /** net, reference, pin, role that a list gave ("" for none) */
    pins: [number, number, string, string][];
  };
}

/** What a person confirmed of it. */
export const confirmedProposals = z.object({
  outOfScope: z
    .array(z.object({ id, kind: z.enum(scopeKinds), reason: z.string().trim().max(300) }))
    .max(25_000),
  pairs: z.array(z.object({ positive: id, negative: id })).max(12_500),
  buses: z
    .array(
      z.object({
        name: z.string().trim().min(1).max(120),
        members: z.array(z.object({ id, index: z.number().int() })).max(5_000),
      }),
    )
    .max(5_000),
  matchGroups: z
    .array(z.object({ name: z.string().trim().min(1).max(120), ids: z.array(id).max(5_000) }))
    .max(5_000),
  bindings: bindingsUpdate.nullable(),
});
export type ConfirmedProposals = z.infer<typeof confirmedProposals>;
