import * as f from "../formulas";
import { DomainError } from "../errors";
import { classifyCrossSection, type Structure } from "./classify";
import { coupledResult, differentialResult, singleResult, type ClosedFormResult } from "./closed-form-result";
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
  return closedFormsOf(classifyCrossSection(section));
}

/** The same for a structure already recognised. */
export function closedFormsOf(structure: Structure): ClosedFormResult[] {
  return candidates(structure).flatMap((candidate) => {
    try {
      return candidate();
    } catch (error) {
      if (error instanceof DomainError) return []; // beyond what this formula can describe
      throw error;
    }
  });
}

type Candidate = () => ClosedFormResult | ClosedFormResult[];

function candidates(structure: Structure): Candidate[] {
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

function outerSingle(s: Structure): Candidate[] {
  const { width: w, thickness: t } = s;
  const { height: h, er } = s.below;
  const thin: Candidate = () =>
    singleResult(f.hammerstadJensenZeroThicknessNote, s, f.hammerstadJensenZeroThickness(w, h, er), {
      knowsThickness: false,
    });
  return [
    ...(t > 0
      ? [
          () => singleResult(f.hammerstadJensenThicknessNote, s, f.hammerstadJensenThickness(w, h, t, er)),
          thin,
        ]
      : [thin]),
    () => singleResult(f.wheeler1977Note, s, f.wheeler1977(w, h, t, er)),
    () => singleResult(f.wheeler1965Note, s, f.wheeler1965(w, h, er), { knowsThickness: false }),
    () => singleResult(f.tradeMicrostripNote, s, f.tradeMicrostrip(w, h, t, er)),
  ];
}

function coveredSingle(s: Structure): Candidate[] {
  const { width: w, thickness: t } = s;
  const { height: h, er } = s.below;
  const cover = s.above ?? { height: 0, er: 1 };
  return [
    () => singleResult(f.coveredMicrostripNote, s, f.coveredMicrostrip(w, h, t, cover.height, er, cover.er)),
    () => {
      const trade = f.tradeEmbeddedMicrostrip(w, h, h + cover.height, t, er);
      const ignores = cover.er === er ? [] : ["the cover's own Dk"];
      return [
        singleResult(f.tradeEmbeddedNote, s, trade.form60, { variant: "60", ignores }),
        singleResult(f.tradeEmbeddedNote, s, trade.form87, { variant: "87", ignores }),
      ];
    },
    () =>
      singleResult(f.hammerstadJensenThicknessNote, s, f.hammerstadJensenThickness(w, h, t, er), {
        ignores: ["the cover"],
      }),
  ];
}

function innerSingle(s: Structure): Candidate[] {
  const { width: w, thickness: t } = s;
  const inner = betweenPlanes(s);
  const { spacing: b, er, below, above } = inner;
  const uniform = { ignores: inner.uniform ? [] : ["two dielectrics (weighed by plate capacitance)"] };
  const centred: Candidate[] = [
    () => singleResult(f.wheeler1978Note, s, f.wheeler1978(w, b, t, er), uniform),
    () =>
      singleResult(
        f.cohnExactNote,
        s,
        { impedance: f.centredStripImpedance(w, b, er), effectivePermittivity: er, inRange: true },
        { ...uniform, knowsThickness: false },
      ),
    () => singleResult(f.cohnWideNote, s, f.cohnWide(w, b, t, er), uniform),
    () => singleResult(f.cohnNarrowNote, s, f.cohnNarrow(w, b, t, er), uniform),
    () => singleResult(f.tradeStriplineNote, s, f.tradeStripline(w, b, t, er), uniform),
  ];
  const parallel: Candidate = () =>
    singleResult(f.parallelWheelerNote, s, f.parallelWheeler(w, below, above, t, er), {
      ...uniform,
      variant: "parallel-wheeler-1978",
    });
  const trade: Candidate = () => {
    const both = f.tradeOffsetStripline(w, Math.min(below, above), Math.max(below, above), t, er);
    return [
      singleResult(f.tradeOffsetNote, s, both.total, { ...uniform, variant: "80, whole height" }),
      singleResult(f.tradeOffsetNote, s, both.farther, { ...uniform, variant: "80, farther height" }),
    ];
  };
  return inner.centred ? centred : [parallel, trade];
}

function outerPair(s: Structure, gap: number): Candidate[] {
  const { width: w, thickness: t } = s;
  const { height: h, er } = s.below;
  const thin: Candidate = () =>
    coupledResult(f.kirschningJansenNote, s, f.kirschningJansen(w, gap, h, er), { knowsThickness: false });
  return [
    ...(t > 0
      ? [
          () =>
            coupledResult(f.kirschningJansenThicknessNote, s, f.kirschningJansenThickness(w, gap, h, t, er)),
          thin,
        ]
      : [thin]),
    () => {
      const single = f.tradeMicrostrip(w, h, t, er);
      const differential = 2 * single.impedance * f.tradeMicrostripPairFactor(gap, h);
      return differentialResult(f.tradeDifferentialMicrostripNote, s, differential, single.inRange);
    },
  ];
}

function coveredPair(s: Structure, gap: number): Candidate[] {
  const cover = s.above ?? { height: 0, er: 1 };
  return [
    () => {
      const pair = f.coveredPair(
        s.width,
        gap,
        s.below.height,
        s.thickness,
        cover.height,
        s.below.er,
        cover.er,
      );
      return coupledResult(f.coveredPairNote, s, pair);
    },
  ];
}

function innerPair(s: Structure, gap: number): Candidate[] {
  const { width: w, thickness: t } = s;
  const inner = betweenPlanes(s);
  const { spacing: b, er, below, above } = inner;
  const uniform = { ignores: inner.uniform ? [] : ["two dielectrics (weighed by plate capacitance)"] };
  const trade: Candidate = () => {
    const single = f.tradeStripline(w, b, t, er);
    const differential = 2 * single.impedance * f.tradeStriplinePairFactor(gap, b);
    return differentialResult(f.tradeDifferentialStriplineNote, s, differential, single.inRange);
  };
  if (!inner.centred) {
    return [
      () => coupledResult(f.parallelCohnNote, s, f.parallelCohnCoupled(w, gap, below, above, t, er), uniform),
    ];
  }
  return [
    () => coupledResult(f.cohnCoupledNote, s, f.cohnCoupled(w, gap, b, t, er), uniform),
    () => {
      const thin = f.coupledStripImpedances(w, gap, b, er);
      const result = { ...thin, effectivePermittivityEven: er, effectivePermittivityOdd: er, inRange: true };
      return coupledResult(f.cohnCoupledExactNote, s, result, { ...uniform, knowsThickness: false });
    },
    trade,
  ];
}

function coplanar(s: Structure, slot: number): Candidate[] {
  return [
    () =>
      singleResult(
        f.coplanarNote,
        s,
        f.coplanarWithPlane(s.width, meanSlot(s, slot), s.below.height, s.below.er),
        {
          knowsThickness: false,
        },
      ),
  ];
}

/** The slot is told at the bottom faces; the mean width goes with the mean slot, wider by half of what the crown lost. */
function meanSlot(s: Structure, slot: number): number {
  return slot + s.slope;
}

function betweenPlanes(s: Structure) {
  const above = s.above ?? s.below; // inner structures always have both
  const spacing = s.below.height + s.thickness + above.height;
  return {
    below: s.below.height,
    above: above.height,
    spacing,
    er: f.twoDielectricPermittivity(s.below, above),
    centred: Math.abs(s.below.height - above.height) <= 1e-6 * spacing,
    uniform: s.below.er === above.er,
  };
}
