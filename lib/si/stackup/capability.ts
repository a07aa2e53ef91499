import type { Stackup } from "./model";
import { isSignal } from "./model";
import { finishedCopper, layerAt } from "./thickness";

/** Smallest width and gap that are etched on a layer [m]. */
export interface Capability {
  minWidth: number;
  minGap: number;
  /** "inner, 18 µm copper": what it is by */
  by: string;
}

interface Step {
  place: "inner" | "outer";
  /** finished copper up to this thickness [m] */
  copper: number;
  /** [m] */
  least: number;
}

/** Common practice, no source: least width and gap by finished copper. Thicker copper takes the last step. */
const STEPS: readonly Step[] = [
  { place: "inner", copper: 18e-6, least: 0.09e-3 },
  { place: "inner", copper: 35e-6, least: 0.1e-3 },
  { place: "outer", copper: 45e-6, least: 0.125e-3 },
  { place: "outer", copper: 70e-6, least: 0.2e-3 },
  { place: "inner", copper: Infinity, least: 0.2e-3 },
  { place: "outer", copper: Infinity, least: 0.2e-3 },
];

/**
 * What can be etched on a signal layer, by its finished copper and place.
 *
 * @param own  the fabricator's own least width and gap [m], which come first
 * @throws DomainError where the layer's copper is not known
 */
export function capabilityOf(
  stackup: Stackup,
  index: number,
  own: { minWidth: number | null; minGap: number | null },
): Capability {
  const copper = finishedCopper(stackup, index);
  const place = isOuter(stackup, index) ? "outer" : "inner";
  // half a micrometre of rounding does not make 35 µm copper thicker than 35 µm
  const step = STEPS.find((entry) => entry.place === place && copper <= entry.copper + 0.5e-6);
  const least = step?.least ?? 0.2e-3;
  const given = own.minWidth !== null && own.minGap !== null;
  return {
    minWidth: own.minWidth ?? least,
    minGap: own.minGap ?? least,
    by: given ? "the fabricator’s process" : `${place} layer, ${Math.round(copper * 1e6)} µm copper`,
  };
}

function isOuter(stackup: Stackup, index: number): boolean {
  layerAt(stackup, index);
  const copper = stackup.layers.flatMap((layer, at) =>
    isSignal(layer) || layer.kind === "plane" ? [at] : [],
  );
  return copper[0] === index || copper.at(-1) === index;
}
