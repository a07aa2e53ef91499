import { genericCopper, genericCore, genericMask, genericPrepreg } from "./generic-layers";
import type { TypedStackLayer } from "./typed-layers";

/** A plausible generic stackup to start from. */
export interface StackupTemplate {
  id: string;
  title: string;
  copperLayers: number;
  layers: TypedStackLayer[];
}

/** One half of a symmetric build, from the outside to the middle; a core is told in µm, a prepreg by its plies. */
interface Recipe {
  copperLayers: number;
  /** S signal, P plane, top to bottom */
  order: string;
  dielectrics: (number | string[])[];
  innerOunces: { signal: string; plane: string };
}

const recipes: Recipe[] = [
  { copperLayers: 2, order: "SP", dielectrics: [1500], innerOunces: { signal: "0.5", plane: "0.5" } },
  { copperLayers: 4, order: "SPPS", dielectrics: [["7628"], 1065], innerOunces: { signal: "1", plane: "1" } },
  {
    copperLayers: 6,
    order: "SPSSPS",
    dielectrics: [["2116"], 360, ["7628", "7628"]],
    innerOunces: { signal: "1", plane: "1" },
  },
  {
    copperLayers: 8,
    order: "SPSPPSPS",
    dielectrics: [["2116"], 200, ["7628"], 360],
    innerOunces: { signal: "1", plane: "1" },
  },
  {
    copperLayers: 10,
    order: "SPSPSSPSPS",
    dielectrics: [["3313"], 130, ["7628"], 130, ["7628"]],
    innerOunces: { signal: "0.5", plane: "1" },
  },
  {
    copperLayers: 12,
    order: "SPSPSPPSPSPS",
    dielectrics: [["1080"], 100, ["1080", "1080"], 100, ["1080", "1080"], 100],
    innerOunces: { signal: "0.5", plane: "1" },
  },
  {
    copperLayers: 18,
    order: "SPSPSPSPSSPSPSPSPS",
    dielectrics: [
      ["1080"],
      100,
      ["1080", "1080"],
      100,
      ["1080", "1080"],
      100,
      ["1080", "1080"],
      100,
      ["2113", "2113"],
    ],
    innerOunces: { signal: "0.5", plane: "1" },
  },
];

/** Stackups of 2 to 18 copper layers in generic glass-epoxy; symmetric, about 1.6 mm (18 layers: about 2.5 mm). */
export const stackupTemplates: readonly StackupTemplate[] = recipes.map((recipe) => ({
  id: `generic-${recipe.copperLayers}`,
  title: `${recipe.copperLayers} layers`,
  copperLayers: recipe.copperLayers,
  layers: build(recipe),
}));

function build(recipe: Recipe): TypedStackLayer[] {
  const half = recipe.dielectrics;
  const mirrored = [...half, ...half.slice(0, -1).reverse()];
  const layers: TypedStackLayer[] = [genericMask("Top mask")];
  [...recipe.order].forEach((letter, index) => {
    const outer = index === 0 || index === recipe.copperLayers - 1;
    const plane = letter === "P";
    const ounces = outer ? "0.5" : plane ? recipe.innerOunces.plane : recipe.innerOunces.signal;
    // a two-layer board's top is poured with ground; inner signal layers are sparse
    const coveragePercent = plane ? "80" : recipe.copperLayers === 2 ? "60" : "40";
    layers.push(
      genericCopper(plane ? "plane" : "signal", `L${index + 1}`, { outer, ounces, coveragePercent }),
    );
    const dielectric = mirrored[index];
    if (dielectric === undefined) return;
    const name = `${typeof dielectric === "number" ? "Core" : "Prepreg"} ${index + 1}-${index + 2}`;
    layers.push(
      typeof dielectric === "number" ? genericCore(name, dielectric) : genericPrepreg(name, dielectric),
    );
  });
  layers.push(genericMask("Bottom mask"));
  return layers;
}
