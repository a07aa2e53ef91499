import { describe, expect, it } from "vitest";
import type { CrossSection, LineParameters } from "@/lib/si/cross-section";
import { airMicrostripImpedance, thicknessWidening, wheeler1978 } from "@/lib/si/formulas";
import { resistanceFactor, surfaceResistance } from "@/lib/si/frequency";
import { LIGHT_SPEED } from "@/lib/si/physical-constants";
import reference from "../../reference/impedance/closed-form.json";

interface Case {
  id: string;
  structure: string;
  inputs: Record<string, number>;
  results: Record<string, number>;
}
const MM = 1e-3;

/** A stand-in for the solver that knows the air line's impedance only. */
const fromAir =
  (impedance: (section: CrossSection) => number) =>
  (section: CrossSection): LineParameters => ({
    capacitance: [[1]],
    airCapacitance: [[1 / (LIGHT_SPEED * impedance(section))]],
    inductance: [[impedance(section) / LIGHT_SPEED]],
    unknowns: 0,
    errorEstimate: 0,
  });

const microstripInAir = fromAir(({ traces }) => {
  const { y, thickness, widthBottom } = traces[0]!;
  const u = widthBottom / y;
  return airMicrostripImpedance(u + thicknessWidening(u, thickness / y, 1).air);
});
const striplineInAir = fromAir(({ layers, traces }) => {
  const height = layers.reduce((sum, layer) => sum + layer.thickness, 0);
  return wheeler1978(traces[0]!.widthBottom, height, traces[0]!.thickness, 1).impedance;
});

describe("wall recession against closed-form.json (Wheeler's rule on published air lines)", () => {
  for (const { id, structure, inputs, results } of reference.cases as unknown as Case[]) {
    if (structure !== "microstrip-loss" && structure !== "stripline-loss") continue;
    it(`${id}: R within 0.1 %, the difference of its steps`, () => {
      const [w, t] = [inputs.w! * MM, inputs.t! * MM];
      const inner = structure === "stripline-loss";
      const height = inner ? inputs.b! * MM : inputs.h! * MM;
      const section: CrossSection = {
        layers: [{ thickness: height, er: inputs.er! }],
        upperPlane: inner,
        traces: [{ x: 0, y: inner ? (height - t) / 2 : height, thickness: t, widthBottom: w, widthTop: w }],
      };
      const [[factor]] = resistanceFactor(section, inner ? striplineInAir : microstripInAir) as [[number]];
      const resistance = factor * surfaceResistance(1 / inputs.rho_ohm_m!, inputs.f_Hz!);
      expect(Math.abs(resistance / results.R_wheeler_ohm_per_m! - 1)).toBeLessThan(1e-3);
    });
  }
});
