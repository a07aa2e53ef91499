import { describe, expect, it } from "vitest";
import { readNumber } from "@/lib/formats/ibis/number";
import { readIbis } from "@/lib/formats/ibis/read";
import { saltFile } from "./salt-buffer";

const value = (text: string) => {
  const reading = readNumber(text);
  return reading.kind === "number" ? reading.value : reading.kind;
};
const reasons = (text: string) => readIbis(text).problems.map(({ line, reason }) => `${line}: ${reason}`);
const wrap = (model: string) =>
  `[IBIS Ver] 5.0\n[Component] SALT_CHIP\n[Package]\nR_pkg 1m NA NA\nL_pkg 1nH NA NA\nC_pkg 1pF NA NA\n[Pin] signal_name model_name\n1 TIDE SALT_BUF\n[Model] SALT_BUF\nModel_type Input\n${model}\n[End]\n`;

describe("numbers", () => {
  it("reads the scale letter by its case and drops the unit", () => {
    expect(value("3.44nH")).toBeCloseTo(3.44e-9, 20);
    expect(value("32m")).toBeCloseTo(0.032, 12);
    expect(value("32M")).toBe(32e6);
    expect(value("0.5000k")).toBe(500);
    expect(value("-163.05000pA")).toBeCloseTo(-163.05e-12, 20);
    expect(value("2fF")).toBeCloseTo(2e-15, 25);
    expect(value("2F")).toBe(2);
    expect(value("10v")).toBe(10);
    expect(value(".0012")).toBe(0.0012);
    expect(value("0.")).toBe(0);
    expect(value("19.975e-9")).toBeCloseTo(19.975e-9, 20);
    expect(value("NA")).toBe("na");
  });

  it("takes no letter of the wrong case for a scale, and no meg for milli", () => {
    for (const text of ["1K", "1P", "1N", "1U", "1meg", "1q", "abc", "", "1e999"])
      expect(value(text)).toBe("slip");
  });
});

describe("a whole file", () => {
  const { document, problems } = readIbis(saltFile());
  const model = document?.models[0];

  it("has nothing to complain of", () => expect(problems).toEqual([]));

  it("comes in SI with the line of each thing", () => {
    expect(document?.version).toBe("5.0");
    expect(document?.components[0]?.pins[0]).toMatchObject({
      pin: "A1",
      signal: "TIDE",
      resistance: null,
      line: 11,
    });
    expect(document?.components[0]?.package.inductance?.max).toBeCloseTo(4e-9, 18);
    expect(model).toMatchObject({ type: "I/O", polarity: "non-inverting", line: 14 });
    expect(model?.capacitance?.min).toBeCloseTo(2.5e-12, 20);
    expect(model?.levels.vinl).toEqual({ value: 0.8, line: 17 });
    expect(model?.waveforms).toHaveLength(2);
    expect(model?.waveforms[0]?.rows).toHaveLength(161);
    expect(model?.waveforms[1]?.fixture).toMatchObject({ typ: 3.3, min: 3.3, max: 3.3 });
    expect(model?.ramp?.rise.typ?.seconds).toBeCloseTo(0.45e-9, 18);
  });
});

describe("keywords", () => {
  it("go by words alone: any case, spaces or underscores, another comment character", () => {
    const text = wrap("[comment char] #_char\nC_comp 1p 1p 1p").replace(
      "[Model] SALT_BUF",
      "[ MODEL ] SALT_BUF",
    );
    const { document } = readIbis(
      `${text.replace("[End]", "[gnd_clamp] # note\n-1 -1 NA NA # more\n0 0 NA NA\n[End]")}`,
    );
    expect(document?.models[0]?.tables.gndClamp?.rows).toHaveLength(2);
  });

  it("are named where they are not simulated or not known, once each", () => {
    expect(reasons(wrap("[Composite Current]\n0 1\n[Saltiness] 3\n[Saltiness] 4"))).toEqual([
      "11: [Composite Current] is known but not simulated; it was left out.",
      "13: '[Saltiness]' is no keyword of the standard; it was left out. See whether it is misspelt.",
    ]);
  });

  it("inside another language's block are left out up to its end", () => {
    const { document, problems } = readIbis(
      wrap(
        "[External Model]\nLanguage SPICE\n[Ramp]\nnonsense\n[End External Model]\n[Voltage Range] 3.3 3 3.6",
      ),
    );
    expect(document?.models[0]?.voltageRange?.typ).toBe(3.3);
    expect(problems.map(({ line }) => line)).toEqual([11]);
    expect(reasons(wrap("[External Model]\nLanguage SPICE")).join()).toContain(
      "[End external model], is missing",
    );
  });
});

