import { z } from "zod";
import { origins } from "@/lib/schemas/common";
import { materialDoc, type MaterialDoc, materialKinds } from "@/lib/schemas/material";
import type { LibraryMaterial } from "@/lib/si/materials";
import { type Dimension, formatQuantity, parseQuantity, type Quantity } from "@/lib/si/units";

/** The fields as texts: they are read when the form is sent, and say then what is wrong with them. */
const texts = z.object({
  name: z.string(),
  kind: z.enum(materialKinds),
  glassStyle: z.string(),
  resinPercent: z.string(),
  dk: z.string(),
  df: z.string(),
  frequency: z.string(),
  thickness: z.string(),
  roughness: z.string(),
  source: z.string(),
  origin: z.enum(origins),
});
export type MaterialTexts = z.infer<typeof texts>;
export type MaterialField = keyof MaterialTexts;

/** The fields that a kind of material has, besides name, source and origin. */
export const fieldsOfKind: Record<MaterialDoc["kind"], ReadonlySet<MaterialField>> = {
  laminate: new Set(["glassStyle", "resinPercent", "dk", "df", "frequency", "thickness"]),
  prepreg: new Set(["glassStyle", "resinPercent", "dk", "df", "frequency", "thickness"]),
  foil: new Set(["thickness", "roughness"]),
  mask: new Set(["dk", "df", "frequency", "thickness"]),
};

/** @param unit  of a bare thickness */
export function materialForm(unit: string) {
  return texts.transform((form, ctx): MaterialDoc => {
    const has = fieldsOfKind[form.kind];
    let readable = true;
    const refuse = (field: PropertyKey | undefined, message: string) => {
      readable = false;
      ctx.addIssue({ code: "custom", path: field === undefined ? [] : [field], message });
    };
    const number = (field: "resinPercent" | "dk" | "df"): string | null => {
      const text = form[field].replace("%", "").replace(",", ".").trim();
      return has.has(field) && text !== "" ? text : null;
    };
    const quantity = (
      field: "frequency" | "thickness" | "roughness",
      dimension: Dimension,
      bare: string,
    ): Quantity | null => {
      const text = form[field].trim();
      if (!has.has(field) || text === "") return null;
      try {
        return parseQuantity(text, dimension, bare);
      } catch (error) {
        refuse(field, error instanceof Error ? error.message : "This cannot be read.");
        return null;
      }
    };
    const doc = {
      name: form.name,
      kind: form.kind,
      glassStyle: has.has("glassStyle") ? form.glassStyle : "",
      resinPercent: number("resinPercent"),
      dk: number("dk"),
      df: number("df"),
      frequency: quantity("frequency", "frequency", "GHz"),
      thickness: quantity("thickness", "length", unit),
      roughness: quantity("roughness", "length", "µm"),
      source: form.source,
      origin: form.origin,
    };
    if (!readable) return z.NEVER;
    const parsed = materialDoc.safeParse(doc);
    if (parsed.success) return parsed.data;
    for (const issue of parsed.error.issues) refuse(issue.path[0], issue.message);
    return z.NEVER;
  });
}

/** What the form begins with: an entry to edit, one to copy, or nothing. */
export function textsOf(from: Partial<LibraryMaterial & Pick<MaterialDoc, "origin">>): MaterialTexts {
  const written = (quantity: Quantity | null | undefined) => (quantity ? formatQuantity(quantity) : "");
  return {
    name: from.name ?? "",
    kind: from.kind ?? "laminate",
    glassStyle: from.glassStyle ?? "",
    resinPercent: from.resinPercent ?? "",
    dk: from.dk ?? "",
    df: from.df ?? "",
    frequency: written(from.frequency) || "1 GHz",
    thickness: written(from.thickness),
    roughness: written(from.roughness),
    source: from.source ?? "",
    origin: from.origin ?? "data sheet",
  };
}

export const fieldWords: Record<string, string> = {
  name: "name",
  kind: "kind",
  glassStyle: "glass style",
  resinPercent: "resin content",
  dk: "Dk",
  df: "Df",
  frequency: "frequency of Dk and Df",
  thickness: "thickness",
  roughness: "roughness",
  source: "source",
  origin: "origin",
};
