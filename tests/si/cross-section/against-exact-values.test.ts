import { describe, expect, it } from "vitest";
import { bestClosedForm, type CrossSection } from "@/lib/si/cross-section";
import exact from "../../reference/impedance/exact.json";
import { innerSection, outerSection } from "../../support/sections";

type Numbers = Record<string, number>;
interface Case {
  id: string;
  structure: string;
  geometry_mm: Numbers;
  dielectrics: Numbers;
  results: Numbers;
}

const at = (numbers: Numbers, name: string): number => numbers[name] ?? Number.NaN;

const thinInner = ({ geometry_mm: g, dielectrics: d }: Case): CrossSection => {
  const h1 = g.h1 ?? at(g, "b") / 2;
  return innerSection({
    w: at(g, "w"),
    s: g.s,
    t: 0,
    h1,
    h2: at(g, "b") - h1,
    er: d.er_lower ?? at(d, "er"),
    erUpper: d.er_upper,
  });
};
const thickInner = ({ geometry_mm: g, dielectrics: d }: Case): CrossSection =>
  innerSection({
    w: at(g, "w_bottom"),
    wTop: at(g, "w_top"),
    t: at(g, "t"),
    h1: at(g, "h1"),
    h2: at(g, "h2"),
    er: at(d, "er"),
  });
const outerInAir = ({ geometry_mm: g }: Case): CrossSection =>
  outerSection({ w: at(g, "w_bottom"), wTop: at(g, "w_top"), t: at(g, "t"), h: at(g, "h"), er: 1 });

/** Largest relative deviation of the impedance; 1e-8 is the print of the reference where the formula is exact. */
const limits: Record<string, { build: (item: Case) => CrossSection; relative: number }> = {
  "stripline-symmetric-zero-thickness": { build: thinInner, relative: 1e-8 },
  "stripline-two-dielectrics-zero-thickness": { build: thinInner, relative: 1e-8 },
  "stripline-edge-coupled-zero-thickness": { build: thinInner, relative: 1e-8 },
  "stripline-edge-coupled-two-dielectrics-zero-thickness": { build: thinInner, relative: 1e-8 },
  "stripline-offset-zero-thickness": { build: thinInner, relative: 0.085 },
  "stripline-symmetric-thick-rect": { build: thickInner, relative: 0.01 },
  "stripline-symmetric-thick-trapezoid": { build: thickInner, relative: 0.012 },
  "stripline-offset-thick": { build: thickInner, relative: 0.04 },
  "microstrip-homogeneous-zero-thickness": { build: outerInAir, relative: 5e-4 },
  "microstrip-homogeneous-thick-rect": { build: outerInAir, relative: 0.06 },
  "microstrip-homogeneous-thick-trapezoid": { build: outerInAir, relative: 0.06 },
};

describe("the formula in use against exact values (tests/reference/impedance/exact.json)", () => {
  for (const item of exact.cases as unknown as Case[]) {
    const limit = limits[item.structure];
    if (!limit) continue;
    // a homogeneous medium other than air scales every impedance by 1/√εr
    const scale = limit.build === outerInAir ? Math.sqrt(item.dielectrics.er ?? 1) : 1;
    it(`${item.id} (${item.structure}): Z within ${limit.relative}`, () => {
      const best = bestClosedForm(limit.build(item));
      const compare = (got: number | undefined, name: string) => {
        const wanted = item.results[name];
        if (wanted === undefined) return;
        expect(Math.abs((got ?? Number.NaN) / scale / wanted - 1), name).toBeLessThan(limit.relative);
      };
      compare(best.single?.impedance, "Z0_ohm");
      compare(best.pair?.odd.impedance, "Z_odd_ohm");
      compare(best.pair?.even.impedance, "Z_even_ohm");
      compare(best.pair?.differential, "Z_diff_ohm");
      compare(best.pair?.common, "Z_comm_ohm");
    });
  }
});
