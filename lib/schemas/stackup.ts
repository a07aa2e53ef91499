import { z } from "zod";
import { processDoc, type ProcessDoc } from "./process";
import { id, nameText, origin, version } from "./common";
import { sourceNote } from "./material";
import { decimalText, frequency, length, positiveLength } from "./quantity";

export const layerKinds = ["mask", "foil", "signal", "plane", "core", "prepreg"] as const;
export const layerKind = z.enum(layerKinds);
export type LayerKind = z.infer<typeof layerKind>;

const percentText = decimalText.refine((t) => Number(t) >= 0 && Number(t) <= 100, "Write 0 to 100 %.");
const dkText = decimalText
  .refine((t) => Number(t) >= 1, "Dk is at least 1 (air).")
  .refine((t) => Number(t) <= 100, "Dk is at most 100. Check the number.");
const dfText = decimalText.refine((t) => Number(t) >= 0 && Number(t) < 1, "Df is between 0 and 1.");

/** One ply of a prepreg opening: glass style by IPC-4412 number, as delivered thickness, how many. */
export const ply = z.object({
  style: z.string().trim().max(20),
  resinPercent: percentText.nullable(),
  thickness: positiveLength,
  count: z.number().int().min(1).max(12),
});

/** Ordered top to bottom. Copper: foil, signal, plane. Dielectric: core, prepreg. Mask outside. */
export const stackupLayer = z.object({
  id: id.optional(),
  lineageId: id.optional(),
  kind: layerKind,
  name: nameText(60),
  material: z.string().trim().max(120).default(""),
  /** Dielectric: its thickness. Mask: over laminate. Copper: null (base foil + plating). Pressed prepreg: null. */
  thickness: positiveLength.nullable(),
  thicknessMode: z.enum(["typed", "pressed"]).default("typed"),
  tolerancePercent: percentText.nullable().default(null),
  plies: z.array(ply).max(12).default([]),
  dk: dkText.nullable().default(null),
  df: dfText.nullable().default(null),
  dkFrequency: frequency.nullable().default(null),
  baseFoil: positiveLength.nullable().default(null),
  plating: length.nullable().default(null),
  coveragePercent: percentText.nullable().default(null),
  /** Foot width minus crown width of an etched trace, both sides together. */
  etch: length.nullable().default(null),
  roughness: length.nullable().default(null),
  /** Mask only: thickness over a trace. */
  maskOverTrace: length.nullable().default(null),
  /** Plane: the net it carries, for example GND. */
  planeNet: z.string().trim().max(60).default(""),
  origin: origin.default("assumed"),
  /** Where the material's values come from; absent where nothing was said of it. */
  sourceNote: sourceNote.optional(),
});
export type StackupLayerDoc = z.infer<typeof stackupLayer>;

export const stackupDoc = z.object({
  name: nameText(80),
  /** left out: as usual, until the fabricator's own is entered */
  process: processDoc.optional(),
  layers: z
    .array(stackupLayer)
    .max(120)
    .superRefine((layers, ctx) => {
      const seen = new Map<string, number>();
      layers.forEach((layer, index) => {
        const key = layer.name.toLowerCase();
        const first = seen.get(key);
        if (first !== undefined)
          ctx.addIssue({
            code: "custom",
            path: [index, "name"],
            message: `Layers ${first + 1} and ${index + 1} are both named "${layer.name}". Give each its own name.`,
          });
        seen.set(key, index);
        const dielectric = layer.kind === "core" || layer.kind === "prepreg";
        if (dielectric && layer.thicknessMode === "typed" && !layer.thickness)
          ctx.addIssue({
            code: "custom",
            path: [index, "thickness"],
            message: `${layer.name} has no thickness.`,
          });
        if (layer.thicknessMode === "pressed" && (layer.kind !== "prepreg" || layer.plies.length === 0))
          ctx.addIssue({
            code: "custom",
            path: [index, "plies"],
            message: `${layer.name}: a pressed thickness needs a prepreg layer with at least one ply.`,
          });
      });
    }),
});
export type StackupDoc = z.infer<typeof stackupDoc>;

/** A stored layer always has its ids. */
export type StoredStackupLayer = StackupLayerDoc & { id: string; lineageId: string };
export interface StoredStackup {
  name: string;
  version: number;
  process?: ProcessDoc | undefined;
  layers: StoredStackupLayer[];
}
export const stackupUpdate = z.object({ version, stackup: stackupDoc });
