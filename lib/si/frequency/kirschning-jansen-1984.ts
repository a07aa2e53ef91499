import { DomainError } from "../errors";
import { kirschningJansen, type CoupledLineResult, type FormulaNote } from "../formulas";
import { requirePositive } from "../formulas/formula";
import {
  dispersionTerms,
  impedanceTerms,
  kirschningJansenDispersion,
  narrowStripTerm,
  normalisedFrequency,
} from "./kirschning-jansen-1982";

export const kirschningJansenPairDispersionNote: FormulaNote = {
  id: "kirschning-jansen-1984-coupled-dispersion",
  title: "Kirschning–Jansen 1984, pair, dispersion",
  range:
    "width and gap 0.1 to 10 heights, Dk 1 to 18, frequency × height up to 25 GHz·mm; permittivities stated 1.4 %, impedances about 2.5 %",
  source:
    'M. Kirschning, R. H. Jansen, "Accurate wide-range design equations for the frequency-dependent characteristic of parallel coupled microstrip lines", IEEE Trans. MTT-32, 1984, p. 83; correction MTT-33, 1985, p. 288',
};

/**
 * Dispersion of two equal zero-thickness microstrips over their static values (`kirschningJansen`).
 *
 *     εm(f) = εr − (εr − εm(0))/(1 + Fm(f))
 *
 * @param width, gap, height  [m], > 0     @param er  [1], ≥ 1     @param frequency  [Hz], ≥ 0
 * @returns mode impedances [Ω] and effective permittivities at the frequency
 * @throws DomainError for other inputs
 */
export function kirschningJansenPairDispersion(
  width: number,
  gap: number,
  height: number,
  er: number,
  frequency: number,
): CoupledLineResult {
  const atRest = kirschningJansen(width, gap, height, er);
  if (frequency === 0 || er === 1) return atRest;
  requirePositive(frequency, "frequency", "frequency");
  const u = width / height;
  const g = gap / height;
  const fn = normalisedFrequency(frequency, height);
  const { even: fe, odd: fo } = pairPermittivityTerms(u, g, er, fn);
  const even = er - (er - atRest.effectivePermittivityEven) / (1 + fe);
  const odd = er - (er - atRest.effectivePermittivityOdd) / (1 + fo);
  const single = kirschningJansenDispersion(width, height, er, frequency);
  const singleAtRest = kirschningJansenDispersion(width, height, er, 0);
  const evenRatio = evenImpedanceRatio(u, g, er, fn, {
    rest: singleAtRest.effectivePermittivity,
    there: single.effectivePermittivity,
  });
  const q = oddTerms(u, g, er, fn);
  const oddImpedance =
    single.impedance +
    (atRest.odd * Math.pow(odd / atRest.effectivePermittivityOdd, q.q22) - single.impedance * q.q23) /
      (1 + q.q24 + Math.pow(0.46 * g, 2.2) * q.q25);
  if (!(evenRatio > 0 && oddImpedance > 0)) {
    throw new DomainError("The pair lies too far outside the range of the dispersion formula.", "frequency");
  }
  return {
    even: atRest.even * evenRatio,
    odd: oddImpedance,
    effectivePermittivityEven: even,
    effectivePermittivityOdd: odd,
    inRange: atRest.inRange && fn <= 25,
  };
}

/** Fe and Fo: how far each mode's permittivity has gone from its static value to εr. */
export function pairPermittivityTerms(
  u: number,
  g: number,
  er: number,
  fn: number,
): { even: number; odd: number } {
  const { scale, narrow } = dispersionTerms(u, er, fn);
  const p5 = 0.334 * Math.exp(-3.3 * (er / 15) ** 3) + 0.746;
  const p6 = p5 * Math.exp(-Math.pow(fn / 18, 0.368));
  const p7 =
    1 + 4.069 * p6 * Math.pow(g, 0.479) * Math.exp(-1.347 * Math.pow(g, 0.595) - 0.17 * Math.pow(g, 2.5));
  const p8 = 0.7168 * (1 + 1.076 / (1 + 0.0576 * (er - 1)));
  const p9 =
    p8 - 0.7913 * (1 - Math.exp(-Math.pow(fn / 20, 1.424))) * Math.atan(2.481 * Math.pow(er / 8, 0.946));
  const p10 = 0.242 * Math.pow(er - 1, 0.55);
  const p11 = 0.6366 * (Math.exp(-0.3401 * fn) - 1) * Math.atan(1.263 * Math.pow(u / 3, 1.629));
  const p12 = p9 + (1 - p9) / (1 + 1.183 * Math.pow(u, 1.376));
  const p13 = (1.695 * p10) / (0.414 + 1.605 * p10);
  const p14 = 0.8928 + 0.1072 * (1 - Math.exp(-0.42 * Math.pow(fn / 20, 3.215)));
  const p15 = Math.abs(1 - (0.8928 * (1 + p11) * p12 * Math.exp(-p13 * Math.pow(g, 1.092))) / p14);
  return {
    even: scale * Math.pow((narrow + 0.1844 * p7) * fn, 1.5763),
    odd: scale * Math.pow((narrow + 0.1844) * fn * p15, 1.5763),
  };
}

