import { describe, expect, it } from "vitest";
import { DomainError } from "@/lib/si/errors";
import { parsePrintedValue, toSi, type PartDimension } from "@/lib/si/units";

// Forms of parts lists: common practice, no source.
describe("parsePrintedValue", () => {
  it.each([
    ["4,7k", 4700],
    ["4 700", 4700],
    ["4 700 Ω", 4700],
    ["4k7", 4700],
    ["4k7 1%", 4700],
    ["4,7k,1%", 4700],
    ["4.7 kOhm 1% 0402", 4700],
    ["2,2 5%", 2.2],
    ["33", 33],
    ["33 0402", 33],
    ["33/0402", 33],
    ["33 1/16W", 33],
    ["33R 1/16W", 33],
    ["33R, 1%", 33],
    ["10k±1%", 10_000],
    ["0", 0],
    ["0R", 0],
  ] as const)("reads %s as %s Ω", (text, ohms) => {
    expect(toSi(parsePrintedValue(text, "resistance"), "resistance")).toBe(ohms);
  });

  it.each([
    ["100n/16V X7R", "capacitance", 1e-7],
    ["10 uF 25V", "capacitance", 1e-5],
    ["4,7nF", "capacitance", 4.7e-9],
    ["2.2uH,0.5A", "inductance", 2.2e-6],
  ] as const)("reads %s as a %s", (text, dimension, value) => {
    expect(toSi(parsePrintedValue(text, dimension), dimension)).toBeCloseTo(value, 15);
  });

  it.each<[string, PartDimension]>([
    ["-33R", "resistance"],
    ["4,700", "resistance"],
    ["4,700k", "resistance"],
    ["4 70", "resistance"],
    ["4 k7 x", "resistance"],
    ["10,1%", "resistance"],
    ["1/2", "resistance"],
    ["tbd", "resistance"],
    ["10k DNP", "resistance"],
    ["100", "capacitance"],
    ["100/16V", "capacitance"],
    ["0", "capacitance"],
    ["0 nF", "capacitance"],
    ["600R@100MHz", "inductance"],
  ])("refuses %s in a whole sentence", (text, dimension) => {
    expect(() => parsePrintedValue(text, dimension)).toThrow(DomainError);
    expect(() => parsePrintedValue(text, dimension)).toThrow(/\.$/);
  });
});
