import type { NetClassDoc, StoredNetClass } from "@/lib/schemas/net-class";
import type { LengthUnit } from "@/lib/client/preferences";
import { lengthDigits } from "./grids";

/** The class with this width, and gap where it is a pair's, on the layer; its other layers stay. */
export function withClassWidth(
  netClass: StoredNetClass,
  layerLineageId: string,
  shape: { width: number; gap: number | null },
  unit: LengthUnit,
): NetClassDoc {
  const { id: _id, lineageId: _lineage, version: _version, ...doc } = netClass;
  const quantity = (metres: number) => ({ value: lengthDigits(metres, unit), unit });
  const entry = {
    layerLineageId,
    width: quantity(shape.width),
    gap: netClass.kind === "differential" && shape.gap !== null ? quantity(shape.gap) : null,
  };
  const present = doc.layers.some((layer) => layer.layerLineageId === layerLineageId);
  return {
    ...doc,
    layers: present
      ? doc.layers.map((layer) => (layer.layerLineageId === layerLineageId ? entry : layer))
      : [...doc.layers, entry],
  };
}
