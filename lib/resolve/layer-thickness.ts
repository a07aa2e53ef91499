import { Decimal, toSiExact, type Quantity } from "@/lib/si/units";
import type { StackupLayerDoc } from "@/lib/schemas/stackup";

/**
 * Finished thickness of each layer [m], exact; null where an input of it is missing.
 *
 * Copper: base foil + plating. Core, typed prepreg, mask (over laminate): as typed. Pressed prepreg: Σ plies − Σ
 * facing copper × (1 − coverage), since resin fills the gaps of the copper that is pressed into it. The outermost
 * copper is etched after pressing, stands on the laminate and takes no resin.
 */
export function layerThicknesses(layers: readonly StackupLayerDoc[]): (Decimal | null)[] {
  const outermost = new Set([layers.findIndex(isCopperLayer), layers.findLastIndex(isCopperLayer)]);
  return layers.map((layer, index) => {
    if (isCopperLayer(layer)) return copperThickness(layer);
    if (layer.thicknessMode === "typed") return metres(layer.thickness);
    let pressed = new Decimal(0);
    for (const ply of layer.plies) pressed = pressed.plus(toSiExact(ply.thickness, "length").times(ply.count));
    for (const beside of [index - 1, index + 1]) {
      const copper = layers[beside];
      if (!copper || !isCopperLayer(copper) || outermost.has(beside)) continue;
      const thickness = copperThickness(copper);
      if (!thickness || copper.coveragePercent === null) return null;
      pressed = pressed.minus(thickness.times(new Decimal(100).minus(copper.coveragePercent)).div(100));
    }
    return pressed.gt(0) ? pressed : null;
  });
}

export function isCopperLayer(layer: Pick<StackupLayerDoc, "kind">): boolean {
  return layer.kind === "foil" || layer.kind === "signal" || layer.kind === "plane";
}

function copperThickness(layer: StackupLayerDoc): Decimal | null {
  const base = metres(layer.baseFoil);
  return base && base.plus(metres(layer.plating) ?? 0);
}

function metres(quantity: Quantity | null): Decimal | null {
  return quantity ? toSiExact(quantity, "length") : null;
}
