import type { RolePin } from "@/lib/formats/pin-roles";
import { pinRole, type BindingDoc, type PinRole } from "@/lib/schemas/model";
import type { DraftProposals } from "@/lib/schemas/name-proposals";

/** A rule as it is edited; the key lasts while it is moved. */
export interface RoleRow extends BindingDoc {
  key: string;
}

let made = 0;
export const roleRow = (rule: Partial<BindingDoc> & { role: PinRole }): RoleRow => ({
  key: `rule-${++made}`,
  referencePattern: "*",
  partNumberPattern: "*",
  pinPattern: "*",
  netPattern: "*",
  modelLineageId: null,
  ...rule,
});

export const ruleOf = ({ key: _key, ...rule }: RoleRow): BindingDoc => rule;

/** The list with one rule a place further up (−1) or down (1). */
export function moved(rows: readonly RoleRow[], index: number, by: -1 | 1): RoleRow[] {
  const next = [...rows];
  const [row] = next.splice(index, 1);
  if (row) next.splice(index + by, 0, row);
  return next;
}

/** The short form of the pins, written out. */
export function pinsOf({ nets, references, pins }: DraftProposals["pins"]): RolePin[] {
  return pins.map(([net, reference, pin, role]) => ({
    net: nets[net] ?? "",
    reference: references[reference]?.reference ?? "",
    partNumber: references[reference]?.partNumber ?? "",
    pin,
    role: pinRole.safeParse(role).data ?? null,
  }));
}

export interface PartPins {
  reference: string;
  partNumber: string;
  kind: string;
  pins: number;
}

/** Parts that could drive, those with most pins first; resistors and their like do not. */
export function activeParts({ references, pins }: DraftProposals["pins"]): PartPins[] {
  const counts = references.map(() => 0);
  for (const [, reference] of pins) counts[reference] = (counts[reference] ?? 0) + 1;
  return references
    .map((part, index) => ({ ...part, pins: counts[index] ?? 0 }))
    .filter(({ kind }) => kind === "ic" || kind === "connector" || kind === "other")
    .sort((a, b) => b.pins - a.pins || (a.reference < b.reference ? -1 : 1));
}
