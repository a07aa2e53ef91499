import { fromSi, type Quantity } from "../units";
import { copperFoils, foilTreatments } from "./copper-foils";
import { dielectricFamilies, type DielectricFamily } from "./dielectrics";
import { glassStyles } from "./glass-styles";
import { plyOfFamily } from "./plies";

export type MaterialKind = "laminate" | "prepreg" | "foil" | "mask";

/** One line of the library: what a stackup's layer can be filled in from. */
export interface LibraryMaterial {
  kind: MaterialKind;
  name: string;
  /** glass style by its IPC-4412 number; "" where there is none */
  glassStyle: string;
  resinPercent: string | null;
  dk: string | null;
  df: string | null;
  frequency: Quantity | null;
  /** laminate, mask: as laid; prepreg: one ply without copper to fill; foil: base thickness */
  thickness: Quantity | null;
  /** foil: rms of the bonded side */
  roughness: Quantity | null;
  source: string;
}

/** Resins whose plies are listed by style beside standard glass-epoxy, and the styles that are usual with them. */
const PLY_FAMILIES = ["glass-epoxy-high-tg", "mid-loss", "low-loss", "very-low-loss", "ultra-low-loss"];
const PLY_STYLES = ["1027", "1035", "106", "1067", "1078", "1080", "1086", "2113", "3313", "2116"];

const BY_MIXING =
  "computed from the family by the logarithmic mixing rule (Lichtenecker 1926); thickness from fabric weight and resin";

/** The generic library, without brands: laminates, prepregs by glass style, foils, masks. */
export const genericMaterials: readonly LibraryMaterial[] = [
  ...dielectricFamilies.filter(({ use }) => use !== "mask").map(laminate),
  ...glassStyles.map((style) => ({
    ...blank("prepreg", `Glass-epoxy, ${style.style}`, style.source),
    glassStyle: style.style,
    resinPercent: style.resinPercent,
    dk: style.dk,
    df: style.df,
    frequency: { value: "1", unit: "GHz" },
    thickness: style.thickness,
  })),
  ...PLY_FAMILIES.flatMap((id) => dielectricFamilies.filter((family) => family.id === id)).flatMap(pliesOf),
  ...copperFoils.map((foil) => ({
    ...blank("foil", `Foil, ${foil.name}`, foil.source),
    thickness: foil.weight,
  })),
  ...foilTreatments.map((treatment) => ({
    ...blank(
      "foil",
      treatment.profile ? `${treatment.name}, profile ${treatment.profile}` : treatment.name,
      treatment.source,
    ),
    roughness: fromSi(treatment.roughness, "µm"),
  })),
  ...dielectricFamilies
    .filter(({ use }) => use === "mask")
    .map((family) => ({
      ...laminate(family),
      kind: "mask" as const,
      thickness: { value: family.id === "solder-mask" ? "25" : "50", unit: "µm" },
    })),
];

function laminate(family: DielectricFamily): LibraryMaterial {
  const tg = family.tg ? `Tg ${family.tg}; ` : "";
  return {
    ...blank("laminate", family.name, `${tg}${family.source}`),
    resinPercent: family.base?.resinPercent ?? null,
    dk: family.dk,
    df: family.df,
    frequency: fromSi(family.frequency, "GHz"),
  };
}

function pliesOf(family: DielectricFamily): LibraryMaterial[] {
  return glassStyles
    .filter(({ style }) => PLY_STYLES.includes(style))
    .map((style) => {
      const ply = plyOfFamily(family, style, Number(style.resinPercent));
      return {
        ...blank("prepreg", `${family.name}, ${style.style}`, BY_MIXING),
        glassStyle: style.style,
        resinPercent: style.resinPercent,
        dk: ply.dk.toFixed(2),
        df: ply.df.toFixed(4),
        frequency: fromSi(family.frequency, "GHz"),
        thickness: { value: (ply.thickness * 1e6).toFixed(0), unit: "µm" },
      };
    });
}

function blank(kind: MaterialKind, name: string, source: string): LibraryMaterial {
  return {
    kind,
    name,
    glassStyle: "",
    resinPercent: null,
    dk: null,
    df: null,
    frequency: null,
    thickness: null,
    roughness: null,
    source,
  };
}
