import * as f from "../formulas";
import type { Structure } from "./classify";
import { coupledResult, differentialResult, singleResult, type Candidate } from "./closed-form-result";

/** Closed forms of traces between two planes; the one in use first. */

export function innerSingle(s: Structure): Candidate[] {
  const { width: w, thickness: t } = s;
  const inner = betweenPlanes(s);
  const { spacing: b, er, below, above } = inner;
  const uniform = { ignores: inner.uniform ? [] : ["two dielectrics (weighed by plate capacitance)"] };
  const thick: Candidate = () => singleResult(f.wheeler1978Note, s, f.wheeler1978(w, b, t, er), uniform);
  const exact: Candidate = () =>
    singleResult(
      f.cohnExactNote,
      s,
      { impedance: f.centredStripImpedance(w, b, er), effectivePermittivity: er, inRange: true },
      { ...uniform, knowsThickness: false },
    );
  const rough: Candidate[] = [
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
  if (!inner.centred) return [parallel, trade];
  // without thickness Cohn's form is exact
  return t > 0 ? [thick, exact, ...rough] : [exact, thick, ...rough];
}

export function innerPair(s: Structure, gap: number): Candidate[] {
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
