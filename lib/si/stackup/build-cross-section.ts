import type { CrossSection, DielectricLayer, Trace } from "../cross-section";
import { DomainError } from "../errors";
import { formatSi } from "../units";
import { isCopper, isSignal, type Stackup } from "./model";
import { nearestDielectric, protrusionOf } from "./protrusion";
import { builtThickness, finishedCopper, layerAt } from "./thickness";

export interface TraceShape {
  /** foot: the wide face, on the laminate it lies on [m] */
  width: number;
  /** between the feet of a pair [m]; makes a pair */
  gap?: number;
  /** from the foot to coplanar ground on both sides [m] */
  coplanarGap?: number;
}

export interface BuiltCrossSection {
  section: CrossSection;
  /** nearest planes as indices into the stackup; above is toward the board's top */
  references: { above?: number; below?: number };
  /** what the trace sticks out into */
  side: "air" | "mask" | "core" | "prepreg";
  /** true: the section's upward is the board's downward */
  turned: boolean;
  /** face of the section on which the foot is; "top" only where the single plane lies on the crown's side */
  foot: "bottom" | "top";
  /** for each of the section's layers, the layer of the stackup that it is, as an index */
  sources: number[];
  /** the mask over the trace, as an index into the stackup; a conformal one or a flat cover */
  maskLayer: number | null;
  /** inputs that were missing and what was taken instead, as phrases */
  assumptions: string[];
}

/**
 * The cross-section of a trace on a layer of a stackup: the one place where stackup becomes geometry.
 *
 * References are the nearest plane on each side; signal layers in between count as dielectric of the material they sink
 * into. The trace lies on its core and sticks out into the prepreg (outer: into mask and air); its crown is narrower
 * than its foot by `etch`. The section is turned so that the foot is its bottom face wherever the planes allow.
 * A mask over the laminate as thick as the copper becomes a flat cover.
 *
 * @param index  a signal or foil layer of the stackup
 * @param shape  foot width, gap, coplanar gap [m]
 * @throws DomainError naming the layer's field where an input is missing or illegal, or no plane is there
 */
export function buildCrossSection(stackup: Stackup, index: number, shape: TraceShape): BuiltCrossSection {
  const layer = layerAt(stackup, index);
  if (!isSignal(layer))
    throw new DomainError(`${layer.name} carries no traces: it is a ${layer.kind}.`, `layers[${index}].kind`);
  const thickness = finishedCopper(stackup, index);
  const up = walk(stackup, index, -1);
  const down = walk(stackup, index, 1);
  if (up.plane === null && down.plane === null) {
    throw new DomainError(
      `${layer.name} has no reference plane on either side. Add a plane to the stackup.`,
      "layers",
    );
  }
  const protrusion = protrusionOf(stackup.layers, index);
  const bothPlanes = up.plane !== null && down.plane !== null;
  // section-up is where the crown points, or away from the only plane
  const upward = bothPlanes ? protrusion : up.plane === null ? "up" : "down";
  const lower = upward === "up" ? down : up;
  const upper = upward === "up" ? up : down;
  const foot = protrusion === upward ? "bottom" : "top";
  const assumptions: string[] = [];
  if (layer.etch === null) assumptions.push(`${layer.name}: etch not given, sides taken as vertical`);

  const outer = !upper.slabs.some((slab) => !slab.mask) && upper.plane === null;
  const lowerLayers = lower.slabs.map((slab) => slab.layer).reverse();
  const y = lowerLayers.reduce((sum, slab) => sum + slab.thickness, 0);
  const upperLayers = outer ? [] : upper.slabs.map((slab) => slab.layer);
  if (foot === "bottom") grow(upperLayers, 0, thickness);
  else grow(lowerLayers, lowerLayers.length - 1, thickness);
  const section: CrossSection = {
    layers: [...lowerLayers, ...upperLayers],
    upperPlane: upper.plane !== null,
    traces: tracesOf(shape, layer.etch ?? 0, layer.name, index, { y, thickness, foot }),
  };
  if (shape.coplanarGap !== undefined) {
    // told at the foot; the section wants it at the bottom face
    section.coplanar = { gap: shape.coplanarGap + (foot === "bottom" ? 0 : (layer.etch ?? 0)) };
  }
  const sources = [
    ...lower.slabs.map((slab) => slab.index).reverse(),
    ...(outer ? [] : upper.slabs.map((slab) => slab.index)),
  ];
  const mask = outer ? upper.slabs[0] : undefined;
  if (mask?.index !== undefined) addMask(section, stackup, mask.index, thickness, assumptions);
  if (mask && section.layers.length > sources.length) sources.push(mask.index);
  const sink = nearestDielectric(stackup.layers, index, protrusion === "up" ? -1 : 1);
  return {
    section,
    references: {
      ...(up.plane === null ? {} : { above: up.plane }),
      ...(down.plane === null ? {} : { below: down.plane }),
    },
    side: sink?.kind === "core" || sink?.kind === "prepreg" ? sink.kind : mask ? "mask" : "air",
    turned: upward === "down",
    foot,
    sources,
    maskLayer: mask?.index ?? null,
    assumptions,
  };
}

