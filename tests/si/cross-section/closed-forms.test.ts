import { describe, expect, it } from "vitest";
import {
  bestClosedForm,
  closedForms,
  type ClosedFormResult,
  type CrossSection,
} from "@/lib/si/cross-section";
import { UnsupportedError } from "@/lib/si/errors";
import reference from "../../reference/impedance/closed-form.json";
import { coveredSection, innerSection, outerSection } from "../../support/sections";

type Numbers = Record<string, number>;
interface Case {
  id: string;
  structure: string;
  inputs: Numbers;
  results: Numbers;
  validity: string;
}
const cases = reference.cases as unknown as Case[];

const get = (numbers: Numbers, name: string): number => {
  const value = numbers[name];
  if (value === undefined) throw new Error(`reference case lacks ${name}`);
  return value;
};

const outer = (i: Numbers) =>
  outerSection({ w: get(i, "w"), h: get(i, "h"), t: i.t ?? 0, er: get(i, "er"), s: i.s });
const centred = (i: Numbers) => {
  const half = (get(i, "b") - get(i, "t")) / 2;
  return innerSection({ w: get(i, "w"), t: get(i, "t"), h1: half, h2: half, er: get(i, "er"), s: i.s });
};

const build: Record<string, (i: Numbers) => CrossSection> = {
  "hammerstad-jensen-1980-zero-thickness": outer,
  "hammerstad-jensen-1980-thickness": outer,
  "wheeler-1977-microstrip": outer,
  "wheeler-1965-microstrip": outer,
  "ipc2141-microstrip": outer,
  "ipc2141-differential-microstrip": outer,
  "kirschning-jansen-1984-coupled-static": outer,
  "ipc2141-stripline": centred,
  "ipc2141-differential-stripline": centred,
  "wheeler-1978-stripline": centred,
  "cohn-1954-stripline-thick-wide": centred,
  "cohn-1954-stripline-thick-narrow": centred,
  "cohn-1955-edge-coupled-stripline": centred,
  "offset-stripline-approximations": (i) =>
    innerSection({ w: get(i, "w"), t: get(i, "t"), h1: get(i, "h1"), h2: get(i, "h2"), er: get(i, "er") }),
  "ipc2141-embedded-microstrip": (i) =>
    coveredSection({
      w: get(i, "w"),
      t: get(i, "t"),
      h: get(i, "h"),
      er: get(i, "er"),
      cover: get(i, "h_total") - get(i, "h"),
      coverEr: get(i, "er"),
    }),
  "cpwg-elliptic": (i) =>
    outerSection({ w: get(i, "w"), h: get(i, "h"), t: 0, er: get(i, "er"), slot: get(i, "s") }),
};

/** Which number of which variant a reference result is. */
const results: Record<string, (forms: ClosedFormResult[]) => number | undefined> = {
  Z0_ohm: ([form]) => form?.impedance.single,
  eps_eff: ([form]) => form?.effectivePermittivity.single,
  Z_odd_ohm: ([form]) => form?.impedance.odd,
  Z_even_ohm: ([form]) => form?.impedance.even,
  Z_diff_ohm: ([form]) => form?.impedance.differential,
  Z_comm_ohm: ([form]) => form?.impedance.common,
  eps_eff_odd: ([form]) => form?.effectivePermittivity.odd,
  eps_eff_even: ([form]) => form?.effectivePermittivity.even,
  Z0_parallel_wheeler78_ohm: (forms) => variant(forms, "parallel-wheeler-1978"),
  Z0_ipc80_total_ohm: (forms) => variant(forms, "80, whole height"),
  Z0_ipc80_h2_ohm: (forms) => variant(forms, "80, farther height"),
  Z0_form60_ohm: (forms) => variant(forms, "60"),
  Z0_form87_ohm: (forms) => variant(forms, "87"),
};

function variant(forms: ClosedFormResult[], name: string): number | undefined {
  return forms.find((form) => form.variant === name)?.impedance.single;
}

describe("closedForms on the reference's own geometries", () => {
  for (const item of cases) {
    const make = build[item.structure];
    if (!make) continue; // dispersion, loss and planeless structures are no cross-sections
    it(`${item.id}: found by its id, equal to 1e-9`, () => {
      const forms = closedForms(make(item.inputs)).filter((form) => form.id === item.structure);
      expect(forms.length).toBeGreaterThan(0);
      const single = "s" in item.inputs && "Z0_ohm" in item.results && item.structure.startsWith("ipc2141");
      for (const [name, value] of Object.entries(item.results)) {
        const read = results[name];
        if (!read || (single && name === "Z0_ohm")) continue;
        expect(Math.abs((read(forms) ?? Number.NaN) / value - 1), name).toBeLessThan(1e-9);
      }
      if (item.validity.includes("OUTSIDE")) expect(forms.every((form) => !form.inRange)).toBe(true);
    });
  }
});

