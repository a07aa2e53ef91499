import type { CrossSection } from "../cross-section";
import { DomainError } from "../errors";
import { pairGap } from "./perturb";

/** How a quantity scatters about its nominal value. */
export type Tolerance = (
  | { /** ± share of the nominal value [1] */ relative: number }
  | { /** ± in the quantity's unit */ absolute: number }
) & {
  /** normal (the default) is cut off at the tolerance */
  distribution?: "normal" | "uniform";
  /** the tolerance in standard deviations of the normal distribution; 3 */
  sigmas?: number;
};

/** What scatters in a cross-section. What is left out does not. */
export interface SectionTolerances {
  /** etch: foot and crown width of every trace alike; edges move, centres stay, so gaps shrink as traces widen [m] */
  width?: Tolerance;
  /** crown against foot: half of what the crown lost, (foot − crown)/2, every trace alike [m] */
  slope?: Tolerance;
  /** finished copper thickness, every trace alike [m] */
  copper?: Tolerance;
  /** pitch of a pair, as a change of its gap beyond what etch does [m] */
  gap?: Tolerance;
  /** by layer, from the lower plane upward; Dk of layers with the same material (the same Dk, if none is named) goes together */
  layers?: ({ thickness?: Tolerance; er?: Tolerance; material?: string } | null | undefined)[];
  mask?: {
    /** the mask's three thicknesses together; a relative tolerance, or metres on the thickness over the trace */
    thickness?: Tolerance;
    er?: Tolerance;
  };
}

/** What one factor of the spread moves. */
export type FactorTarget =
  | { kind: "width" | "slope" | "copper" | "gap" | "mask thickness" | "mask er" }
  | { kind: "layer thickness"; layer: number }
  | { kind: "layer er"; layers: number[] };

/** One independent source of scatter. */
export interface Factor {
  target: FactorTarget;
  /** for the screen: "width", "height of layer 1", "Dk of layers 1 and 3" */
  name: string;
  nominal: number;
  /** half the range, in the quantity's unit, > 0 */
  range: number;
  distribution: "normal" | "uniform";
  sigmas: number;
}

/**
 * The independent factors of a section's tolerances; those of zero width are left out.
 * @throws DomainError naming the tolerance that is negative, not a number, or as wide as its quantity
 */
export function factorsOf(section: CrossSection, tolerances: SectionTolerances): Factor[] {
  const factors: Factor[] = [];
  const add = (target: FactorTarget, name: string, field: string, nominal: number, tolerance?: Tolerance) => {
    if (!tolerance) return;
    const range = "relative" in tolerance ? tolerance.relative * Math.abs(nominal) : tolerance.absolute;
    const { distribution = "normal", sigmas = 3 } = tolerance;
    if (!(range >= 0 && Number.isFinite(range))) {
      throw new DomainError(`The tolerance of the ${name} must be zero or more.`, `tolerances.${field}`);
    }
    if (!(sigmas > 0 && sigmas <= 6)) {
      throw new DomainError(
        `The tolerance of the ${name} must be above 0 and at most 6 standard deviations.`,
        `tolerances.${field}.sigmas`,
      );
    }
    if (target.kind !== "slope" && range >= nominal) {
      throw new DomainError(
        `The tolerance of the ${name} is as wide as the ${name} itself.`,
        `tolerances.${field}`,
      );
    }
    if (range > 0) factors.push({ target, name, nominal, range, distribution, sigmas });
  };
  const trace = section.traces[0];
  if (!trace) throw new DomainError("The cross-section has no trace.", "traces");
  add({ kind: "width" }, "width", "width", trace.widthBottom, tolerances.width);
  add({ kind: "slope" }, "side slope", "slope", (trace.widthBottom - trace.widthTop) / 2, tolerances.slope);
  if (trace.thickness > 0)
    add({ kind: "copper" }, "copper thickness", "copper", trace.thickness, tolerances.copper);
  const gap = pairGap(section);
  if (gap !== null) add({ kind: "gap" }, "gap", "gap", gap, tolerances.gap);
  section.layers.forEach((layer, i) => {
    const target = { kind: "layer thickness", layer: i } as const;
    add(
      target,
      `height of layer ${i + 1}`,
      `layers[${i}].thickness`,
      layer.thickness,
      tolerances.layers?.[i]?.thickness,
    );
  });
  for (const layers of sameMaterial(section, tolerances)) {
    const first = layers[0] ?? 0;
    const name =
      layers.length === 1
        ? `Dk of layer ${first + 1}`
        : `Dk of layers ${layers.map((i) => i + 1).join(" and ")}`;
    const target = { kind: "layer er", layers } as const;
    add(target, name, `layers[${first}].er`, section.layers[first]?.er ?? 1, tolerances.layers?.[first]?.er);
  }
  if (section.mask) {
    add(
      { kind: "mask thickness" },
      "mask thickness",
      "mask.thickness",
      section.mask.overTrace,
      tolerances.mask?.thickness,
    );
    add({ kind: "mask er" }, "Dk of the mask", "mask.er", section.mask.er, tolerances.mask?.er);
  }
  return factors;
}

/** Indices of layers whose Dk moves together. */
function sameMaterial(section: CrossSection, tolerances: SectionTolerances): number[][] {
  const groups = new Map<string, number[]>();
  section.layers.forEach((layer, i) => {
    const tolerance = tolerances.layers?.[i];
    if (!tolerance?.er) return;
    const key = tolerance.material ?? `Dk ${layer.er}`;
    groups.set(key, [...(groups.get(key) ?? []), i]);
  });
  return [...groups.values()];
}
