import type { NetClassDoc, StoredNetClass } from "@/lib/schemas/net-class";
import type { LengthUnit } from "@/lib/client/preferences";
import { type Quantity, toSi } from "@/lib/si/units";
import { lengthDigits } from "./grids";

/** The class with this width, and gap where it is a pair's, on the layer; its other layers stay. */
export function withClassWidth(
  netClass: StoredNetClass,
  layerLineageId: string,
  shape: { width: number; gap: number | null },
  unit: LengthUnit,
): NetClassDoc {
  const { id: _id, lineageId: _lineage, version: _version, ...doc } = netClass;
  const was = doc.layers.find((layer) => layer.layerLineageId === layerLineageId);
  // What does not change stays as it was typed.
  const quantity = (metres: number, typed: Quantity | null | undefined): Quantity =>
    typed && toSi(typed, "length") === metres ? typed : { value: lengthDigits(metres, unit), unit };
  const entry = {
    layerLineageId,
    width: quantity(shape.width, was?.width),
    gap: netClass.kind === "differential" && shape.gap !== null ? quantity(shape.gap, was?.gap) : null,
  };
  return {
    ...doc,
    layers: was
      ? doc.layers.map((layer) => (layer.layerLineageId === layerLineageId ? entry : layer))
      : [...doc.layers, entry],
  };
}
