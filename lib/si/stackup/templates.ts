import { genericCopper, genericCore, genericMask, genericPrepreg } from "./generic-layers";
import type { TypedStackLayer } from "./typed-layers";

/** A plausible generic stackup to start from; the one set, for new projects and for the stackup page. */
export interface StackupTemplate {
  id: string;
  /** "6 layers, 1.6 mm" */
  title: string;
  copperLayers: number;
  /** what lies where, in a sentence */
  description: string;
  layers: TypedStackLayer[];
}

/** One half of a symmetric build, from the outside to the middle; a core is told in µm, a prepreg by its plies. */
interface Recipe {
  /** S signal, G ground plane, P supply plane, top to bottom */
  order: string;
  description: string;
  dielectrics: (number | string[])[];
  innerOunces: { signal: string; plane: string };
  /** without mask */
  total?: string;
}

/** Common practice, no source: symmetric foil builds of generic glass-epoxy. Every value is marked as assumed. */
const recipes: Recipe[] = [
  {
    order: "SG",
    description: "Signals above, ground below.",
    dielectrics: [1500],
    innerOunces: { signal: "0.5", plane: "0.5" },
  },
  {
    order: "SGPS",
    description: "Signals outside, ground and supply inside.",
    dielectrics: [["7628"], 1065],
    innerOunces: { signal: "1", plane: "1" },
  },
  {
    order: "SGSSGS",
    description: "Four signal layers, each beside a ground plane.",
    dielectrics: [["2116"], 400, ["7628", "7628"]],
    innerOunces: { signal: "1", plane: "1" },
  },
  {
    order: "SGSPGSGS",
    description: "Four signal layers, three grounds, one supply.",
    dielectrics: [["2116"], 200, ["7628"], 360],
    innerOunces: { signal: "1", plane: "1" },
  },
  {
    order: "SGSGSSPSGS",
    description: "Six signal layers, three grounds, one supply.",
    dielectrics: [["3313"], 150, ["7628"], 150, ["7628"]],
    innerOunces: { signal: "0.5", plane: "1" },
  },
  {
    order: "SGSGSPPSGSGS",
    description: "Six signal layers between grounds, two supplies in the middle.",
    dielectrics: [["1080"], 100, ["1080", "1080"], 100, ["1080", "1080"], 100],
    innerOunces: { signal: "0.5", plane: "1" },
  },
  {
    order: "SGSGSGSPSSPSGSGSGS",
    description: "Ten signal layers, six grounds, two supplies.",
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
    total: "2.5",
  },
];

/** Stackups of 2 to 18 copper layers in generic glass-epoxy; symmetric, about 1.6 mm (18 layers: about 2.5 mm). */
export const stackupTemplates: readonly StackupTemplate[] = recipes.map((recipe) => {
  const copperLayers = recipe.order.length;
  return {
    id: `${copperLayers}-layers`,
    title: `${copperLayers} layers, ${recipe.total ?? "1.6"} mm`,
    copperLayers,
    description: recipe.description,
    layers: build(recipe),
  };
});

function build(recipe: Recipe): TypedStackLayer[] {
  const copperLayers = recipe.order.length;
  const half = recipe.dielectrics;
  const mirrored = [...half, ...half.slice(0, -1).reverse()];
  const layers: TypedStackLayer[] = [genericMask("Top mask")];
  [...recipe.order].forEach((letter, index) => {
    const outer = index === 0 || index === copperLayers - 1;
    const plane = letter !== "S";
    const net = letter === "G" ? "GND" : "PWR";
    const place = index === 0 ? "Top" : outer ? "Bottom" : "Inner";
    const ounces = outer ? "0.5" : plane ? recipe.innerOunces.plane : recipe.innerOunces.signal;
    // a two-layer board's top is poured with ground; inner signal layers are sparse
    const coveragePercent = plane ? "80" : copperLayers === 2 ? "60" : "40";
    const copper = genericCopper(plane ? "plane" : "signal", `L${index + 1} ${plane ? net : place}`, {
      outer,
      ounces,
      coveragePercent,
    });
    layers.push(plane ? { ...copper, planeNet: net } : copper);
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
