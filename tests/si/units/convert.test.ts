import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/lib/si/errors";
import { addExact, convert, dimensions, fromSi, toSi, unitsOf } from "@/lib/si/units";

const units = fc.constantFrom(
  ...dimensions.flatMap((d) => unitsOf(d).map((unit) => ({ dimension: d, unit }))),
);
const decimal = fc
  .tuple(fc.integer({ min: -9_999_999, max: 9_999_999 }), fc.integer({ min: 0, max: 9 }))
  .map(([n, places]) => convert({ value: `${n}e-${places}`, unit: "1" }, "1").value);

describe("conversion", () => {
  it("knows the exact definitions: 1 in = 25.4 mm, 1 mil = 25.4 µm", () => {
    expect(toSi({ value: "1", unit: "in" }, "length")).toBe(0.0254);
    expect(convert({ value: "5", unit: "mil" }, "mm")).toEqual({ value: "0.127", unit: "mm" });
    expect(convert({ value: "0.127", unit: "mm" }, "mil")).toEqual({ value: "5", unit: "mil" });
  });

  it("takes 1 oz/ft² of copper as 305 g/m² and 34.3 µm (IPC-4562 nominal, from memory)", () => {
    expect(toSi({ value: "1", unit: "oz" }, "length")).toBe(34.3e-6);
    expect(toSi({ value: "0.5", unit: "oz" }, "length")).toBe(17.15e-6);
    expect(toSi({ value: "305", unit: "g/m²" }, "length")).toBe(34.3e-6);
  });

  it("gives the double nearest to the decimal: 0.1 + 0.2 mm is 0.3 mm", () => {
    expect(
      addExact(
        [
          { value: "0.1", unit: "mm" },
          { value: "0.2", unit: "mm" },
        ],
        "mm",
      ).value,
    ).toBe("0.3");
    expect(
      addExact(
        [
          { value: "35", unit: "µm" },
          { value: "4", unit: "mil" },
          { value: "0.5", unit: "oz" },
        ],
        "mm",
      ).value,
    ).toBe("0.15375");
    expect(addExact([], "mm").value).toBe("0");
  });

  it("round trips through SI numbers exactly for typed values of up to 7 digits, in every unit", () => {
    fc.assert(
      fc.property(units, decimal, ({ dimension, unit }, value) => {
        expect(fromSi(toSi({ value, unit }, dimension), unit)).toEqual({ value, unit });
      }),
    );
  });

  it("round trips between any two units of a dimension to 1e-30 of the value", () => {
    fc.assert(
      fc.property(units, decimal, fc.nat(), ({ dimension, unit }, value, pick) => {
        const others = unitsOf(dimension);
        const other = others[pick % others.length] ?? unit;
        const back = convert(convert({ value, unit }, other), unit);
        expect(fromSi(toSi(back, dimension), unit, 15).value).toBe(value);
      }),
    );
  });

  it("refuses what is not a finite decimal number, an unknown unit, a unit of another kind", () => {
    expect(() => toSi({ value: "NaN", unit: "mm" }, "length")).toThrow(DomainError);
    expect(() => toSi({ value: "Infinity", unit: "mm" }, "length")).toThrow(DomainError);
    expect(() => toSi({ value: "0x10", unit: "mm" }, "length")).toThrow(DomainError);
    expect(() => toSi({ value: "1", unit: "cubit" }, "length")).toThrow(DomainError);
    expect(() => convert({ value: "1", unit: "ps" }, "mm")).toThrow(DomainError);
    expect(() => fromSi(Number.NaN, "mm")).toThrow(DomainError);
  });
});
