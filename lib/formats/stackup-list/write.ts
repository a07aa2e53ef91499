import type { StackupDoc, StackupLayerDoc } from "@/lib/schemas/stackup";
import { formatPlainQuantity } from "./plain-quantity";
import { writeDelimited } from "../delimited/write";
import { stackupColumns, type StackupColumn } from "./columns";
import { writePlies } from "./plies";

/** A stackup as CSV, one row a layer from top to bottom; readStackupList reads it back as it was. */
export function writeStackupList(doc: Pick<StackupDoc, "layers">): string {
  return writeDelimited([
    stackupColumns.map(({ label }) => label),
    ...doc.layers.map((layer) => stackupColumns.map(({ id }) => cellOf(layer, id))),
  ]);
}

function cellOf(layer: StackupLayerDoc, column: StackupColumn): string {
  switch (column) {
    case "thickness":
      return layer.thicknessMode === "pressed" ? "pressed" : formatPlainQuantity(layer.thickness);
    case "tolerance":
      return layer.tolerancePercent ?? "";
    case "coverage":
      return layer.coveragePercent ?? "";
    case "plies":
      return writePlies(layer.plies);
    case "dkFrequency":
    case "baseFoil":
    case "plating":
    case "etch":
    case "roughness":
    case "maskOverTrace":
      return formatPlainQuantity(layer[column]);
    default:
      return layer[column] ?? "";
  }
}