describe("slips", () => {
  it("say line, keyword, reason and way out, and cost that value only", () => {
    const { document, problems } = readIbis(wrap("C_comp 3P 2p 4p\nVinl = x"));
    expect(problems).toEqual([
      {
        severity: "error",
        line: 11,
        keyword: "[Model]",
        reason:
          "'3P' has the letter P, which is no scale; scales are case-sensitive. Write p if that is meant. The value counts as missing.",
      },
      {
        severity: "error",
        line: 11,
        keyword: "[Model]",
        reason: "The typical value is missing. It may not be NA; take it from the data sheet.",
      },
      {
        severity: "error",
        line: 12,
        keyword: "[Model]",
        reason: "'x' is not a number. Write one such as 3.44nH, or NA. The value counts as missing.",
      },
      {
        severity: "error",
        line: 12,
        keyword: "[Model]",
        reason: "Vinl has no value. Write one, or remove the line.",
      },
    ]);
    expect(document?.models[0]?.capacitance).toMatchObject({ typ: null, line: 11 });
  });

  it("in tables: order is mended, repeats and NA rows are told of", () => {
    const { document, problems } = readIbis(
      wrap("[GND Clamp]\n1 1m NA NA\n0 0 NA NA\n0 5 NA NA\nNA 1 1 1\n-1 -1 NA NA"),
    );
    expect(document?.models[0]?.tables.gndClamp?.rows.map(({ x, typ }) => [x, typ])).toEqual([
      [-1, -1],
      [0, 5],
      [1, 0.001],
    ]);
    expect(problems.map(({ line }) => line)).toEqual([11, 15]);
  });

  it("in names: models that no one gives, pins listed twice, submodels that are missing", () => {
    const text = wrap("[Add Submodel]\nBRINE All").replace(
      "1 TIDE SALT_BUF",
      "1 TIDE SALT_BUF\n1 EBB SALT_BUF\n2 X NONE",
    );
    expect(reasons(text)).toEqual([
      "9: Pin 1 is listed twice; the first was kept.",
      "10: Pin 2 uses model NONE, which is not in the file. Add it, or write NC.",
      "14: Submodel BRINE acts in mode All; it is known but not simulated. The model is used without it.",
      "14: Submodel BRINE is not in the file. Add it, or remove the line.",
    ]);
  });
});

describe("what is no IBIS file is refused with a line and a reason", () => {
  const refused = (source: string | Uint8Array) => {
    const { document, problems } = readIbis(source);
    expect(document).toBeNull();
    expect(problems).toHaveLength(1);
    return `${problems[0]?.line}: ${problems[0]?.reason}`;
  };
  it.each([
    ["", "1: Nothing is in it"],
    ["net,layer\nA,TOP\n", "1: No [keyword] is in it"],
    ["| note\n[Section]\nx", "2: The first keyword is [Section] and not [IBIS Ver]"],
    ["[IBIS Ver] 5.0\n\u0000", "2: The file holds a zero byte"],
    [`[IBIS Ver] 5.0\n${"x".repeat(10_000_000)}`, "2: The line has more than 20000 characters"],
    ["\u0001\u0002".repeat(200), "1: The file holds control characters"],
  ])("%#", (text, start) => expect(refused(text).slice(0, start.length)).toBe(start));

  it("33 MB", () => expect(refused(new Uint8Array(33 * 1024 * 1024))).toMatch(/^1: The file has 33 MB/));

  it("but reads Windows text and a byte-order mark", () => {
    const bytes = new Uint8Array([
      ...new TextEncoder().encode("\uFEFF"),
      ...new TextEncoder().encode(saltFile({ waveforms: false }).replaceAll("\n", "\r\n")),
    ]);
    expect(readIbis(bytes).problems).toEqual([]);
    expect(
      readIbis(new Uint8Array([...new TextEncoder().encode(`${saltFile({ waveforms: false })}| `), 0xb5]))
        .document?.models,
    ).toHaveLength(1);
  });
});
