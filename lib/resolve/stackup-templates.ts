import type { LayerKind, StackupDoc, StackupLayerDoc } from "@/lib/schemas/stackup";

export interface StackupTemplate {
  id: string;
  /** "6 layers, 1.6 mm" */
  title: string;
  copperLayers: number;
  description: string;
}

interface Recipe extends StackupTemplate {
  /** Copper from the top: S signal, G ground plane, P supply plane. */
  copper: string;
  /** Dielectrics in mm from the top to the middle one; the rest mirrors them. Outer ones are prepreg. */
  dielectrics: readonly string[];
}

/** Common practice, no source: symmetric foil builds of generic FR-4. Each value is marked as assumed. */
const RECIPES: readonly Recipe[] = [
  recipe(2, "1.6", "SG", ["1.5"], "Signals above, ground below."),
  recipe(4, "1.6", "SGPS", ["0.2", "1.08"], "Signals outside, ground and supply inside."),
  recipe(6, "1.6", "SGSSGS", ["0.11", "0.2", "0.75"], "Four signal layers, each beside a ground plane."),
  recipe(
    8,
    "1.6",
    "SGSPGSGS",
    ["0.11", "0.13", "0.2", "0.52"],
    "Four signal layers, three grounds, one supply.",
  ),
  recipe(
    10,
    "1.6",
    "SGSSPGSSGS",
    ["0.1", "0.13", "0.13", "0.13", "0.4"],
    "Six signal layers, three grounds, one supply.",
  ),
  recipe(
    12,
    "1.6",
    "SGSGSPPSGSGS",
    ["0.1", "0.1", "0.1", "0.13", "0.13", "0.22"],
    "Six signal layers between grounds, two supplies in the middle.",
  ),
  recipe(
    18,
    "2.4",
    "SGSGSGSGPPGSGSGSGS",
    ["0.1", "0.1", "0.1", "0.13", "0.13", "0.13", "0.13", "0.13", "0.1"],
    "Eight signal layers between grounds, two supplies in the middle.",
  ),
];

/** What a new project's stackup can start from. */
export const stackupTemplates: readonly StackupTemplate[] = RECIPES.map(
  ({ id, title, copperLayers, description }) => ({
    id,
    title,
    copperLayers,
    description,
  }),
);

/** The stackup of a template, or null where there is none of this name. */
export function stackupFromTemplate(templateId: string): StackupDoc | null {
  const found = RECIPES.find((entry) => entry.id === templateId);
  if (!found) return null;
  const layers: StackupLayerDoc[] = [mask("Top mask")];
  const last = found.copperLayers - 1;
  for (let index = 0; index <= last; index++) {
    layers.push(copper(found.copper[index] ?? "S", index, last));
    if (index === last) break;
    const kind = last === 1 || index % 2 === 1 ? "core" : "prepreg";
    const thickness = found.dielectrics[Math.min(index, last - 1 - index)] ?? "0.1";
    layers.push(dielectric(kind, index, thickness));
  }
  layers.push(mask("Bottom mask"));
  return { name: found.title, layers };
}

function recipe(
  copperLayers: number,
  total: string,
  copperOrder: string,
  dielectrics: readonly string[],
  description: string,
): Recipe {
  return {
    id: `${copperLayers}-layers`,
    title: `${copperLayers} layers, ${total} mm`,
    copperLayers,
    description,
    copper: copperOrder,
    dielectrics,
  };
}

function copper(mark: string, index: number, last: number): StackupLayerDoc {
  const outer = index === 0 || index === last;
  const plane = mark !== "S";
  const place = index === 0 ? "Top" : index === last ? "Bottom" : "Inner";
  const net = mark === "G" ? "GND" : "PWR";
  return {
    ...blank(plane ? "plane" : "signal", `L${index + 1} ${plane ? net : place}`),
    material: "Copper",
    baseFoil: { value: "18", unit: "µm" },
    plating: outer ? { value: "25", unit: "µm" } : null,
    coveragePercent: plane ? "85" : "30",
    etch: { value: outer ? "0.025" : "0.012", unit: "mm" },
    planeNet: plane ? net : "",
  };
}

function dielectric(kind: "core" | "prepreg", index: number, thickness: string): StackupLayerDoc {
  return {
    ...blank(kind, `${kind === "core" ? "Core" : "Prepreg"} ${index + 1}-${index + 2}`),
    material: "FR-4",
    thickness: { value: thickness, unit: "mm" },
    tolerancePercent: "10",
    dk: kind === "core" ? "4.3" : "4.1",
    df: "0.018",
    dkFrequency: { value: "1", unit: "GHz" },
  };
}

function mask(name: string): StackupLayerDoc {
  return {
    ...blank("mask", name),
    material: "Solder mask",
    thickness: { value: "20", unit: "µm" },
    maskOverTrace: { value: "12", unit: "µm" },
    dk: "3.5",
    df: "0.025",
    dkFrequency: { value: "1", unit: "GHz" },
  };
}

function blank(kind: LayerKind, name: string): StackupLayerDoc {
  return {
    kind,
    name,
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
}
