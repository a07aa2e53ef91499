import { DomainError } from "../errors";

/**
 * Arithmetic-geometric mean of two positive numbers; quadratic convergence, to the last digit of a double.
 * @throws DomainError where either is not finite and above zero
 */
export function arithmeticGeometricMean(a: number, b: number): number {
  if (!(a > 0 && b > 0 && Number.isFinite(a) && Number.isFinite(b))) {
    throw new DomainError(
      `The arithmetic-geometric mean needs two positive numbers; it got ${a} and ${b}.`,
      "k",
    );
  }
  let upper = Math.max(a, b);
  let lower = Math.min(a, b);
  // 60 steps suffice from 1 : 1e-300; about five from moduli of practice
  for (let step = 0; step < 60 && upper - lower > 2e-16 * upper; step++) {
    const mean = (upper + lower) / 2;
    lower = Math.sqrt(upper) * Math.sqrt(lower); // not √(upper·lower), which underflows for tiny moduli
    upper = Math.max(mean, lower);
  }
  return (upper + lower) / 2;
}

/**
 * Complete elliptic integral of the first kind, by the complementary modulus.
 *
 *     K(k) = π / (2 agm(1, k′)),   k′ = √(1 − k²)
 *
 * @param complement  k′ [1], 0 < k′ ≤ 1; passed rather than k, since 1 − k² loses digits near k = 1
 * @returns K(k) [1], π/2 at k′ = 1
 * @throws DomainError outside that range
 * @see Abramowitz, Stegun, Handbook of Mathematical Functions, 17.6
 */
export function completeEllipticIntegral(complement: number): number {
  if (!(complement > 0 && complement <= 1)) {
    throw new DomainError(
      `The complementary modulus must lie above 0 and up to 1; it is ${complement}.`,
      "k",
    );
  }
  return Math.PI / (2 * arithmeticGeometricMean(1, complement));
}

/**
 * K(k)/K(k′) from modulus and complementary modulus, both given so that neither is a difference of near-equal numbers.
 * @throws DomainError unless both lie above 0
 */
export function ellipticRatio(modulus: number, complement: number): number {
  return arithmeticGeometricMean(1, modulus) / arithmeticGeometricMean(1, complement);
}
