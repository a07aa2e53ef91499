import { DomainError } from "../errors";
import { MU0 } from "../physical-constants";
import { roughnessFactor, type Roughness } from "./roughness";
import type { Complex } from "./complex";

/** Conductivity of annealed copper [S/m]: resistivity 1.724e-8 Ω·m (IACS, 20 °C). */
export const COPPER_CONDUCTIVITY = 1 / 1.724e-8;

/**
 * Depth at which a plane wave in metal has fallen to 1/e, δ = √(1/(π f μ0 σ)).
 * @param conductivity  σ [S/m], > 0     @param frequency  f [Hz], > 0
 * @returns δ [m]; exact for a flat, thick, non-magnetic conductor
 * @throws DomainError for other inputs
 */
export function skinDepth(conductivity: number, frequency: number): number {
  requireMetal(conductivity, frequency);
  return Math.sqrt(1 / (Math.PI * frequency * MU0 * conductivity));
}

/**
 * Surface resistance Rs = 1/(σδ) of smooth thick metal.
 * @returns Rs [Ω per square]
 * @throws DomainError as skinDepth
 */
export function surfaceResistance(conductivity: number, frequency: number): number {
  return 1 / (conductivity * skinDepth(conductivity, frequency));
}

/**
 * Impedance of a metal sheet seen from one face, Zs = (1 + j) Rs coth((1 + j) t/δ), times the roughness factor.
 *
 * @param conductivity  σ [S/m], > 0     @param frequency  f [Hz], > 0
 * @param thickness     t [m], > 0; Infinity (thick metal) when left out
 * @returns Zs [Ω per square]; 1/(σt) at low and (1 + j) Rs at high frequency
 * @throws DomainError for other inputs
 */
export function surfaceImpedance(
  conductivity: number,
  frequency: number,
  options: { thickness?: number; roughness?: Roughness } = {},
): Complex {
  const { thickness = Infinity, roughness } = options;
  if (!(thickness > 0)) throw new DomainError("The metal must have a thickness.", "thickness");
  const depth = skinDepth(conductivity, frequency);
  const rs = (1 / (conductivity * depth)) * (roughness ? roughnessFactor(roughness, depth) : 1);
  const x = (2 * thickness) / depth;
  if (x > 80) return { re: rs, im: rs };
  // coth((1+j)t/δ) = (sinh x − j sin x)/(cosh x − cos x); the denominator as a sum without cancellation
  const denominator = 2 * (Math.sinh(x / 2) ** 2 + Math.sin(x / 2) ** 2);
  const re = Math.sinh(x) / denominator;
  const im = -Math.sin(x) / denominator;
  return { re: rs * (re - im), im: rs * (re + im) };
}

function requireMetal(conductivity: number, frequency: number): void {
  if (!(conductivity > 0 && Number.isFinite(conductivity))) {
    throw new DomainError(`The conductivity must be above zero; it is ${conductivity}.`, "conductivity");
  }
  if (!(frequency > 0 && Number.isFinite(frequency))) {
    throw new DomainError(`The frequency must be above zero; it is ${frequency}.`, "frequency");
  }
}
