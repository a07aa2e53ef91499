import { closedForms, type ClosedFormResult, type CrossSection } from "@/lib/si/cross-section";
import type { WidthPoint } from "@/lib/drawings/impedance-width.geometry";
import { EngineError } from "@/lib/si/errors";
import { buildCrossSection, type Stackup } from "@/lib/si/stackup";
import { lineFacts, type LineFacts, type Outcome } from "./solve-line";

export interface Trial {
  facts: Outcome<LineFacts>;
  /** null where no section can be built */
  section: CrossSection | null;
  forms: ClosedFormResult[];
  assumptions: string[];
}

/** Everything shown of one width and gap on a layer. */
export function trialOf(
  stackup: Stackup,
  index: number,
  shape: { width: number; gap: number | null },
): Trial {
  const facts = lineFacts(stackup, index, shape);
  try {
    const built = buildCrossSection(
      stackup,
      index,
      shape.gap === null ? { width: shape.width } : { width: shape.width, gap: shape.gap },
    );
    return {
      facts,
      section: built.section,
      forms: closedForms(built.section),
      assumptions: built.assumptions,
    };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    return { facts, section: null, forms: [], assumptions: [] };
  }
}

const POINTS = 48;

/** Impedance over a range of widths and at the chosen one, for the chart; widths without a value are left out. */
export function widthCurve(
  stackup: Stackup,
  index: number,
  gap: number | null,
  range: { from: number; to: number },
  chosen: number,
): WidthPoint[] {
  const { from, to } = range;
  const widths = Array.from({ length: POINTS }, (_, point) => from * (to / from) ** (point / (POINTS - 1)));
  if (chosen > from && chosen < to) widths.push(chosen);
  return widths.flatMap((width) => {
    const facts = lineFacts(stackup, index, { width, gap });
    return facts.ok ? [{ width, impedance: facts.value.impedance }] : [];
  });
}
