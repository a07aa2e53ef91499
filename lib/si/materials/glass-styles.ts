import type { Quantity } from "../units";

/** A prepreg ply by its glass style (IPC-4412 number), in standard glass-epoxy. */
export interface GlassStyle {
  style: string;
  /** the fabric without resin [g/m²], and its thickness */
  gramsPerSquareMetre: number;
  fabricThickness: Quantity;
  resinPercent: string;
  /** as it fills an opening without copper */
  thickness: Quantity;
  /** at 1 GHz with that resin content */
  dk: string;
  df: string;
  source: string;
}

const FROM_MEMORY =
  "glass style by IPC-4412; weight, thickness, Dk and Df typical of standard glass-epoxy, from memory";

/** From the lightest fabric to the heaviest. */
export const glassStyles: readonly GlassStyle[] = [
  style("1027", 20, "19", "74", "48", "3.7", "0.022"),
  style("1037", 23, "27", "73", "54", "3.7", "0.022"),
  style("106", 24.4, "33", "72", "56", "3.7", "0.022"),
  style("1035", 30, "28", "68", "58", "3.8", "0.021"),
  style("1067", 31, "35", "70", "65", "3.7", "0.022"),
  style("1080", 46.8, "53", "65", "79", "3.9", "0.021"),
  style("1078", 47.8, "43", "63", "78", "3.9", "0.021"),
  style("1086", 53, "50", "61", "80", "3.9", "0.020"),
  style("2113", 78, "74", "55", "99", "4.0", "0.020"),
  style("3313", 81.4, "84", "55", "102", "4.0", "0.020"),
  style("3070", 93.6, "79", "53", "112", "4.1", "0.019"),
  style("2116", 104, "94", "52", "120", "4.1", "0.019"),
  style("1652", 139, "114", "48", "147", "4.2", "0.018"),
  style("1506", 165, "140", "45", "160", "4.3", "0.018"),
  style("7628", 204, "173", "44", "195", "4.4", "0.017"),
  style("7629", 210, "180", "45", "205", "4.3", "0.018"),
];

export function findGlassStyle(number: string): GlassStyle | undefined {
  return glassStyles.find((entry) => entry.style === number.trim());
}

function style(
  number: string,
  gramsPerSquareMetre: number,
  fabricMicrometres: string,
  resinPercent: string,
  micrometres: string,
  dk: string,
  df: string,
): GlassStyle {
  return {
    style: number,
    gramsPerSquareMetre,
    fabricThickness: { value: fabricMicrometres, unit: "µm" },
    resinPercent,
    thickness: { value: micrometres, unit: "µm" },
    dk,
    df,
    source: FROM_MEMORY,
  };
}
