import type { LayerKind, StackupLayerDoc } from "@/lib/schemas/stackup";
import { genericCopper, genericCore, genericMask, genericPrepreg } from "@/lib/si/stackup/generic-layers";
import { isCopper } from "@/lib/si/stackup";
import type { EditLayer } from "./edit-layer";

type Layers = readonly EditLayer[];

const NAMES: Record<LayerKind, string> = {
  mask: "Mask",
  foil: "Foil",
  signal: "Signal",
  plane: "Plane",
  core: "Core",
  prepreg: "Prepreg",
};

/** A layer of a kind with generic values to start from, under a name that no other has. */
export function newLayer(kind: LayerKind, layers: Layers, key: string): EditLayer {
  return { ...genericLayer(kind, freeName(NAMES[kind], layers)), key };
}

/** Puts a new layer at a place; 0 is the top. */
export function insertLayer(layers: Layers, at: number, layer: EditLayer): EditLayer[] {
  return [...layers.slice(0, at), layer, ...layers.slice(at)];
}

export function removeLayer(layers: Layers, key: string): EditLayer[] {
  return layers.filter((layer) => layer.key !== key);
}

/** One place up (−1) or down (1); a layer at the edge stays. */
export function moveLayer(layers: Layers, key: string, step: -1 | 1): EditLayer[] {
  const from = layers.findIndex((layer) => layer.key === key);
  const to = from + step;
  const moved = layers[from];
  if (!moved || to < 0 || to >= layers.length) return [...layers];
  const rest = layers.filter((layer) => layer !== moved);
  return insertLayer(rest, to, moved);
}

/** The same layer once more below itself: another layer, so without the first one's ids. */
export function duplicateLayer(layers: Layers, key: string, newKey: string): EditLayer[] {
  const at = layers.findIndex((layer) => layer.key === key);
  const original = layers[at];
  if (!original) return [...layers];
  const { id: _id, lineageId: _lineage, ...same } = original;
  return insertLayer(layers, at + 1, { ...same, key: newKey, name: freeName(original.name, layers) });
}

/**
 * Makes the lower half the mirror of the upper one. Each lower layer keeps its name, its identity, its net and, where
 * both are copper, its being signal or plane: what is mirrored is how the board is built.
 */
export function mirrorLayers(layers: Layers): EditLayer[] {
  const last = layers.length - 1;
  return layers.map((lower, index) => {
    const upper = layers[last - index];
    if (!upper || index <= last - index) return lower;
    const bothCopper = isCopper(upper) && isCopper(lower);
    return {
      ...upper,
      key: lower.key,
      ...(lower.id === undefined
        ? { id: undefined, lineageId: undefined }
        : { id: lower.id, lineageId: lower.lineageId }),
      name: lower.name,
      kind: bothCopper ? lower.kind : upper.kind,
      planeNet: bothCopper ? lower.planeNet : upper.planeNet,
      coveragePercent:
        bothCopper && lower.kind !== upper.kind ? lower.coveragePercent : upper.coveragePercent,
    };
  });
}

/** Another kind for a layer: what it has stays, what the new kind needs and it lacks gets a generic value. */
export function withKind(layer: EditLayer, kind: LayerKind): EditLayer {
  const generic = genericLayer(kind, layer.name);
  const wasCopper = isCopper(layer);
  const dielectric = !isCopper({ kind });
  return {
    ...layer,
    kind,
    thicknessMode: kind === "prepreg" ? layer.thicknessMode : "typed",
    thickness: dielectric
      ? (layer.thickness ?? generic.thickness ?? { value: "100", unit: "µm" })
      : layer.thickness,
    material: wasCopper === dielectric || layer.material === "" ? generic.material : layer.material,
    dk: layer.dk ?? generic.dk,
    df: layer.df ?? generic.df,
    dkFrequency: layer.dkFrequency ?? generic.dkFrequency,
    baseFoil: layer.baseFoil ?? generic.baseFoil,
    coveragePercent: layer.coveragePercent ?? generic.coveragePercent,
    etch: layer.etch ?? generic.etch,
    maskOverTrace: layer.maskOverTrace ?? generic.maskOverTrace,
  };
}

function genericLayer(kind: LayerKind, name: string): StackupLayerDoc {
  switch (kind) {
    case "mask":
      return genericMask(name);
    case "core":
      return genericCore(name, 200);
    case "prepreg":
      return genericPrepreg(name, ["2116"]);
    case "plane":
      return genericCopper("plane", name, { outer: false, ounces: "0.5", coveragePercent: "80" });
    default:
      return {
        ...genericCopper("signal", name, { outer: false, ounces: "0.5", coveragePercent: "40" }),
        kind,
      };
  }
}

/** "Core 3": the name's own text with the first number that is free. */
function freeName(name: string, layers: Layers): string {
  const taken = new Set(layers.map((layer) => layer.name.toLowerCase()));
  if (!taken.has(name.toLowerCase()) && /\d$/.test(name)) return name;
  const stem = name.replace(/\s*\(\d+\)$|\s+\d+$/, "");
  for (let number = 1; ; number++) {
    const candidate = `${stem} ${number}`;
    if (!taken.has(candidate.toLowerCase())) return candidate;
  }
}
