import { bestClosedForm, type CrossSection } from "../cross-section";
import { DomainError } from "../errors";
import { dimensionForTarget } from "./dimension-for-target";
import { fieldDimension } from "./field-dimension";
import { impedanceOf, type ImpedanceTarget } from "./impedance-of";
import { withSpacing, withWidth } from "./reshape";

export interface WidthRequest {
  section: CrossSection;
  target: ImpedanceTarget;
  vary: "width" | "spacing";
  /** bounds of the varied dimension [m] */
  min: number;
  max: number;
  /** step that the fabricator or layout program works in [m] */
  grid?: number;
  method: "closed-form" | "field";
  accuracy?: "live" | "standard" | "reference";
}

export interface WidthResult {
  /** bottom width, or gap between the bottom faces [m] */
  value: number;
  /** at that value [Ω] */
  impedance: number;
  method: "closed-form" | "field";
  /** how often a line was computed */
  solves: number;
}

/**
 * Width (of the bottom face) or spacing at which a line meets its target, by the closed form that fits or by the field.
 * The side slope, the spacing between edges (when the width varies) and the coplanar slot stay; a pair stays centred.
 *
 * @returns value [m] with impedance [Ω]; without a grid the impedance is the target, to 1e-10 (closed form) or 1e-6 (field)
 * @throws DomainError for illegal input, UnreachableTargetError with the reachable range, UnsupportedError where a closed
 *   form is asked for and none fits
 */
export function widthForImpedance(request: WidthRequest): WidthResult {
  const { section, target, vary, min, max, grid, method, accuracy } = request;
  if (vary === "spacing" && section.traces.length !== 2) {
    throw new DomainError("Only a pair has a spacing to vary.", "vary");
  }
  const reshape = vary === "width" ? withWidth : withSpacing;
  const sectionAt = (value: number) => reshape(section, value);
  const search = { ohms: target.ohms, spoken: vary === "width" ? "width" : "gap", min, max, grid };
  const found =
    method === "field"
      ? fieldDimension({ ...search, sectionAt, kind: target.kind, accuracy })
      : dimensionForTarget({
          ...search,
          impedanceAt: (value) => impedanceOf(bestClosedForm(sectionAt(value)), target.kind),
        });
  return { ...found, method };
}
