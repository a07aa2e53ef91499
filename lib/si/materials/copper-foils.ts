import type { Quantity } from "../units";

/** Copper foil by its area weight (IPC-4562). */
export interface CopperFoil {
  /** "1/2 oz" */
  name: string;
  weight: Quantity;
  /** nominal area weight [g/m²] */
  gramsPerSquareMetre: number;
  source: string;
}

const FROM_MEMORY = "weights by IPC-4562, from memory; 1 oz/ft² = 305 g/m² ≈ 34.3 µm";

export const copperFoils: readonly CopperFoil[] = [
  foil("1/8 oz", "0.125"),
  foil("1/4 oz", "0.25"),
  foil("3/8 oz", "0.375"),
  foil("1/2 oz", "0.5"),
  foil("3/4 oz", "0.75"),
  foil("1 oz", "1"),
  foil("2 oz", "2"),
  foil("3 oz", "3"),
];

/** Roughness of the bonded side [m] rms by foil treatment; typical, from memory. */
export const foilTreatments = [
  { id: "standard", name: "Standard electrodeposited", roughness: 2.5e-6 },
  { id: "reverse-treated", name: "Reverse-treated", roughness: 1.5e-6 },
  { id: "very-low-profile", name: "Very low profile", roughness: 0.8e-6 },
  { id: "rolled", name: "Rolled", roughness: 0.4e-6 },
] as const;

function foil(name: string, ounces: string): CopperFoil {
  return {
    name,
    weight: { value: ounces, unit: "oz" },
    gramsPerSquareMetre: Number(ounces) * 305,
    source: FROM_MEMORY,
  };
}
