/** Types of the JSON columns, from the schemas that check them. */
export type { ProcessDoc } from "@/lib/schemas/process";
export type { StackupLayerDoc } from "@/lib/schemas/stackup";
export type { MaterialDoc } from "@/lib/schemas/material";
export type { ModelDoc } from "@/lib/schemas/model";
export type { NetClassDoc } from "@/lib/schemas/net-class";
export type { NetDoc, PartDoc } from "@/lib/schemas/net";
export type { RuleSetDoc } from "@/lib/schemas/rule-set";
export type { ImpedanceNote } from "@/lib/schemas/release";
