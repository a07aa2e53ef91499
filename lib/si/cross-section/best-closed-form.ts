import { UnsupportedError } from "../errors";
import { classifyCrossSection, type Structure } from "./classify";
import { modeOf, type ClosedFormResult } from "./closed-form-result";
import { candidatesFor } from "./closed-forms";
import type { CrossSection, Mode } from "./types";

/** The closed form the product's numbers come from, with delays. */
export interface BestClosedForm {
  form: ClosedFormResult;
  single?: Mode;
  pair?: { odd: Mode; even: Mode; differential: number; common: number };
}

/**
 * The formula used for a cross-section's numbers: Hammerstad–Jensen with thickness (outer), Wheeler 1978 (inner,
 * centred) or two of its halves in parallel (off-centre), Kirschning–Jansen 1984 widened (outer pair), Cohn 1955 with
 * thickness or its halves in parallel (inner pair), Ghione–Naldi (coplanar).
 *
 * @returns impedances [Ω], permittivities [1] and delays [s/m], and the formula with range, source and what it ignores
 * @throws DomainError for an illegal cross-section or one the formula has no value for, UnsupportedError where no
 *   published formula fits
 */
export function bestClosedForm(section: CrossSection): BestClosedForm {
  const structure = classifyCrossSection(section);
  // no falling back to the next formula: a search over widths must not jump from one to another
  const first = candidatesFor(structure)[0]?.();
  const form = Array.isArray(first) ? first[0] : first;
  if (!form) throw unsupported(structure);
  const { impedance, effectivePermittivity: permittivity } = form;
  if (impedance.single !== undefined && permittivity.single !== undefined) {
    return { form, single: modeOf(impedance.single, permittivity.single) };
  }
  if (
    impedance.odd !== undefined &&
    impedance.even !== undefined &&
    permittivity.odd !== undefined &&
    permittivity.even !== undefined
  ) {
    const odd = modeOf(impedance.odd, permittivity.odd);
    const even = modeOf(impedance.even, permittivity.even);
    return { form, pair: { odd, even, differential: 2 * odd.impedance, common: even.impedance / 2 } };
  }
  throw unsupported(structure);
}

function unsupported(structure: Structure): UnsupportedError {
  const coplanar = structure.coplanarSlot === null ? "" : " beside coplanar ground";
  const what = structure.arrangement === "single" ? "trace" : structure.arrangement;
  return new UnsupportedError(
    `No published formula fits this ${structure.place} ${what}${coplanar}; only a field solution can tell its impedance.`,
    "section",
  );
}
