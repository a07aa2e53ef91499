import type { LayerKind } from "@/lib/schemas/stackup";

/** Columns of a stackup as CSV, in the order in which we write them; the first header is ours. */
export const stackupColumns = [
  { id: "kind", label: "kind", headers: ["kind", "type", "layer type", "class"] },
  { id: "name", label: "name", headers: ["name", "layer", "layer name"] },
  { id: "material", label: "material", headers: ["material", "laminate", "product"] },
  { id: "thickness", label: "thickness", headers: ["thickness", "height", "thk"] },
  { id: "tolerance", label: "tolerance %", headers: ["tolerance", "tol", "thickness tolerance"] },
  { id: "plies", label: "plies", headers: ["plies", "construction", "ply"] },
  { id: "dk", label: "Dk", headers: ["dk", "er", "permittivity", "epsilon r", "εr", "dielectric constant"] },
  { id: "df", label: "Df", headers: ["df", "loss tangent", "tan d", "tand", "dissipation factor"] },
  { id: "dkFrequency", label: "Dk at", headers: ["dk at", "frequency", "dk frequency", "at"] },
  {
    id: "baseFoil",
    label: "base foil",
    headers: ["base foil", "foil", "copper", "base copper", "copper weight", "cu"],
  },
  { id: "plating", label: "plating", headers: ["plating", "plated"] },
  { id: "coverage", label: "coverage %", headers: ["coverage", "copper coverage", "coverage percent"] },
  { id: "etch", label: "etch", headers: ["etch", "undercut", "etch back"] },
  { id: "roughness", label: "roughness", headers: ["roughness", "rz"] },
  { id: "maskOverTrace", label: "mask over trace", headers: ["mask over trace", "over trace"] },
  { id: "planeNet", label: "plane net", headers: ["plane net", "net"] },
  { id: "origin", label: "origin", headers: ["origin", "source"] },
  { id: "sourceNote", label: "source note", headers: ["source note", "note", "notes"] },
] as const;

export type StackupColumn = (typeof stackupColumns)[number]["id"];

/** Words under which each kind of layer is known. */
export const kindWords: Record<LayerKind, readonly string[]> = {
  mask: ["mask", "solder mask", "soldermask", "solder resist", "resist", "coverlay"],
  foil: ["foil", "copper foil"],
  signal: ["signal", "copper", "conductor", "routing", "mixed", "sig", "cu"],
  plane: ["plane", "power", "ground", "power plane", "ground plane", "pwr", "gnd"],
  core: ["core", "laminate", "dielectric core"],
  prepreg: ["prepreg", "pp", "pre preg", "b stage", "bondply", "dielectric", "adhesive"],
};
