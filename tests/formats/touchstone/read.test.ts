import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { gunzipSync } from "node:zlib";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readTouchstone } from "@/lib/formats/touchstone/read";
import { scatteringOf } from "@/lib/formats/touchstone/to-scattering";
import { portEntry, portFigures } from "@/lib/si/ports";

const read = (text: string, name = "") => {
  const { document, problems } = readTouchstone(text, name);
  if (!document) throw new Error(problems[0]?.reason);
  return document;
};
const entry = (text: string, row: number, column: number, name = "") => {
  const { re, im } = portEntry(read(text, name).data, row, column);
  return [re[0], im[0]];
};

describe("version 1", () => {
  it("reads RI, MA and DB in any unit; two-ports have S21 before S12", () => {
    expect(entry("# MHz S RI R 75\n100 1 2 3 4 5 6 7 8", 1, 0)).toEqual([3, 4]);
    expect(read("# MHz S RI R 75\n100 1 2 3 4 5 6 7 8").data.references[1]).toBe(75);
    expect(read("# MHz S RI R 75\n100 1 2 3 4 5 6 7 8").data.frequencies[0]).toBe(1e8);
    const [re, im] = entry("# S MA\n1 0.5 90", 0, 0);
    expect(re).toBeCloseTo(0, 12);
    expect(im).toBeCloseTo(0.5, 12);
    expect(entry("# hz db s\n5 -20 180", 0, 0)[0]).toBeCloseTo(-0.1, 12);
  });

  it("tells three and four ports by their lines, rows first", () => {
    const rows = (n: number) =>
      Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => `${i + 1} ${j + 1}`).join(" "));
    for (const n of [3, 4]) {
      const text = `# GHz S RI\n${[1, 2].map((f) => `${f} ${rows(n).join("\n  ")}`).join("\n")}`;
      expect(read(text).data.ports).toBe(n);
      expect(entry(text, 2, 0)).toEqual([3, 1]);
    }
  });

  it("takes Y and Z out of their reference, so that scattering parameters come out right", () => {
    const z = read("# GHz Z RI R 50\n1 2 0");
    expect(portEntry(z.data, 0, 0).re[0]).toBe(100);
    expect(portEntry(scatteringOf(z), 0, 0).re[0]).toBeCloseTo(1 / 3, 12);
    expect(portEntry(scatteringOf(read("# GHz Y RI R 50\n1 0.5 0")), 0, 0).re[0]).toBeCloseTo(1 / 3, 12);
    expect(() => scatteringOf(read("# GHz H RI\n1 1 0 1 0 1 0 1 0"))).toThrow("not converted");
  });

  it("leaves noise data out and says where", () => {
    const { document, problems } = readTouchstone(
      "# GHz S RI\n1 1 0 1 0 1 0 1 0\n2 1 0 1 0 1 0 1 0\n1 3 0.5 10 0.3\n2 3 0.5 10 0.3",
      "a.s2p",
    );
    expect(document?.data.frequencies).toHaveLength(2);
    expect(problems).toEqual([
      { severity: "notice", line: 4, reason: "Noise data from here on; they are not used." },
    ]);
  });
});

describe("version 2", () => {
  const head = (more: string) =>
    `[Version] 2.0\n# GHz S RI\n[Number of Ports] 2\n[Number of Frequencies] 1\n${more}\n[Network Data]\n`;
  it("keeps the stated order, references of each port, triangles and mixed modes", () => {
    expect(
      entry(`${head("[Two-Port Data Order] 12_21\n[Reference] 50\n75")}1 1 2 3 4 5 6 7 8\n[End]`, 0, 1),
    ).toEqual([3, 4]);
    expect(entry(`${head("[Two-Port Data Order] 21_12")}1 1 2 3 4 5 6 7 8\n[End]`, 1, 0)).toEqual([3, 4]);
    const lower = `${head("[Two-Port Data Order] 12_21\n[Reference] 50\n75\n[Matrix Format] Lower")}1 1 2 3 4 5 6\n[End]`;
    expect([entry(lower, 0, 1), entry(lower, 1, 0), entry(lower, 1, 1)]).toEqual([
      [3, 4],
      [3, 4],
      [5, 6],
    ]);
    expect([...read(lower).data.references]).toEqual([50, 75]);
    const mixed = readTouchstone(
      `${head("[Two-Port Data Order] 12_21\n[Mixed-Mode Order] D2,1 C2,1")}1 1 2 3 4 5 6 7 8`,
    );
    expect(mixed.document?.mixedMode).toEqual(["D2,1", "C2,1"]);
    expect(mixed.problems[0]).toMatchObject({ severity: "notice", line: 6 });
  });

  it("does not divide Z by the reference", () => {
    const text = "[Version] 2.0\n# GHz Z RI\n[Number of Ports] 1\n[Network Data]\n1 100 0\n[End]";
    expect(entry(text, 0, 0)).toEqual([100, 0]);
  });

  it("passes over information", () => {
    const text =
      "[Version] 2.0\n# GHz S RI\n[Number of Ports] 1\n[Begin Information]\n[Saltiness] high\nwords\n[End Information]\n[Network Data]\n1 0.5 0\n[End]";
    expect(entry(text, 0, 0)).toEqual([0.5, 0]);
  });
});

