import { toSi, type Dimension, type Quantity } from "@/lib/si/units";

/** Converts typed quantities to SI numbers, each distinct text once: a board says "0.127 mm" ten thousand times. */
export class SiValues {
  private readonly known = new Map<string, number>();

  of(quantity: Quantity, dimension: Dimension): number {
    const key = `${dimension} ${quantity.value} ${quantity.unit}`;
    let value = this.known.get(key);
    if (value === undefined) this.known.set(key, (value = toSi(quantity, dimension)));
    return value;
  }

  orNull(quantity: Quantity | null, dimension: Dimension): number | null {
    return quantity ? this.of(quantity, dimension) : null;
  }
}
