import { DomainError } from "../errors";
import type { Complex } from "./complex";

export interface WideBandDebyeInput {
  /** relative permittivity at `at_Hz` [1], ≥ 1 */
  er: number;
  /** loss tangent at `at_Hz` [1], ≥ 0 */
  tanD: number;
  /** frequency at which both were measured [Hz], between the two limits */
  at_Hz: number;
  /** where relaxation begins and ends [Hz]; 1 kHz and 1 THz */
  low_Hz?: number;
  high_Hz?: number;
}

export interface WideBandDebye {
  /** ε far above the upper limit [1] */
  infinite: number;
  /** Δ, rise of ε' per factor e downward in frequency [1] */
  rise: number;
  /** Complex relative permittivity ε' − jε'' at a frequency [Hz], ≥ 0. */
  at(frequency: number): Complex;
}

/**
 * Causal dielectric whose loss tangent is nearly flat over decades: relaxations spread evenly in ln f.
 *
 *     ε(f) = ε∞ + Δ ln((f2 + jf)/(f1 + jf)),   Δ and ε∞ such that ε(f0) = εr (1 − j tanδ)
 *
 * @returns the material as a function of frequency; exact at f0, ε' falls by Δ ln 10 a decade between the limits
 * @throws DomainError for inputs outside the ranges above, and where the loss is too large for ε∞ ≥ 1
 * @see A. R. Djordjević, R. M. Biljić, V. D. Likar-Smiljanić, T. K. Sarkar, "Wideband frequency-domain
 *   characterization of FR-4 and time-domain causality", IEEE Trans. EMC 43, 2001, p. 662
 */
export function wideBandDebye(input: WideBandDebyeInput): WideBandDebye {
  const { er, tanD, at_Hz: at, low_Hz: low = 1e3, high_Hz: high = 1e12 } = input;
  if (!(er >= 1 && er < 1e6)) {
    throw new DomainError(`The relative permittivity must be at least 1 (air); it is ${er}.`, "er");
  }
  if (!(tanD >= 0 && tanD < 10)) {
    throw new DomainError(`The loss tangent must be zero or more; it is ${tanD}.`, "tanD");
  }
  if (!(low > 0 && high > low && Number.isFinite(high))) {
    throw new DomainError(
      "The dielectric's lower limit must lie above zero and below its upper one.",
      "low_Hz",
    );
  }
  if (!(at > low && at < high)) {
    throw new DomainError("Dk and Df must be given at a frequency between the dielectric's limits.", "at_Hz");
  }
  const unit = (f: number): Complex => ({
    re: Math.log((high * high + f * f) / (low * low + f * f)) / 2,
    im: Math.atan(f / high) - Math.atan(f / low),
  });
  const there = unit(at);
  const rise = (-er * tanD) / there.im;
  const infinite = er - rise * there.re;
  if (infinite < 1) {
    throw new DomainError("The loss is too large for a dielectric of this permittivity.", "tanD");
  }
  return {
    infinite,
    rise,
    at(frequency) {
      if (!(frequency >= 0 && Number.isFinite(frequency))) {
        throw new DomainError(`The frequency must be zero or more; it is ${frequency}.`, "frequency");
      }
      const u = unit(frequency);
      return { re: infinite + rise * u.re, im: rise * u.im };
    },
  };
}
