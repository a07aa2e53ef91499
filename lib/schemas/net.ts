import { z } from "zod";
import { id, nameText } from "./common";
import { pinRole } from "./model";
import { length, positiveLength, quantity } from "./quantity";

/** A place on the board; the origin may lie anywhere. */
const coordinate = quantity("length", { min: -10, max: 10 });

/** In scope; out of scope with a reason; or a route that does not join its pins. */
export const netScopes = ["in", "out", "incomplete"] as const;
export const netScope = z.enum(netScopes);
export const scopeKinds = ["signal", "power", "ground", "static", "test"] as const;

export const netSection = z.object({
  /** Node names; a pin is REFERENCE.PIN, a via or junction any other name. */
  from: z.string().min(1).max(80),
  to: z.string().min(1).max(80),
  /** As imported; the lineage id when the layer is known in the stackup. */
  layer: z.string().max(60),
  layerLineageId: id.nullable(),
  width: positiveLength,
  length: length,
  /** Start and end, when known. */
  at: z
    .object({ x1: coordinate, y1: coordinate, x2: coordinate, y2: coordinate })
    .partial()
    .nullable()
    .default(null),
});
export type NetSectionDoc = z.infer<typeof netSection>;

export const netPin = z.object({
  node: z.string().min(1).max(80),
  reference: z.string().min(1).max(40),
  pin: z.string().min(1).max(40),
  /** null: decided by the bindings. */
  role: pinRole.nullable().default(null),
});
export type NetPinDoc = z.infer<typeof netPin>;

export const netTopology = z.object({
  sections: z.array(netSection).max(100_000),
  pins: z.array(netPin).max(20_000),
  viaCount: z.number().int().min(0).max(10000),
  /** false: lengths are known but not how the receivers hang on the line (a net-list row with several). */
  shapeKnown: z.boolean().default(true),
});
export type NetTopologyDoc = z.infer<typeof netTopology>;

/** What keeps a route from being simulated, in words that name the place. */
export const routeGap = z.object({
  kind: z.enum(["islands", "loop", "one pin", "no pins", "no sections"]),
  text: z.string().max(400),
});
export type RouteGap = z.infer<typeof routeGap>;

export const netDoc = z.object({
  name: nameText(120),
  classLineageId: id.nullable().default(null),
  scope: netScope,
  scopeKind: z.enum(scopeKinds).default("signal"),
  scopeReason: z.string().trim().max(300).default(""),
  source: z.enum(["net list", "section list", "manual"]),
  topology: netTopology,
  gaps: z.array(routeGap).max(50).default([]),
  pair: z
    .object({ partner: z.string().max(120), polarity: z.enum(["P", "N"]) })
    .nullable()
    .default(null),
  bus: z
    .object({ name: z.string().max(120), index: z.number().int() })
    .nullable()
    .default(null),
  matchGroup: z.string().max(120).nullable().default(null),
  limits: z
    .record(z.string(), z.object({ enabled: z.boolean(), limit: z.string().nullable(), note: z.string() }))
    .default({}),
});
export type NetDoc = z.infer<typeof netDoc>;
export type StoredNet = NetDoc & { id: string; lineageId: string; version: number };

export const partKinds = [
  "resistor",
  "capacitor",
  "inductor",
  "ferrite",
  "ic",
  "connector",
  "other",
] as const;
export const partDoc = z.object({
  reference: z.string().trim().min(1).max(40),
  partNumber: z.string().trim().max(80).default(""),
  /** As written in the list, for example 33R, 100n. */
  value: z.string().trim().max(40).default(""),
  kind: z.enum(partKinds),
  /** Pin names when the list gives them; else null. */
  pins: z.array(z.string().max(40)).max(3000).default([]),
});
export type PartDoc = z.infer<typeof partDoc>;
export type StoredPart = PartDoc & { id: string; lineageId: string };

export const neighbourDoc = z.object({
  net: z.string().max(120),
  neighbour: z.string().max(120),
  layer: z.string().max(60),
  gap: positiveLength,
  parallelLength: positiveLength,
});
export type NeighbourDoc = z.infer<typeof neighbourDoc>;
