import type { GlassKind } from "./glass-kinds";

/** Generic dielectric families: starting points until the laminate's data sheet is at hand. */
export interface DielectricFamily {
  id: string;
  name: string;
  /** typical relative permittivity and loss tangent at `frequency` */
  dk: string;
  df: string;
  /** [Hz] */
  frequency: number;
  use: "laminate" | "mask" | "flexible";
  /** glass transition as the trade classes it; "" where it is not classed so */
  tg: string;
  /** the reinforcement to which dk and df belong; null where there is no woven glass, or it is not told */
  base: { glass: GlassKind["id"]; resinPercent: string } | null;
  source: string;
}

const FROM_MEMORY = "typical, from memory; the laminate's data sheet decides";

const THICK = { glass: "e-glass", resinPercent: "44" } as const;
const THIN = { glass: "e-glass", resinPercent: "55" } as const;
const THIN_LOW_DK = { glass: "low-dk-glass", resinPercent: "55" } as const;

export const dielectricFamilies: readonly DielectricFamily[] = [
  family("glass-epoxy", "Glass-epoxy, standard", "4.3", "0.020", 1e9, { tg: "130 to 140 °C", base: THICK }),
  family("glass-epoxy-mid-tg", "Glass-epoxy, mid Tg", "4.3", "0.019", 1e9, {
    tg: "150 to 160 °C",
    base: THICK,
  }),
  family("glass-epoxy-high-tg", "Glass-epoxy, high Tg", "4.2", "0.018", 1e9, {
    tg: "170 to 180 °C",
    base: THICK,
  }),
  family("glass-epoxy-halogen-free", "Glass-epoxy, halogen-free", "4.4", "0.015", 1e9, {
    tg: "150 °C",
    base: THICK,
  }),
  family("mid-loss", "Modified epoxy, mid loss", "3.9", "0.010", 1e10, { tg: "170 to 200 °C", base: THIN }),
  family("low-loss", "Modified epoxy, low loss", "3.7", "0.006", 1e10, { tg: "180 to 200 °C", base: THIN }),
  family("very-low-loss", "Polyphenylene ether, very low loss", "3.4", "0.003", 1e10, {
    tg: "200 °C",
    base: THIN,
  }),
  family("ultra-low-loss", "Polyphenylene ether, low-Dk glass", "3.1", "0.0018", 1e10, {
    tg: "200 °C",
    base: THIN_LOW_DK,
  }),
  family("polyimide-glass", "Glass-polyimide", "4.1", "0.014", 1e9, { tg: "250 °C", base: THICK }),
  family("bismaleimide-glass", "Bismaleimide triazine on glass", "4.0", "0.012", 1e9, {
    tg: "180 to 200 °C",
    base: THICK,
  }),
  family("cyanate-ester-glass", "Cyanate ester on glass", "3.8", "0.009", 1e9, {
    tg: "230 to 250 °C",
    base: THICK,
  }),
  family("hydrocarbon-ceramic", "Ceramic-filled hydrocarbon", "3.5", "0.0035", 1e10),
  family("ptfe-glass", "PTFE on glass", "2.2", "0.0010", 1e10),
  family("ptfe-ceramic", "Ceramic-filled PTFE", "3.0", "0.0013", 1e10),
  family("polyimide-film", "Polyimide film", "3.4", "0.008", 1e9, { use: "flexible" }),
  family("liquid-crystal-polymer", "Liquid crystal polymer film", "3.0", "0.0025", 1e10, { use: "flexible" }),
  family("solder-mask", "Solder mask, liquid", "3.5", "0.025", 1e9, { use: "mask" }),
  family("solder-mask-film", "Solder mask, dry film", "3.6", "0.025", 1e9, { use: "mask" }),
];

function family(
  id: string,
  name: string,
  dk: string,
  df: string,
  frequency: number,
  more: Partial<Pick<DielectricFamily, "use" | "tg" | "base">> = {},
): DielectricFamily {
  return {
    id,
    name,
    dk,
    df,
    frequency,
    use: "laminate",
    tg: "",
    base: null,
    source: FROM_MEMORY,
    ...more,
  };
}
