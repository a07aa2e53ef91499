import { z } from "zod";
import { id, nameText, origin, version } from "./common";
import { decimalText, frequency, length, positiveLength } from "./quantity";

export const materialKinds = ["laminate", "prepreg", "foil", "mask"] as const;
export const materialKind = z.enum(materialKinds);

const resinText = decimalText.refine(
  (t) => Number(t) > 0 && Number(t) <= 100,
  "Resin is above 0 and at most 100 %.",
);
const dkText = decimalText
  .refine((t) => Number(t) >= 1, "Dk is at least 1 (air).")
  .refine((t) => Number(t) <= 100, "Dk is at most 100. Check the number.");
const dfText = decimalText.refine((t) => Number(t) >= 0 && Number(t) < 1, "Df is between 0 and 1.");

/** Where a material's values come from, as a layer and a team's entry carry it. */
export const sourceNote = z.string().trim().max(200, "At most 200 characters.");

/** A team's own entry in the library of materials. Each kind has the fields that a layer of it takes. */
export const materialDoc = z
  .object({
    name: nameText(80),
    kind: materialKind,
    /** IPC-4412 number; "" where there is no woven glass, or several kinds of it */
    glassStyle: z.string().trim().max(20, "At most 20 characters.").default(""),
    resinPercent: resinText.nullable().default(null),
    dk: dkText.nullable().default(null),
    df: dfText.nullable().default(null),
    frequency: frequency.nullable().default(null),
    /** Laminate: its thickness. Prepreg: one ply without copper to fill. Mask: over the laminate. Foil: its base. */
    thickness: positiveLength.nullable().default(null),
    /** Foil: rms of the bonded side. */
    roughness: length.nullable().default(null),
    source: sourceNote.min(
      1,
      "Say where these values come from: a data sheet, a measurement, a publication.",
    ),
    origin: origin.default("assumed"),
  })
  .superRefine((doc, ctx) => {
    const refuse = (field: string, message: string) =>
      ctx.addIssue({ code: "custom", path: [field], message });
    if (doc.kind === "foil") {
      if (!doc.thickness && !doc.roughness)
        refuse("thickness", "A foil has a thickness, a roughness, or both: fill one.");
      for (const field of ["dk", "df", "frequency", "resinPercent"] as const)
        if (doc[field] !== null) refuse(field, "A foil is copper: leave this empty.");
      if (doc.glassStyle !== "") refuse("glassStyle", "A foil is copper: leave this empty.");
      return;
    }
    if (doc.dk === null) refuse("dk", `A ${doc.kind} needs a Dk.`);
    if (doc.frequency === null) refuse("frequency", "Say at which frequency Dk and Df hold.");
    if (doc.roughness !== null) refuse("roughness", "Roughness is the foil's: leave this empty.");
    if (doc.kind === "mask" && (doc.glassStyle !== "" || doc.resinPercent !== null))
      refuse(doc.glassStyle === "" ? "resinPercent" : "glassStyle", "A mask has no glass: leave this empty.");
  });
export type MaterialDoc = z.infer<typeof materialDoc>;

export interface StoredMaterial extends MaterialDoc {
  id: string;
  version: number;
  createdAt: number;
  updatedAt: number;
  /** null where this person's account is gone */
  createdByName: string | null;
}

export const materialParams = z.object({ materialId: id });
export const materialInput = z.object({ material: materialDoc });
export const materialUpdate = z.object({ version, material: materialDoc });
