import type { CrossSection, Structure } from "../cross-section";
import { LIGHT_SPEED } from "../physical-constants";

/**
 * First transverse resonance of the strip and, on a surface, where the lowest odd surface wave couples to it.
 *
 *     stripline  c/(√εr (2 w + π b/2));   microstrip  min( c/(√εr (2 w + 0.8 h)), c atan(εr)/(√2 π h √(εr − 1)) )
 *
 * @see G. D. Vendelin, Microwave J. 13, 1970 (both microstrip limits and the stripline's), from memory
 */
export function nextModeOf(
  section: CrossSection,
  { place, width, thickness, below, above }: Structure,
): number {
  const er = Math.max(...section.layers.map((layer) => layer.er));
  if (place === "inner") {
    const b = below.height + thickness + (above?.height ?? 0);
    return LIGHT_SPEED / (Math.sqrt(er) * (2 * width + (Math.PI / 2) * b));
  }
  const resonance = LIGHT_SPEED / (Math.sqrt(er) * (2 * width + 0.8 * below.height));
  if (er === 1) return resonance;
  const surface = (LIGHT_SPEED * Math.atan(er)) / (Math.SQRT2 * Math.PI * below.height * Math.sqrt(er - 1));
  return Math.min(resonance, surface);
}
