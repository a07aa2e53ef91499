import { writeDelimited } from "@/lib/formats/delimited/write";
import { formatPlainQuantity } from "@/lib/formats/stackup-list/plain-quantity";
import type { StoredMaterial } from "@/lib/schemas/material";
import { dkAtFrequency, genericMaterials, type LibraryMaterial } from "@/lib/si/materials";
import { DomainError } from "@/lib/si/errors";
import { toSi } from "@/lib/si/units";

/** A line of the table: the team's own entry, or one of the generic library. */
export interface MaterialRow {
  id: string;
  material: LibraryMaterial;
  /** null: of the generic library */
  own: StoredMaterial | null;
}

export interface MaterialFilter {
  q: string;
  kind: string;
  /** "team", "generic", or both where empty */
  whose: string;
}

/** Frequency at which materials are compared [Hz]. */
const COMPARED_AT = 1e10;

/** The team's own first, then the generic library. */
export function materialRows(own: readonly StoredMaterial[]): MaterialRow[] {
  return [
    ...own.map((entry) => ({ id: entry.id, material: entry, own: entry })),
    ...genericMaterials.map((entry) => ({ id: `generic ${entry.name}`, material: entry, own: null })),
  ];
}

/** Every word of the search stands somewhere in the row. */
export function filterMaterials(rows: readonly MaterialRow[], filter: MaterialFilter): MaterialRow[] {
  const words = filter.q.toLowerCase().split(/\s+/).filter(Boolean);
  return rows.filter(({ material, own }) => {
    if (filter.kind !== "" && material.kind !== filter.kind) return false;
    if (filter.whose !== "" && (filter.whose === "team") !== (own !== null)) return false;
    const text = `${material.name} ${material.glassStyle} ${material.source} ${own ? "team" : "generic"}`;
    const searched = text.toLowerCase();
    return words.every((word) => searched.includes(word));
  });
}

/** Dk carried to 10 GHz; null where Dk or Df is missing, or its frequency is too far away. */
export function comparedDk({ dk, df, frequency }: LibraryMaterial): number | null {
  if (dk === null || df === null || frequency === null) return null;
  try {
    return dkAtFrequency(Number(dk), Number(df), toSi(frequency, "frequency"), COMPARED_AT);
  } catch (error) {
    if (error instanceof DomainError) return null;
    throw error;
  }
}

export function materialsCsv(rows: readonly MaterialRow[]): string {
  return writeDelimited([
    [
      "name",
      "kind",
      "whose",
      "glass style",
      "resin %",
      "Dk",
      "Df",
      "Dk and Df at",
      "Dk at 10 GHz",
      "thickness",
      "roughness rms",
      "origin",
      "source",
    ],
    ...rows.map(({ material, own }) => [
      material.name,
      material.kind,
      own ? "team" : "generic",
      material.glassStyle,
      material.resinPercent ?? "",
      material.dk ?? "",
      material.df ?? "",
      formatPlainQuantity(material.frequency),
      comparedDk(material)?.toFixed(2) ?? "",
      formatPlainQuantity(material.thickness),
      formatPlainQuantity(material.roughness),
      own?.origin ?? "assumed",
      material.source,
    ]),
  ]);
}