function evenImpedanceRatio(
  u: number,
  g: number,
  er: number,
  fn: number,
  single: { rest: number; there: number },
): number {
  const q11 = 0.893 * (1 - 0.3 / (1 + 0.7 * (er - 1)));
  const f20 = Math.pow(fn / 20, 4.91);
  const q12 = ((2.121 * f20) / (1 + q11 * f20)) * Math.exp(-2.87 * g) * Math.pow(g, 0.902);
  const q13 = 1 + 0.038 * Math.pow(er / 8, 5.1);
  const e4 = (er / 15) ** 4;
  const q14 = 1 + (1.203 * e4) / (1 + e4);
  const q15 =
    (1.887 * Math.exp(-1.5 * Math.pow(g, 0.84)) * Math.pow(g, q14)) /
    (1 + (0.41 * (fn / 15) ** 3 * Math.pow(u, 2 / q13)) / (0.125 + Math.pow(u, 1.626 / q13)));
  const q16 = (1 + 9 / (1 + 0.403 * (er - 1) ** 2)) * q15;
  const q17 =
    0.394 * (1 - Math.exp(-1.47 * Math.pow(u / 7, 0.672))) * (1 - Math.exp(-4.25 * Math.pow(fn / 20, 1.87)));
  const q18 = (0.61 * (1 - Math.exp(-2.13 * Math.pow(u / 8, 1.593)))) / (1 + 6.544 * Math.pow(g, 4.17));
  const q19 = (0.21 * g ** 4) / ((1 + 0.18 * Math.pow(g, 4.9)) * (1 + 0.1 * u * u) * (1 + (fn / 24) ** 3));
  const q20 = (0.09 + 1 / (1 + 0.1 * Math.pow(er - 1, 2.7))) * q19;
  const u25 = Math.pow(u, 2.5);
  const q21 = Math.abs(1 - (42.54 * Math.pow(g, 0.133) * Math.exp(-0.812 * g) * u25) / (1 + 0.033 * u25));
  const pe = 4.766 * Math.exp(-3.228 * Math.pow(u, 0.641));
  const ce =
    1 +
    1.275 * (1 - Math.exp(-0.004625 * pe * Math.pow(er, 1.674) * Math.pow(fn / 18.365, 2.745))) -
    q12 +
    q16 -
    q17 +
    q18 +
    q20;
  const { exponent } = impedanceTerms(u, er, fn, single.rest, single.there);
  const there = 0.9408 * Math.pow(single.there, ce) - 0.9603;
  const rest = (0.9408 - narrowStripTerm(u, er, fn, q21)) * Math.pow(single.rest, ce) - 0.9603;
  return Math.pow(there / rest, exponent);
}

function oddTerms(
  u: number,
  g: number,
  er: number,
  fn: number,
): { q22: number; q23: number; q24: number; q25: number } {
  const e = er - 1;
  const e12 = (e / 13) ** 12;
  const q29 = 15.16 / (1 + 0.196 * e * e);
  const q28 = (0.149 * e ** 3) / (94.5 + 0.038 * e ** 3);
  const e15 = Math.pow(e, 1.5);
  const q27 = 0.4 * Math.pow(g, 0.84) * (1 + (2.5 * e15) / (5 + e15));
  const q26 = 30 - (22.2 * e12) / (1 + 3 * e12) - q29;
  const q25 = ((0.3 * fn * fn) / (10 + fn * fn)) * (1 + (2.333 * e * e) / (5 + e * e));
  const u9 = Math.pow(u, 0.894);
  const q24 = (2.506 * q28 * u9 * Math.pow(((1 + 1.3 * u) * fn) / 99.25, 4.29)) / (3.575 + u9);
  const q23 = 1 + (0.005 * fn * q27) / ((1 + 0.812 * Math.pow(fn / 15, 1.9)) * (1 + 0.025 * u * u));
  const q22 = (0.925 * Math.pow(fn / q26, 1.536)) / (1 + 0.3 * Math.pow(fn / 30, 1.536));
  return { q22, q23, q24, q25 };
}
