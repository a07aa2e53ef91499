import { describe, expect, it } from "vitest";
import * as q from "@/lib/si/frequency";
import reference from "../../reference/impedance/closed-form.json";

interface Case {
  id: string;
  structure: string;
  inputs: Record<string, number>;
  results: Record<string, number>;
}

const cases = reference.cases as unknown as Case[];
const MM = 1e-3;
const UM = 1e-6;

const evaluate: Record<string, (i: Record<string, number>) => Record<string, number>> = {
  "kirschning-jansen-1982-microstrip-dispersion": (i) => {
    const there = q.kirschningJansenDispersion(n(i.w) * MM, n(i.h) * MM, n(i.er), n(i.f_Hz));
    const rest = q.kirschningJansenDispersion(n(i.w) * MM, n(i.h) * MM, n(i.er), 0);
    return {
      eps_eff_f: there.effectivePermittivity,
      Z0_f_ohm: there.impedance,
      eps_eff_0: rest.effectivePermittivity,
      Z0_0_ohm: rest.impedance,
    };
  },
  "kirschning-jansen-1984-coupled-dispersion": (i) => {
    const [w, s, h, er, f] = [n(i.w) * MM, n(i.s) * MM, n(i.h) * MM, n(i.er), n(i.f_Hz)] as const;
    const pair = q.kirschningJansenPairDispersion(w, s, h, er, f);
    const single = q.kirschningJansenDispersion(w, h, er, f);
    return {
      eps_eff_even_f: pair.effectivePermittivityEven,
      eps_eff_odd_f: pair.effectivePermittivityOdd,
      Z_even_f_ohm: pair.even,
      Z_odd_f_ohm: pair.odd,
      eps_eff_single_f: single.effectivePermittivity,
      Z0_single_f_ohm: single.impedance,
    };
  },
  "hammerstad-jensen-1980-dispersion": (i) => {
    const r = q.hammerstadJensenDispersion(n(i.w) * MM, n(i.h) * MM, n(i.er), n(i.f_Hz));
    return { eps_eff_f: r.effectivePermittivity, Z0_f_ohm: r.impedance };
  },
  "djordjevic-sarkar-wideband-debye": (i) => {
    const model = q.wideBandDebye({
      er: n(i.er),
      tanD: n(i.tand),
      at_Hz: n(i.f0_Hz),
      low_Hz: n(i.f1_Hz),
      high_Hz: n(i.f2_Hz),
    });
    const { re, im } = model.at(n(i.f_Hz));
    return {
      eps_inf: model.infinite,
      delta_ln: model.rise,
      eps_real: re,
      eps_imag_loss: -im,
      tan_delta: -im / re,
    };
  },
  "skin-effect-and-hammerstad-roughness": (i) => {
    const depth = q.skinDepth(1 / n(i.rho_ohm_m), n(i.f_Hz));
    return {
      skin_depth_um: depth / UM,
      Rs_ohm_per_sq: q.surfaceResistance(1 / n(i.rho_ohm_m), n(i.f_Hz)),
      "hammerstad_K_rq0.4um": q.hammerstadRoughness(0.4 * UM, depth),
      "hammerstad_K_rq1.5um": q.hammerstadRoughness(1.5 * UM, depth),
      "hammerstad_K_rq5.0um": q.hammerstadRoughness(5 * UM, depth),
    };
  },
};

/** What the reference lists beside the formula's own results: inputs restated, a constant some codes print instead. */
const beside = new Set(["fn_GHz_mm", "Z_even_f_ohm_Q18_2p31", "delta_eps_total"]);

describe("frequency formulas against tests/reference/impedance/closed-form.json (printed to ten digits)", () => {
  for (const item of cases) {
    const run = evaluate[item.structure];
    if (!run) continue; // static formulas: tests/si/formulas
    it(`${item.id} agrees to 2e-9`, () => {
      const got = run(item.inputs);
      for (const [name, value] of Object.entries(item.results)) {
        if (beside.has(name)) continue;
        expect(
          Math.abs((got[name] ?? Number.NaN) / value - 1),
          `${name}: ${got[name]} for ${value}`,
        ).toBeLessThan(2e-9);
      }
    });
  }
});

function n(value: number | undefined): number {
  if (value === undefined) throw new Error("The reference case lacks an input.");
  return value;
}
