import { DomainError } from "../errors";
import { findGlassStyle } from "../materials";
import type { TypedStackLayer } from "./typed-layers";

const blank: Omit<TypedStackLayer, "kind" | "name"> = {
  material: "",
  thickness: null,
  thicknessMode: "typed",
  tolerancePercent: null,
  plies: [],
  dk: null,
  df: null,
  dkFrequency: null,
  baseFoil: null,
  plating: null,
  coveragePercent: null,
  etch: null,
  roughness: null,
  maskOverTrace: null,
  planeNet: "",
  origin: "assumed",
};

const um = (value: number | string) => ({ value: String(value), unit: "µm" });
const ONE_GIGAHERTZ = { value: "1", unit: "GHz" };

/** Liquid solder mask. */
export function genericMask(name: string): TypedStackLayer {
  return {
    ...blank,
    kind: "mask",
    name,
    material: "Solder mask, liquid",
    thickness: um(25),
    maskOverTrace: um(15),
    dk: "3.5",
    df: "0.025",
    dkFrequency: ONE_GIGAHERTZ,
  };
}

/** Copper by ounces of base foil; outer layers are plated. */
export function genericCopper(
  kind: "plane" | "signal",
  name: string,
  options: { outer: boolean; ounces: string; coveragePercent: string },
): TypedStackLayer {
  const { outer, ounces, coveragePercent } = options;
  return {
    ...blank,
    kind,
    name,
    material: "Copper",
    baseFoil: { value: ounces, unit: "oz" },
    plating: outer ? um(25) : null,
    coveragePercent,
    etch: um(outer ? 25 : ounces === "1" ? 18 : 10),
    planeNet: kind === "plane" ? "GND" : "",
  };
}

/** Glass-epoxy core. */
export function genericCore(name: string, micrometres: number): TypedStackLayer {
  return {
    ...blank,
    kind: "core",
    name,
    material: "Glass-epoxy",
    thickness: um(micrometres),
    tolerancePercent: "10",
    dk: micrometres >= 300 ? "4.4" : "4.2",
    df: "0.019",
    dkFrequency: ONE_GIGAHERTZ,
  };
}

/** Glass-epoxy prepreg of plies of one style, thickness as pressed. */
export function genericPrepreg(name: string, styles: string[]): TypedStackLayer {
  const found = styles.map((style) => {
    const glass = findGlassStyle(style);
    if (!glass) throw new DomainError(`Glass style ${style} is not in the materials.`, "plies");
    return glass;
  });
  const [first] = found;
  if (!first) throw new DomainError("A prepreg needs a ply.", "plies");
  return {
    ...blank,
    kind: "prepreg",
    name,
    material: "Glass-epoxy",
    thicknessMode: "pressed",
    tolerancePercent: "10",
    plies: [
      {
        style: first.style,
        resinPercent: first.resinPercent,
        thickness: first.thickness,
        count: found.length,
      },
    ],
    dk: first.dk,
    df: first.df,
    dkFrequency: ONE_GIGAHERTZ,
  };
}
