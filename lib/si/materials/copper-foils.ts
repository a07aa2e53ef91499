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
  foil("4 oz", "4"),
];

/** How rough a foil's bonded side is, by the way it was made and treated. */
export interface FoilTreatment {
  id: string;
  name: string;
  /** profile class of IPC-4562: S standard, L low (Rz at most 10.2 µm), V very low (at most 5.1 µm); "" below these */
  profile: "S" | "L" | "V" | "";
  /** roughness of the bonded side, typical [m]: rms (Rq), and peak to valley (Rz) */
  roughness: number;
  peakToValley: number;
  source: string;
}

const PROFILES = "profile class by IPC-4562, roughness typical, from memory";

export const foilTreatments: readonly FoilTreatment[] = [
  treatment("standard", "Standard electrodeposited", "S", 2.5, 10),
  treatment("high-temperature-elongation", "High-temperature elongation", "S", 2.2, 8.5),
  treatment("low-profile", "Low profile", "L", 1.8, 7),
  treatment("reverse-treated", "Reverse-treated", "V", 1.5, 5),
  treatment("very-low-profile", "Very low profile", "V", 0.8, 3.5),
  treatment("hyper-very-low-profile", "Hyper very low profile", "", 0.4, 1.5),
  treatment("rolled", "Rolled", "", 0.4, 1.5),
];

function foil(name: string, ounces: string): CopperFoil {
  return {
    name,
    weight: { value: ounces, unit: "oz" },
    gramsPerSquareMetre: Number(ounces) * 305,
    source: FROM_MEMORY,
  };
}

function treatment(
  id: string,
  name: string,
  profile: FoilTreatment["profile"],
  rmsMicrometres: number,
  rzMicrometres: number,
): FoilTreatment {
  return {
    id,
    name,
    profile,
    roughness: rmsMicrometres / 1e6,
    peakToValley: rzMicrometres / 1e6,
    source: PROFILES,
  };
}
