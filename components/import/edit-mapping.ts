import type { ListMapping } from "@/lib/schemas/import-list";

/** Field that a column holds, "" for none. */
export function fieldOf(mapping: ListMapping, column: number): string {
  return Object.entries(mapping.fields).find(([, field]) => field.column === column)?.[0] ?? "";
}

/** The mapping with this column holding that field: a field has one column, a column one field. */
export function withField(mapping: ListMapping, column: number, field: string): ListMapping {
  const fields = Object.fromEntries(
    Object.entries(mapping.fields).map(([id, present]) => {
      if (id === field) return [id, { ...present, column }];
      return [id, present.column === column ? { ...present, column: null } : present];
    }),
  );
  return { ...mapping, fields };
}

export function withUnit(mapping: ListMapping, field: string, unit: string): ListMapping {
  const present = mapping.fields[field] ?? { column: null, unit: null };
  return { ...mapping, fields: { ...mapping.fields, [field]: { ...present, unit } } };
}

export function withLayer(mapping: ListMapping, name: string, lineageId: string | null): ListMapping {
  return { ...mapping, layers: { ...mapping.layers, [name]: lineageId } };
}
