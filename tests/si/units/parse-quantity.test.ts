import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DomainError } from "@/lib/si/errors";
import { convert, dimensions, formatQuantity, parseQuantity, toSi, unitsOf } from "@/lib/si/units";

const read = (text: string) => formatQuantity(parseQuantity(text, "length", "mm"));

describe("parseQuantity", () => {
  it.each([
    ["5 mil", "5 mil"],
    ["0.127mm", "0.127 mm"],
    ["0,127 mm", "0.127 mm"],
    ["0.127", "0.127 mm"],
    [",5", "0.5 mm"],
    ["5.", "5 mm"],
    ["1/2 oz", "0.5 oz"],
    ["1 1/2 oz", "1.5 oz"],
    ["½ oz", "0.5 oz"],
    ["1½ oz", "1.5 oz"],
    ["1 oz/ft²", "1 oz"],
    ["305 g/m²", "305 g/m²"],
    ["18 um", "18 µm"],
    ["18 μm", "18 µm"],
    ["18µm", "18 µm"],
    ['0.5"', "0.5 in"],
    ["0.5 inch", "0.5 in"],
    ["12 345.5 µm", "12345.5 µm"],
    ["12\u2009345 µm", "12345 µm"],
    ["1,234.5 µm", "1234.5 µm"],
    ["1.234,5 µm", "1234.5 µm"],
    ["5e-3 m", "0.005 m"],
    ["5E-3m", "0.005 m"],
    ["−3 µm", "−3 µm"],
    ["100 MM", "100 mm"],
    ["4 MIL", "4 mil"],
  ])("reads the length %s as %s", (text, shown) => expect(read(text)).toBe(shown));

  it.each([
    ["120ps", "time", "120 ps"],
    ["1.5 NS", "time", "1.5 ns"],
    ["3us", "time", "3 µs"],
    ["4k7", "resistance", "4.7 kΩ"],
    ["33R", "resistance", "33 Ω"],
    ["R47", "resistance", "0.47 Ω"],
    ["4R7", "resistance", "4.7 Ω"],
    ["1M0", "resistance", "1 MΩ"],
    ["10k", "resistance", "10 kΩ"],
    ["10 kOhm", "resistance", "10 kΩ"],
    ["33 \u2126", "resistance", "33 Ω"],
    ["33 Ω", "resistance", "33 Ω"],
    ["5 mΩ", "resistance", "5 mΩ"],
    ["5 MΩ", "resistance", "5 MΩ"],
    ["33", "resistance", "33 Ω"],
    ["100n", "capacitance", "100 nF"],
    ["4n7", "capacitance", "4.7 nF"],
    ["2p2", "capacitance", "2.2 pF"],
    ["0.1uF", "capacitance", "0.1 µF"],
    ["10 u", "capacitance", "10 µF"],
    ["2n2", "inductance", "2.2 nH"],
    ["300mV", "voltage", "300 mV"],
    ["-0,3 V", "voltage", "−0.3 V"],
    ["125 mhz", "frequency", "125 MHz"],
    ["1 GHz", "frequency", "1 GHz"],
    ["480 Mb/s", "bitRate", "480 Mb/s"],
    ["5 Gbps", "bitRate", "5 Gb/s"],
    ["1600 MT/s", "frequency", "1600 Mb/s"],
    ["10 %", "ratio", "10 %"],
    ["0.02", "ratio", "0.02"],
    ["6.8 ps/mm", "delayPerLength", "6.8 ps/mm"],
  ] as const)("reads %s, a %s, as %s", (text, dimension, shown) => {
    const bare = { resistance: "Ω", ratio: "1" } as Record<string, string>;
    const quantity = parseQuantity(text, dimension, bare[dimension] ?? unitsOf(dimension)[0] ?? "");
    expect(formatQuantity(quantity)).toBe(shown);
  });

  it("says what is wrong and what to write, in whole sentences", () => {
    expect(() => read("12..7")).toThrow("'12..7' is not a length. Write 12.7 mm or 500 mil.");
    expect(() => read("5 furlong")).toThrow(
      "'5 furlong' is not a length: the unit 'furlong' is not known here. Write 12.7 mm or 500 mil.",
    );
    expect(() => read("1,000")).toThrow("can be read two ways");
    expect(() => read("")).toThrow("Nothing is written where a length is needed.");
  });

  it.each([
    "NaN",
    "Infinity",
    "-Infinity",
    "1e99",
    "1e-99 mm",
    "0x1f",
    "1/0 oz",
    "--3",
    "mm",
    "5 5",
    "1e",
    "𝟙",
    "5 Ω",
  ])("refuses %s with a typed error", (text) => expect(() => read(text)).toThrow(DomainError));

  it.each([
    ["5 MV", "voltage"],
    ["3 mHz", "frequency"],
    ["5 m", "resistance"],
  ] as const)("refuses %s, where the case of a prefix would change it a millionfold", (text, dimension) =>
    expect(() => parseQuantity(text, dimension, unitsOf(dimension)[0] ?? "")).toThrow(DomainError),
  );

  it("never throws anything but a typed error, and never gives a value that is no finite number", () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 20 }), fc.constantFrom(...dimensions), (text, dimension) => {
        try {
          const quantity = parseQuantity(text, dimension, unitsOf(dimension)[0] ?? "");
          expect(Number.isFinite(toSi(quantity, dimension))).toBe(true);
        } catch (error) {
          expect(error).toBeInstanceOf(DomainError);
        }
      }),
    );
  });

  it("reads back what it wrote, in every unit of every dimension", () => {
    const unitOf = fc.constantFrom(
      ...dimensions.flatMap((d) => unitsOf(d).map((unit) => ({ dimension: d, unit }))),
    );
    fc.assert(
      fc.property(
        unitOf,
        fc.integer({ min: -999_999, max: 999_999 }),
        fc.integer({ min: 0, max: 6 }),
        (u, n, places) => {
          const value = convert({ value: `${n}e-${places}`, unit: u.unit }, u.unit).value;
          const text = `${value} ${u.unit === "1" ? "" : u.unit}`;
          expect(parseQuantity(text, u.dimension, u.unit)).toEqual({ value, unit: u.unit });
        },
      ),
    );
  });
});
