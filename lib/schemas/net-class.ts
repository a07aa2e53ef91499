import { z } from "zod";
import { id, nameText, version } from "./common";
import {
  capacitance,
  decimalText,
  frequency,
  length,
  lineWidth,
  quantity,
  resistance,
  time,
  voltage,
} from "./quantity";
import { sensibleLimits } from "./sensible-limits";

export const signalKinds = ["data", "clock", "strobe", "slow"] as const;

export const terminationSchemes = ["none", "series", "parallel", "thevenin", "rc", "differential"] as const;
export const termination = z.object({
  scheme: z.enum(terminationSchemes),
  /** series: the resistor; parallel, differential, rc: the end resistor; thevenin: to the upper rail. */
  resistance: resistance.nullable().default(null),
  /** thevenin: to the lower rail. */
  resistanceLow: resistance.nullable().default(null),
  capacitance: capacitance.nullable().default(null),
  /** parallel: the voltage it goes to (0 V when absent). */
  voltage: voltage.nullable().default(null),
});
export type TerminationDoc = z.infer<typeof termination>;

/** Width (and gap, for a pair) on one allowed layer. */
export const classLayer = z.object({
  layerLineageId: id,
  width: lineWidth.nullable().default(null),
  gap: lineWidth.nullable().default(null),
});

/** A rule's limit where it differs from the project's; value in the rule's own unit. */
export const limitOverride = z.object({
  enabled: z.boolean().default(true),
  limit: decimalText.nullable().default(null),
  note: z.string().trim().max(300).default(""),
});
export const limitOverrides = z.record(z.string().max(60), limitOverride);

export const netClassDoc = z.object({
  name: nameText(60),
  kind: z.enum(["single", "differential"]),
  targetImpedance: quantity("resistance", { positive: true, max: 1000 }).nullable().default(null),
  tolerancePercent: decimalText
    .refine((t) => Number(t) > 0 && Number(t) <= 50, "Write 0 to 50 %.")
    .default("10"),
  layers: z.array(classLayer).max(60).default([]),
  driverModelLineageId: id.nullable().default(null),
  receiverModelLineageId: id.nullable().default(null),
  /** 10–90 % rise time; when absent the driver model's. */
  edge: time.nullable().default(null),
  /** data, strobe: bit rate; clock: frequency. */
  rate: frequency.nullable().default(null),
  signal: z.enum(signalKinds).default("data"),
  termination: termination.default({
    scheme: "none",
    resistance: null,
    resistanceLow: null,
    capacitance: null,
    voltage: null,
  }),
  /** Least edge-to-edge spacing to a foreign net. */
  spacing: length.nullable().default(null),
  flightTimeMax: time.nullable().default(null),
  limits: limitOverrides.default({}),
  /** Name patterns that put a net into this class at import. */
  netPatterns: z.array(z.string().trim().min(1).max(80)).max(50).default([]),
});
export type NetClassDoc = z.infer<typeof netClassDoc>;
export type StoredNetClass = NetClassDoc & { id: string; lineageId: string; version: number };
/** What a person sends of a class. */
export const sentNetClass = netClassDoc.superRefine(({ limits }, ctx) =>
  sensibleLimits(limits, ctx, "limits"),
);
export const netClassUpdate = z.object({ version, netClass: sentNetClass });
