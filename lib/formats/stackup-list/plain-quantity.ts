import type { Quantity } from "@/lib/si/units";

/** As typed, with an ordinary minus: for files, not for the screen. */
export function formatPlainQuantity(quantity: Quantity | null): string {
  return quantity ? `${quantity.value} ${quantity.unit}` : "";
}
