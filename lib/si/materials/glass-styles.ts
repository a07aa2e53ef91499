import type { Quantity } from "../units";

/** A prepreg ply by its glass style (IPC-4412 number), in standard glass-epoxy. */
export interface GlassStyle {
  style: string;
  resinPercent: string;
  /** as it fills an opening without copper */
  thickness: Quantity;
  /** at 1 GHz with that resin content */
  dk: string;
  df: string;
  source: string;
}

const FROM_MEMORY =
  "glass style number by IPC-4412; thickness, Dk and Df typical of standard glass-epoxy, from memory";

export const glassStyles: readonly GlassStyle[] = [
  style("106", "72", "56", "3.7", "0.022"),
  style("1067", "70", "65", "3.7", "0.022"),
  style("1080", "65", "79", "3.9", "0.021"),
  style("1078", "63", "78", "3.9", "0.021"),
  style("2113", "58", "99", "4.0", "0.020"),
  style("3313", "57", "102", "4.0", "0.020"),
  style("2116", "54", "120", "4.1", "0.019"),
  style("1506", "48", "160", "4.3", "0.018"),
  style("7628", "44", "195", "4.4", "0.017"),
];

export function findGlassStyle(number: string): GlassStyle | undefined {
  return glassStyles.find((entry) => entry.style === number.trim());
}

function style(
  number: string,
  resinPercent: string,
  micrometres: string,
  dk: string,
  df: string,
): GlassStyle {
  return {
    style: number,
    resinPercent,
    thickness: { value: micrometres, unit: "µm" },
    dk,
    df,
    source: FROM_MEMORY,
  };
}