interface Slab {
  layer: DielectricLayer;
  mask: boolean;
  index: number;
}

/** Dielectric from the layer outward to the nearest plane, or to the surface; nearest slab first. */
function walk(stackup: Stackup, from: number, step: 1 | -1): { slabs: Slab[]; plane: number | null } {
  const slabs: Slab[] = [];
  for (let at = from + step; at >= 0 && at < stackup.layers.length; at += step) {
    const layer = layerAt(stackup, at);
    if (layer.kind === "plane") return { slabs, plane: at };
    const material = isCopper(layer) ? materialAround(stackup, at) : at;
    const slab = { thickness: builtThickness(stackup, at), ...permittivityOf(stackup, material) };
    slabs.push({ layer: slab, mask: layer.kind === "mask", index: at });
  }
  return { slabs, plane: null };
}

/** A signal layer passed on the way is mostly the dielectric that it sinks into. */
function materialAround(stackup: Stackup, index: number): number {
  const toward = protrusionOf(stackup.layers, index) === "up" ? -1 : 1;
  const found =
    nearestDielectric(stackup.layers, index, toward) ??
    nearestDielectric(stackup.layers, index, toward === 1 ? -1 : 1);
  if (!found)
    throw new DomainError(`${layerAt(stackup, index).name} has no dielectric beside it.`, `layers[${index}]`);
  return found.index;
}

function permittivityOf(stackup: Stackup, index: number): { er: number; tanD?: number } {
  const layer = layerAt(stackup, index);
  if (layer.dk === null) throw new DomainError(`${layer.name} has no Dk.`, `layers[${index}].dk`);
  if (!(layer.dk >= 1))
    throw new DomainError(`The Dk of ${layer.name} must be at least 1 (air).`, `layers[${index}].dk`);
  return layer.df === null ? { er: layer.dk } : { er: layer.dk, tanD: layer.df };
}

/** The slab beside the trace also fills the height of the copper. */
function grow(layers: DielectricLayer[], index: number, thickness: number): void {
  const slab = layers[index];
  if (slab) layers[index] = { ...slab, thickness: slab.thickness + thickness };
}

function tracesOf(
  shape: TraceShape,
  etch: number,
  name: string,
  index: number,
  place: { y: number; thickness: number; foot: "bottom" | "top" },
): Trace[] {
  if (!(shape.width > 0 && Number.isFinite(shape.width))) {
    throw new DomainError(`The width on ${name} must be above zero.`, "width");
  }
  const crown = shape.width - etch;
  if (!(crown > 0)) {
    throw new DomainError(
      `A trace of ${formatSi(shape.width, "length")} on ${name} would be etched away: the etch takes ${formatSi(etch, "length")}.`,
      `layers[${index}].etch`,
    );
  }
  const trace = {
    x: 0,
    y: place.y,
    thickness: place.thickness,
    widthBottom: place.foot === "bottom" ? shape.width : crown,
    widthTop: place.foot === "bottom" ? crown : shape.width,
  };
  if (shape.gap === undefined) return [trace];
  if (!(shape.gap > 0 && Number.isFinite(shape.gap)))
    throw new DomainError(`The gap on ${name} must be above zero.`, "gap");
  const half = (shape.width + shape.gap) / 2;
  return [
    { ...trace, x: -half },
    { ...trace, x: half },
  ];
}

function addMask(
  section: CrossSection,
  stackup: Stackup,
  index: number,
  copper: number,
  assumptions: string[],
): void {
  const layer = layerAt(stackup, index);
  const overLaminate = builtThickness(stackup, index);
  const overTrace = layer.maskOverTrace ?? overLaminate;
  if (layer.maskOverTrace === null)
    assumptions.push(`${layer.name}: over the trace taken as over the laminate`);
  const material = permittivityOf(stackup, index);
  if (overLaminate < copper && overTrace > 0) {
    assumptions.push(`${layer.name}: beside the trace taken as over it`);
    section.mask = { overLaminate, overTrace, side: overTrace, ...material };
    return;
  }
  assumptions.push(`${layer.name}: as thick as the copper, taken as a flat cover`);
  section.layers.push({ thickness: Math.max(overLaminate, copper + overTrace), ...material });
}
