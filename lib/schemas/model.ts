import { z } from "zod";
import { id, nameText, origin, version } from "./common";
import { capacitance, resistance, time, voltage } from "./quantity";

/** Slow = weak driver and long edge; fast = strong driver and short edge. */
const corners = <T extends z.ZodType>(value: T) => z.object({ slow: value, typical: value, fast: value });

export const driverPart = z.object({
  /** High level of the open-circuit wave (supply); low level is 0 V. */
  vdd: voltage,
  /** Output resistance at the pin. */
  resistance: corners(resistance),
  /** 10–90 % rise time of the open-circuit wave (linear ramp: 0.8 × its 0–100 % time). */
  riseTime: corners(time),
  capacitance: capacitance.nullable().default(null),
});

export const receiverPart = z.object({
  vdd: voltage,
  capacitance: z.object({ min: capacitance, typical: capacitance, max: capacitance }),
  vil: voltage.nullable().default(null),
  vih: voltage.nullable().default(null),
  vilAc: voltage.nullable().default(null),
  vihAc: voltage.nullable().default(null),
  /** Level at which flight time is measured; half of vdd when absent. */
  vmeas: voltage.nullable().default(null),
  /** Absolute maximum beyond the rails at the pin. */
  maxAbove: voltage.nullable().default(null),
  maxBelow: voltage.nullable().default(null),
});

/** A pin's electrical model; a pin that can drive and receive has both parts. */
export const modelDoc = z
  .object({
    name: nameText(80),
    technology: z.string().trim().max(80).default(""),
    driver: driverPart.nullable().default(null),
    receiver: receiverPart.nullable().default(null),
    origin: origin.default("assumed"),
    note: z.string().trim().max(500).default(""),
  })
  .refine(
    (m) => m.driver !== null || m.receiver !== null,
    "A model drives, receives, or both: fill one part.",
  );
export type ModelDoc = z.infer<typeof modelDoc>;
export type StoredModel = ModelDoc & { id: string; lineageId: string; version: number };
export const modelUpdate = z.object({ version, model: modelDoc });

export const pinRoles = ["driver", "receiver", "either", "passive"] as const;
export const pinRole = z.enum(pinRoles);
export type PinRole = z.infer<typeof pinRole>;

const glob = z.string().trim().min(1).max(80);

/** Gives pins a role and a model in bulk. `*` any run, `?` one character; first match by order wins. */
export const bindingDoc = z.object({
  referencePattern: glob.default("*"),
  partNumberPattern: glob.default("*"),
  pinPattern: glob.default("*"),
  /** Net name pattern; narrows a binding to a bus. */
  netPattern: glob.default("*"),
  role: pinRole,
  modelLineageId: id.nullable().default(null),
});
export type BindingDoc = z.infer<typeof bindingDoc>;
export type StoredBinding = BindingDoc & { id: string };
export const bindingsUpdate = z.object({ version, bindings: z.array(bindingDoc).max(500) });
