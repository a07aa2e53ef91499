import { DomainError } from "../errors";

/** How rough copper is described. */
export type Roughness =
  | {
      model: "hammerstad";
      /** root mean square height Rq [m] */
      rms: number;
    }
  | {
      model: "cannonball";
      /** ten-point height Rz of the foil's data sheet [m] */
      tenPoint: number;
    }
  | {
      model: "huray";
      /** spheres of radius [m], `count` of each on `flatArea` [m²] */
      spheres: { radius: number; count: number }[];
      flatArea: number;
      /** area of the matte base ÷ flat area [1]; 1 */
      matte?: number;
    };

/**
 * By how much roughness multiplies the surface resistance.
 * @param depth  skin depth δ [m], > 0
 * @returns [1], ≥ 1; tends to 1 where δ is much larger than the roughness
 * @throws DomainError for negative sizes
 */
export function roughnessFactor(roughness: Roughness, depth: number): number {
  switch (roughness.model) {
    case "hammerstad":
      return hammerstadRoughness(roughness.rms, depth);
    case "cannonball":
      return cannonballRoughness(roughness.tenPoint, depth);
    case "huray":
      return hurayRoughness(roughness.spheres, roughness.flatArea, depth, roughness.matte);
  }
}

/**
 * Grooves across the current, fitted: K = 1 + (2/π) atan(1.4 (Rq/δ)²).
 * Saturates at 2; good for mild roughness up to some 5 GHz, too low for the treated foils above that.
 *
 * @param rms    Rq [m], ≥ 0     @param depth  δ [m], > 0
 * @see E. Hammerstad, O. Jensen, IEEE MTT-S Digest, 1980, p. 407, after S. P. Morgan, J. Appl. Phys. 20, 1949, p. 352
 */
export function hammerstadRoughness(rms: number, depth: number): number {
  requireSize(rms, "rms", "roughness");
  requireDepth(depth);
  return 1 + (2 / Math.PI) * Math.atan(1.4 * (rms / depth) ** 2);
}

/**
 * Copper spheres on a flat base, the loss of each as scattering theory gives it.
 *
 *     K = Am/Af + 3/2 Σ Ni 4π ai²/Af / (1 + δ/ai + δ²/(2 ai²))
 *
 * @param spheres   radii ai [m], > 0, and their number Ni on the flat area
 * @param flatArea  Af [m²], > 0     @param depth  δ [m], > 0     @param matte  Am/Af [1], ≥ 1
 * @see P. G. Huray, "The Foundations of Signal Integrity", Wiley 2010, ch. 6; P. G. Huray et al., DesignCon 2010
 */
export function hurayRoughness(
  spheres: readonly { radius: number; count: number }[],
  flatArea: number,
  depth: number,
  matte = 1,
): number {
  requireDepth(depth);
  if (!(flatArea > 0))
    throw new DomainError("The flat area under the spheres must be above zero.", "flatArea");
  if (!(matte >= 1)) throw new DomainError("The matte area is at least the flat area.", "matte");
  let factor = matte;
  for (const { radius, count } of spheres) {
    requireSize(radius, "spheres", "radius of a sphere");
    requireSize(count, "spheres", "number of spheres");
    if (radius === 0) continue;
    const ratio = depth / radius;
    const area = (count * 4 * Math.PI * radius * radius) / flatArea;
    factor += (1.5 * area) / (1 + ratio + (ratio * ratio) / 2);
  }
  return factor;
}

/**
 * Huray's model with its sizes from the data sheet alone: a pyramid of 14 equal spheres (9, 4, 1) on a square tile of
 * side 6 r, its height 2 r (1 + √2) equal to the rms height Rz/(2√3) of a saw-tooth, so r ≈ 0.06 Rz.
 *
 * @param tenPoint  Rz [m], ≥ 0     @param depth  δ [m], > 0
 * @returns K [1]; saturates at 1 + 7π/3 ≈ 8.33
 * @see B. Simonovich, "Practical method for modeling conductor surface roughness using the cannonball stack
 *   principle", DesignCon 2015
 */
export function cannonballRoughness(tenPoint: number, depth: number): number {
  requireSize(tenPoint, "tenPoint", "roughness");
  requireDepth(depth);
  if (tenPoint === 0) return 1;
  const radius = tenPoint / (2 * Math.sqrt(3)) / (2 * (1 + Math.SQRT2));
  return hurayRoughness([{ radius, count: 14 }], 36 * radius * radius, depth);
}

function requireSize(value: number, field: string, spoken: string): void {
  if (!(value >= 0 && Number.isFinite(value))) {
    throw new DomainError(`The ${spoken} must be zero or more; it is ${value}.`, field);
  }
}

function requireDepth(depth: number): void {
  if (!(depth > 0)) throw new DomainError(`The skin depth must be above zero; it is ${depth}.`, "depth");
}
