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
  source: string;
}

const FROM_MEMORY = "typical, from memory; the laminate's data sheet decides";

export const dielectricFamilies: readonly DielectricFamily[] = [
  family("glass-epoxy", "Glass-epoxy, standard", "4.3", "0.020", 1e9),
  family("glass-epoxy-high-tg", "Glass-epoxy, high Tg", "4.2", "0.018", 1e9),
  family("glass-epoxy-halogen-free", "Glass-epoxy, halogen-free", "4.4", "0.015", 1e9),
  family("mid-loss", "Modified epoxy, mid loss", "3.9", "0.010", 1e10),
  family("low-loss", "Modified epoxy, low loss", "3.7", "0.006", 1e10),
  family("very-low-loss", "Polyphenylene ether, very low loss", "3.4", "0.003", 1e10),
  family("ultra-low-loss", "Polyphenylene ether, low-Dk glass", "3.1", "0.0018", 1e10),
  family("polyimide-glass", "Glass-polyimide", "4.1", "0.014", 1e9),
  family("hydrocarbon-ceramic", "Ceramic-filled hydrocarbon", "3.5", "0.0035", 1e10),
  family("ptfe-glass", "PTFE on glass", "2.2", "0.0010", 1e10),
  family("polyimide-film", "Polyimide film", "3.4", "0.008", 1e9, "flexible"),
  family("solder-mask", "Solder mask, liquid", "3.5", "0.025", 1e9, "mask"),
];

function family(
  id: string,
  name: string,
  dk: string,
  df: string,
  frequency: number,
  use: DielectricFamily["use"] = "laminate",
): DielectricFamily {
  return { id, name, dk, df, frequency, use, source: FROM_MEMORY };
}
