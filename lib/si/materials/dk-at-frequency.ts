import { DomainError } from "../errors";

/**
 * Dk at another frequency, as causality asks of a dielectric whose loss tangent is nearly constant.
 *
 *     εr(f) = εr(f0) · (1 − (2/π) tan δ · ln(f/f0))
 *
 * The part of the wideband Debye model between its corner frequencies, to first order in tan δ.
 *
 * @param dk    relative permittivity at f0 [1], ≥ 1
 * @param df    loss tangent [1], 0 to 0.1
 * @param from  f0 [Hz]
 * @param to    f [Hz]; within two decades of f0
 * @throws DomainError outside these ranges
 * Accuracy: within 0.5 % over two decades for tan δ ≤ 0.025 (second-order term, computed).
 * @see A. R. Djordjević, R. M. Biljić, V. D. Likar-Smiljanić, T. K. Sarkar, "Wideband frequency-domain
 *   characterization of FR-4 and time-domain causality", IEEE Trans. EMC 43, 2001
 */
export function dkAtFrequency(dk: number, df: number, from: number, to: number): number {
  if (!(dk >= 1)) throw new DomainError("Dk must be at least 1 (air).", "dk");
  if (!(df >= 0 && df <= 0.1)) throw new DomainError("Df must lie between 0 and 0.1.", "df");
  if (!(from > 0 && to > 0)) throw new DomainError("The frequency must be above zero.", "frequency");
  const decades = Math.log10(to / from);
  if (Math.abs(decades) > 2.001)
    throw new DomainError("Dk is carried over two decades of frequency at most.", "frequency");
  return dk * (1 - (2 / Math.PI) * df * Math.log(to / from));
}
