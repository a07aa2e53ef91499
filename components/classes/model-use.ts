import type { NetClassRow } from "@/lib/client/net-classes";
import type { StoredBinding } from "@/lib/schemas/model";
import { counted } from "./class-words";

export interface ModelUse {
  classes: string[];
  bindings: number;
}

/** Which classes and how many bindings name each model, by its lineage. */
export function modelUses(
  classes: readonly NetClassRow[],
  bindings: readonly StoredBinding[],
): ReadonlyMap<string, ModelUse> {
  const uses = new Map<string, ModelUse>();
  const of = (lineageId: string) => {
    const found = uses.get(lineageId) ?? { classes: [], bindings: 0 };
    uses.set(lineageId, found);
    return found;
  };
  for (const { name, driverModelLineageId, receiverModelLineageId } of classes)
    for (const lineageId of new Set([driverModelLineageId, receiverModelLineageId]))
      if (lineageId) of(lineageId).classes.push(name);
  for (const { modelLineageId } of bindings) if (modelLineageId) of(modelLineageId).bindings++;
  return uses;
}

export const NO_USE: ModelUse = { classes: [], bindings: 0 };

/** "2 classes, 3 bindings", "nothing". */
export function wordsOfUse({ classes, bindings }: ModelUse): string {
  const parts = [
    classes.length > 0 ? counted(classes.length, "class", "classes") : null,
    bindings > 0 ? counted(bindings, "binding") : null,
  ].filter((part) => part !== null);
  return parts.length > 0 ? parts.join(", ") : "nothing";
}