describe("what cannot be read says line and reason", () => {
  it.each([
    ["", "", 1, "no numbers"],
    ["# GHz S RI\n1 2 x", "", 2, "'x' is not a number"],
    ["# GHz Q RI\n1 2 3", "", 1, "'Q' is unknown"],
    ["# GHz S RI R 0\n1 2 3", "", 1, "R needs a resistance"],
    ["# GHz S RI\n1 2 3\n1 2 3", "", 3, "does not rise"],
    ["# GHz S RI\n1 2 3\n2 2", "a.s1p", 3, "The last record has 2 of the 3"],
    ["# GHz S RI\n1 2 3 4", "", 2, "cannot be told"],
    [
      "[Version] 2.0\n# GHz S RI\n[Number of Ports] 2\n[Network Data]\n1 1 1 1 1 1 1 1 1",
      "",
      1,
      "12_21 or 21_12",
    ],
    ["\u0000", "", 1, "zero byte"],
    [`# GHz S RI\n${"1 ".repeat(5_000_000)}`, "", 2, "more than 200000 characters"],
  ])("%#", (text, name, line, reason) => {
    const { document, problems } = readTouchstone(text, name);
    expect(document).toBeNull();
    expect(problems[0]).toMatchObject({ severity: "error", line });
    expect(problems[0]?.reason).toContain(reason);
  });

  it("whatever is thrown at it, it answers", () => {
    const token = fc.constantFrom(
      "1",
      "-2.5e3",
      "#",
      "GHz",
      "S",
      "RI",
      "R",
      "50",
      "\n",
      "\n",
      "[Version] 2.0\n",
      "[Number of Ports] 2\n",
      "[Network Data]\n",
      "!",
      "[",
      "x",
      "1e999",
      "[Reference]",
      "[End]",
    );
    fc.assert(
      fc.property(
        fc.array(token, { maxLength: 60 }),
        fc.constantFrom("", "a.s2p", "a.s999p"),
        (tokens, name) => {
          const { document, problems } = readTouchstone(tokens.join(" "), name);
          if (!document) expect(problems).toHaveLength(1);
          else expect(document.data.values.every(Number.isFinite)).toBe(true);
        },
      ),
      { numRuns: 500 },
    );
  });
});

const folder = fileURLToPath(new URL("../../../../shared/reference/touchstone", import.meta.url));
const present = existsSync(folder);
if (!present)
  process.stdout.write(
    "Skipped: the measured lines are not beside this repository (shared/reference/touchstone).\n",
  );

it.skipIf(!present)("measured lines: 10,000 frequencies, passive to 1 % and reciprocal to 3 %", () => {
  for (const [name, ports] of [
    ["microstrip-open.s1p.gz", 1],
    ["microstrip-through-100mm.s2p.gz", 2],
    ["microstrip-through-200mm.s2p.gz", 2],
    ["microstrip-stepped-140mm.s2p.gz", 2],
  ] as const) {
    const { document, problems } = readTouchstone(gunzipSync(readFileSync(`${folder}/${name}`)), name);
    expect(problems).toEqual([]);
    expect(document?.data.ports).toBe(ports);
    expect(document?.data.frequencies).toHaveLength(10_000);
    const figures = portFigures(document!.data);
    expect(figures.gain, name).toBeLessThan(1.01);
    expect(figures.nonReciprocity, name).toBeLessThan(0.03);
  }
});
