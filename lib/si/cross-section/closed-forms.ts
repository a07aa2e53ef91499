import { DomainError } from "../errors";
import { classifyCrossSection, type Structure } from "./classify";
import type { Candidate, ClosedFormResult } from "./closed-form-result";
import { innerPair, innerSingle } from "./inner-forms";
import { coplanar, coveredPair, coveredSingle, outerPair, outerSingle } from "./outer-forms";
import type { CrossSection } from "./types";

/**
 * Every published formula that fits the cross-section, each with its range and source; the most accurate first.
 *
 * A formula that has no value for this geometry (a logarithm below zero, a gap smaller than the widening) is left out.
 * Trapezoids enter by their mean width, layers of one side in series; what a formula does not see it says in `ignores`.
 *
 * @returns possibly empty: unequal and broadside pairs, and pairs beside coplanar ground, have no closed form here
 * @throws DomainError for an illegal cross-section, naming the field
 */
export function closedForms(section: CrossSection): ClosedFormResult[] {
  return candidatesFor(classifyCrossSection(section)).flatMap((candidate) => {
    try {
      return candidate();
    } catch (error) {
      if (error instanceof DomainError) return []; // beyond what this formula can describe
      throw error;
    }
  });
}

/** The formulas that fit a structure, not yet evaluated; the one in use first, empty where none fits. */
export function candidatesFor(structure: Structure): Candidate[] {
  const { place, arrangement, coplanarSlot } = structure;
  if (coplanarSlot !== null)
    return place === "outer" && arrangement === "single" ? coplanar(structure, coplanarSlot) : [];
  if (arrangement === "single") {
    return place === "outer"
      ? outerSingle(structure)
      : place === "covered"
        ? coveredSingle(structure)
        : innerSingle(structure);
  }
  if (arrangement !== "equal pair" || structure.gap === null) return [];
  if (place === "inner") return innerPair(structure, structure.gap);
  return place === "outer" ? outerPair(structure, structure.gap) : coveredPair(structure, structure.gap);
}