describe("bestClosedForm", () => {
  it.each([
    ["outer", outerSection({ w: 0.2, h: 0.1, t: 0.035, er: 4.2 }), "hammerstad-jensen-1980-thickness"],
    [
      "outer, no thickness",
      outerSection({ w: 0.2, h: 0.1, t: 0, er: 4.2 }),
      "hammerstad-jensen-1980-zero-thickness",
    ],
    [
      "inner, centred",
      innerSection({ w: 0.1, t: 0.018, h1: 0.15, h2: 0.15, er: 4.2 }),
      "wheeler-1978-stripline",
    ],
    [
      "inner, off-centre",
      innerSection({ w: 0.1, t: 0.018, h1: 0.1, h2: 0.3, er: 4.2 }),
      "offset-stripline-approximations",
    ],
    [
      "covered",
      coveredSection({ w: 0.15, t: 0.018, h: 0.1, er: 4.2, cover: 0.05, coverEr: 3.5 }),
      "covered-microstrip-exponential",
    ],
    [
      "outer pair",
      outerSection({ w: 0.2, s: 0.2, h: 0.1, t: 0.035, er: 4.2 }),
      "kirschning-jansen-1984-coupled-thickness",
    ],
    [
      "inner pair",
      innerSection({ w: 0.1, s: 0.2, t: 0.018, h1: 0.15, h2: 0.15, er: 4.2 }),
      "cohn-1955-edge-coupled-stripline",
    ],
    [
      "inner pair, off-centre",
      innerSection({ w: 0.1, s: 0.2, t: 0.018, h1: 0.1, h2: 0.3, er: 4.2 }),
      "offset-pair-parallel-cohn-1955",
    ],
    ["coplanar", outerSection({ w: 0.2, h: 0.2, t: 0.035, er: 4.2, slot: 0.15 }), "cpwg-elliptic"],
  ])("%s: uses %3$s", (_, section, id) => {
    const best = bestClosedForm(section);
    expect(best.form.id).toBe(id);
    const mode = best.single ?? best.pair?.odd;
    expect(mode?.delay).toBeCloseTo(Math.sqrt(mode?.effectivePermittivity ?? 0) / 299_792_458, 20);
  });

  it("says what it does not see: mask, slope, merged layers", () => {
    const masked = bestClosedForm(
      outerSection({ w: 0.2, wTop: 0.18, h: 0.1, t: 0.035, er: 4.2, mask: 0.02 }),
    );
    expect(masked.form.ignores).toEqual(["solder mask", "sloped sides (mean width taken)"]);
    const mixed = bestClosedForm(
      innerSection({ w: 0.1, t: 0.018, h1: 0.15, h2: 0.15, er: 4.2, erUpper: 3.6 }),
    );
    expect(mixed.form.ignores).toEqual(["two dielectrics (weighed by plate capacitance)"]);
  });

  it("refuses, in a sentence, what no published formula fits", () => {
    const pair = outerSection({ w: 0.2, s: 0.2, h: 0.1, t: 0.035, er: 4.2 });
    const [left, right] = pair.traces;
    if (!left || !right) throw new Error("a pair has two traces");
    const unequal = { ...pair, traces: [left, { ...right, widthBottom: 0.25e-3, widthTop: 0.25e-3 }] };
    expect(() => bestClosedForm(unequal)).toThrow(UnsupportedError);
    expect(() => bestClosedForm({ ...pair, coplanar: { gap: 2e-4 } })).toThrow("beside coplanar ground");
    expect(closedForms(unequal)).toEqual([]);
  });

  it("turning an inner section upside down changes nothing, to 1e-12", () => {
    const upright = innerSection({ w: 0.1, s: 0.15, t: 0.018, h1: 0.1, h2: 0.3, er: 4.2, erUpper: 3.6 });
    const turned: CrossSection = {
      ...upright,
      layers: [...upright.layers].reverse(),
      traces: upright.traces.map((trace) => ({ ...trace, y: 0.3e-3 })),
    };
    const differential = (section: CrossSection) => bestClosedForm(section).pair?.differential ?? Number.NaN;
    expect(Math.abs(differential(turned) / differential(upright) - 1)).toBeLessThan(1e-12);
  });
});
