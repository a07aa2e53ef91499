import type { CrossSection } from "../cross-section";
import { wideBandDebye, type WideBandDebye } from "./wide-band-debye";
import type { Solve } from "./wall-recession";

/** One lossy material of a section and how far the capacitance follows it. */
export interface Filling {
  er: number;
  tanD: number;
  /** dC/d ln ε [F/m], over the traces */
  slope: number[][];
}

/** Relative step of the permittivities, ±. */
const STEP = 0.04;

/**
 * How the capacitance follows each dielectric that has loss: layers and mask of equal Dk and Df count as one.
 *
 *     Gi = ω (dC/d ln εi) tanδi,   in a mode qi = d ln C/d ln εi
 *
 * @returns slopes by central differences (one-sided at εr near 1), good to 0.1 % of C
 */
export function fillingFactors(section: CrossSection, solve: Solve): Filling[] {
  const seen = new Map<string, { er: number; tanD: number }>();
  for (const { er, tanD = 0 } of [...section.layers, ...(section.mask ? [section.mask] : [])]) {
    if (tanD > 0) seen.set(`${er} ${tanD}`, { er, tanD });
  }
  return [...seen.values()].map(({ er, tanD }) => {
    const scaled = (factor: number) => solve(withPermittivity(section, er, tanD, er * factor)).capacitance;
    const oneSided = er * (1 - STEP) < 1;
    if (oneSided) {
      const [c0, c1, c2] = [scaled(1), scaled(1 + STEP), scaled(1 + 2 * STEP)];
      // d/dε at εr, times εr
      const at = (i: number, j: number) => (4 * c1[i]![j]! - c2[i]![j]! - 3 * c0[i]![j]!) / (2 * STEP);
      return { er, tanD, slope: c0.map((row, i) => row.map((_, j) => at(i, j))) };
    }
    const up = scaled(1 + STEP);
    const down = scaled(1 - STEP);
    return {
      er,
      tanD,
      slope: up.map((row, i) => row.map((value, j) => (value - down[i]![j]!) / (2 * STEP))),
    };
  });
}

/** Each lossy material over frequency. */
export function materialsOf(fillings: readonly Filling[], at_Hz: number): WideBandDebye[] {
  return fillings.map(({ er, tanD }) => wideBandDebye({ er, tanD, at_Hz }));
}

function withPermittivity(section: CrossSection, er: number, tanD: number, changed: number): CrossSection {
  const change = <T extends { er: number; tanD?: number }>(material: T): T =>
    material.er === er && (material.tanD ?? 0) === tanD ? { ...material, er: changed } : material;
  return {
    ...section,
    layers: section.layers.map(change),
    ...(section.mask && { mask: change(section.mask) }),
  };
}
