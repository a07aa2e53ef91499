import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readTable } from "@/lib/formats/delimited/table";
import { writeDelimited } from "@/lib/formats/delimited/write";
import { badRowsCsv } from "@/lib/formats/lists/bad-rows";
import { guessKind, guessMapping } from "@/lib/formats/lists/guess-mapping";
import { copperLayers, proposeLayer } from "@/lib/formats/lists/layer-names";
import { netsFromNetList, netsFromSections } from "@/lib/formats/lists/nets-from-rows";
import { partKindOf, pinsWarning, valueWarning } from "@/lib/formats/lists/parts-list";
import { previewTable } from "@/lib/formats/lists/preview";
import { listKinds, type ListKind } from "@/lib/schemas/import-list";
import { netDoc, partDoc } from "@/lib/schemas/net";

function read<K extends ListKind>(text: string, kind: K, unit = "mm") {
  const table = readTable(text);
  return previewTable(table, { ...guessMapping(table, kind, unit), kind });
}

const SECTIONS = "net,from,to,layer,width_mm,length_mm\n";

describe("guessMapping", () => {
  it("finds columns in any order under other headers, with their units", () => {
    const table = readTable(
      "Board X export\nLayer Name;Routed Length [mil];Net Name;Start;End;Trace Width (um)\nTOP;500;A;U1.1;U2.1;127\n",
    );
    const mapping = guessMapping(table, "section list", "mm");
    expect(mapping.headerRow).toBe(2);
    expect(mapping.fields).toMatchObject({
      net: { column: 2 },
      from: { column: 3 },
      to: { column: 4 },
      layer: { column: 0 },
      width: { column: 5, unit: "µm" },
      length: { column: 1, unit: "mil" },
    });
    expect(guessKind(table)).toBe("section list");
  });

  it.each([
    ["net list", "net,class,layer,width,length,vias,driver,receivers\n"],
    ["section list", SECTIONS],
    ["parts list", "reference,part number,value,pins\n"],
    ["neighbour list", "net,neighbour,layer,gap_mm,parallel_mm\n"],
  ] as const)("tells a %s by its header", (kind, text) => {
    expect(guessKind(readTable(`${text}a,b,c,1,2,3\n`))).toBe(kind);
  });

  it("takes columns in order where there is no header", () => {
    const preview = read("A,U1.1,U2.1,TOP,0.127,12.5\n", "section list");
    expect([preview.total, preview.good.length]).toEqual([1, 1]);
  });
});

describe("previewImport", () => {
  it("reports each bad cell by row, column, value and reason, and keeps the good rows", () => {
    const preview = read(
      `${SECTIONS}A,U1.1,U2.1,TOP,0.127,12.5\nB,U1.2,U2.2,TOP,-1,12..7\n,U1.3,U2.3,TOP,5 mil,10\nC,U1.4,U1.4,TOP,0.1,5\nD,U1.5,U2.5,TOP,0.1,20 m\n`,
      "section list",
    );
    expect(preview.good.map(({ row }) => row)).toEqual([2]);
    expect(preview.badRows).toBe(4);
    expect(preview.problems).toEqual([
      { row: 3, column: "width", value: "-1", reason: "-1 mm must be above zero." },
      {
        row: 3,
        column: "length",
        value: "12..7",
        reason: "'12..7' is not a length. Write 12.7 mm or 500 mil.",
      },
      { row: 4, column: "net", value: "", reason: "is empty. Every row needs a net." },
      {
        row: 5,
        column: "to",
        value: "U1.4",
        reason: "is the same node as its start, U1.4. A section joins two nodes.",
      },
      {
        row: 6,
        column: "length",
        value: "20 m",
        reason: "20 m is longer than 10 m, which no board reaches. Check the unit.",
      },
    ]);
  });

  it("reads a cell's own unit before the header's, and the decimal comma", () => {
    const preview = read(
      "net;from;to;layer;width_mm;length_mm\nA;U1.1;U2.1;TOP;5 mil;12,5\nB;U1.2;U2.2;TOP;0,127;1,250\n",
      "section list",
    );
    expect(preview.good.map(({ value }) => [value.width, value.length])).toEqual([
      [
        { value: "5", unit: "mil" },
        { value: "12.5", unit: "mm" },
      ],
      [
        { value: "0.127", unit: "mm" },
        { value: "1.25", unit: "mm" },
      ],
    ]);
  });

  it("refuses a number that is one and a half or fifteen hundred, until somebody says which", () => {
    const text =
      "net\tfrom\tto\tlayer\twidth_mil\tlength_mil\nA\tU1.1\tU2.1\tTOP\t5\t1,500\nB\tU1.2\tU2.2\tTOP\t5\t1,250\n";
    const preview = read(text, "section list");
    expect([preview.good.length, preview.badRows]).toEqual([0, 2]);
    expect(preview.problems[0]?.reason).toBe(
      `'1,500' can be read two ways. Leave out the comma, or tick "Decimal comma" if it stands for the point.`,
    );
    const table = readTable(text);
    const told = { ...guessMapping(table, "section list", "mm"), decimalComma: true };
    const lengths = previewTable(table, { ...told, kind: "section list" }).good.map(
      ({ value }) => value.length,
    );
    expect(lengths).toEqual([
      { value: "1.5", unit: "mil" },
      { value: "1.25", unit: "mil" },
    ]);
  });

  it.each([
    ["1.270", "0,127", "read two ways in a list with a decimal comma"],
    ["1.270,5", "0.127", "can be read two ways. Leave out the comma"],
    ["1,234,567", "0,127", "can be read two ways"],
  ])("refuses a length of %s beside a width of %s", (length, width, reason) => {
    const lines = `net;from;to;layer;width;length\nA;U1.1;U2.1;TOP;${width};${length}\nB;U1.2;U2.2;TOP;${width};5\n`;
    const preview = read(lines, "section list");
    expect(preview.good).toHaveLength(1);
    expect(preview.problems[0]?.reason).toContain(reason);
  });

  it("refuses a count of 1,000, which is one or a thousand", () => {
    const preview = read("net;vias\nA;1,000\nB;2,00\n", "net list");
    expect(preview.good.map(({ value }) => value.vias)).toEqual([2]);
  });

  it("refuses a cell of 10 MB by row and column and keeps the rest", () => {
    const preview = read(
      `${SECTIONS}${"x".repeat(10_000_000)},U1.1,U2.1,TOP,0.1,1\nB,U1.2,U2.2,TOP,0.1,1\n`,
      "section list",
    );
    expect([preview.good.length, preview.badRows]).toEqual([1, 1]);
    expect(preview.problems[0]).toMatchObject({ row: 2, column: "net" });
    expect(preview.problems[0]?.reason).toContain("10,000,000 characters");
    expect(preview.problems[0]?.value.length).toBeLessThan(100);
  });

  it("says where a cell stands beyond the header", () => {
    const preview = read(`${SECTIONS}A,U1.1,U2.1,TOP,0,127,12,5\n`, "section list");
    expect(preview.problems[0]).toMatchObject({ row: 2, column: "cell 7" });
  });

  it("takes a row given twice once; the same key with other values is a bad row", () => {
    const sections = read(`${SECTIONS}A,U1.1,U2.1,TOP,0.1,1\nA,U1.1,U2.1,TOP,0.1,1\n`, "section list");
    expect([sections.total, sections.good.length, sections.duplicates.length]).toEqual([2, 2, 1]);
    const nets = netsFromSections(sections.good, { layers: {}, classes: [] });
    expect(nets[0]?.topology.sections).toHaveLength(1);
    const parts = read("reference,value\nR1,33R\nR1,10R\nR2,1k\nR2,1k\n", "parts list");
    expect([parts.good.length, parts.badRows, parts.duplicates.length]).toEqual([3, 1, 1]);
    expect(parts.problems[0]).toMatchObject({ row: 3, column: "reference", value: "R1" });
  });

  it("loses no row on any cells: good + bad = total, each bad row has a reason", () => {
    const cell = fc.oneof(
      fc.constantFrom(
        "",
        "A",
        "U1.1",
        "U2.1",
        "TOP",
        "0.1",
        "5 mil",
        "-3",
        "12..7",
        "=1+1",
        "'",
        "NaN",
        "1e999",
        "0x10",
      ),
      fc.string({ maxLength: 8 }),
    );
    fc.assert(
      fc.property(
        fc.array(fc.array(cell, { minLength: 6, maxLength: 8 }), { maxLength: 20 }),
        fc.constantFrom(...listKinds),
        (rows, kind) => {
          const header = {
            "section list": SECTIONS,
            "net list": "net,class,layer,width,length,vias\n",
            "parts list": "reference,part number,value,pins,a,b\n",
            "neighbour list": "net,neighbour,layer,gap,parallel length,c\n",
          }[kind];
          const text = header + writeDelimited(rows).replace(/\r\n?/g, "\n");
          const preview = read(text, kind);
          expect(preview.good.length + preview.badRows).toBe(preview.total);
          expect(new Set(preview.problems.map(({ row }) => row)).size).toBe(preview.badRows);
          expect(preview.problems.every(({ reason }) => reason.length > 3)).toBe(true);
        },
      ),
      { numRuns: 200 },
    );
  });

  it("writes the bad rows as CSV that no spreadsheet runs", () => {
    const preview = read(`${SECTIONS}A,U1.1,U2.1,TOP,=cmd(),1\n`, "section list");
    expect(badRowsCsv(preview)).toMatch(/^row,column,value,reason\r\n2,width,'=cmd\(\),/);
  });
});

describe("nets from rows", () => {
  it("gives documents that the schema takes", () => {
    const nets = netsFromSections(
      read(`${SECTIONS}A,U1.1,via1,TOP,0.1,1\nA,via1,U2.1,IN1,0.1,9\n`, "section list").good,
      {
        layers: { TOP: "0190a000-0000-7000-8000-000000000001" },
        classes: [{ lineageId: "0190a000-0000-7000-8000-000000000002", name: "Data", netPatterns: ["a*"] }],
      },
    );
    const net = netDoc.parse(nets[0]);
    expect(net).toMatchObject({
      scope: "in",
      classLineageId: "0190a000-0000-7000-8000-000000000002",
      gaps: [],
    });
    expect(net.topology.viaCount).toBe(1);
    expect(net.topology.sections.map(({ layerLineageId }) => layerLineageId)).toEqual([
      "0190a000-0000-7000-8000-000000000001",
      null,
    ]);
  });

  it("makes of a net-list row a section between two pins; with more pins the shape is unknown", () => {
    const preview = read(
      "net,class,layer,width,length,vias,driver,receivers\nA,Data,TOP,0.1,20,2,U1.1,U2.1\nB,,TOP,0.1,20,,U1.2,U2.2 U3.2;U4.2|U5.2\nC,,,,,,U1.3,\n",
      "net list",
    );
    expect(preview.problems).toEqual([]);
    const [a, b, c] = netsFromNetList(preview.good, { layers: {}, classes: [] }).map((doc) =>
      netDoc.parse(doc),
    );
    expect(a?.topology).toMatchObject({
      shapeKnown: true,
      viaCount: 2,
      sections: [{ from: "U1.1", to: "U2.1" }],
    });
    expect(a?.topology.pins.map(({ role }) => role)).toEqual(["driver", "receiver"]);
    expect(b?.topology).toMatchObject({ shapeKnown: false });
    expect(b?.topology.pins).toHaveLength(5);
    expect(b?.scope).toBe("in");
    expect(c).toMatchObject({ scope: "incomplete", gaps: [{ kind: "one pin" }, { kind: "no sections" }] });
  });

  it("takes a length of zero between two pins for a route that is not there; a via in a pad may have none", () => {
    const lists = { layers: {}, classes: [] };
    const header = "net,layer,width,length,driver,receivers\n";
    const [unrouted] = netsFromNetList(read(`${header}A,TOP,0.1,0,U1.1,U2.1\n`, "net list").good, lists);
    expect(unrouted).toMatchObject({ scope: "incomplete", gaps: [{ kind: "no sections" }] });
    const sections = read(
      `${SECTIONS}A,U1.1,U2.1,TOP,0.1,0\nB,U1.2,via1,TOP,0.1,0\nB,via1,U2.2,IN1,0.1,9\nC,U1.3,via2,TOP,0.1,0\nC,via2,U2.3,IN1,0.1,0\n`,
      "section list",
    );
    const [a, b, c] = netsFromSections(sections.good, lists);
    expect([a?.scope, b?.scope, c?.scope]).toEqual(["incomplete", "in", "incomplete"]);
    expect(c?.gaps[0]?.text).toContain("a length of 0 between U1.3 and U2.3");
  });

  it("refuses a driver that names no pin", () => {
    expect(read("net,driver\nA,U1\n", "net list").problems[0]?.reason).toContain(
      "Write reference and pin, such as U1.E10.",
    );
  });
});

describe("parts list", () => {
  it("reads pins as a count or as names, and the kind from the reference", () => {
    const preview = read(
      "reference,part number,value,pins\nR10,RC0402,33R,2\nU1,MCU,,196\nU2,MEM,,A1 A2;B1\nFB3,,600R,2\n",
      "parts list",
    );
    expect(preview.good.map(({ value }) => partDoc.parse(value).pins)).toEqual([
      ["1", "2"],
      [],
      ["A1", "A2", "B1"],
      ["1", "2"],
    ]);
    expect(["R1", "C2", "L3", "FB4", "U5", "J6", "CN7", "Y8", "RN9"].map(partKindOf)).toEqual([
      "resistor",
      "capacitor",
      "inductor",
      "ferrite",
      "ic",
      "connector",
      "connector",
      "other",
      "resistor",
    ]);
  });

  it("warns of a value that cannot be read, not of one that is not fitted", () => {
    const part = (reference: string, value: string) => ({
      reference,
      value,
      kind: partKindOf(reference),
      partNumber: "",
      pins: [],
    });
    expect(valueWarning(part("R1", "33R"))).toBeNull();
    expect(valueWarning(part("C1", "100n/16V X7R"))).toBeNull();
    expect(valueWarning(part("C1", "10 uF 25V"))).toBeNull();
    expect(valueWarning(part("R1", "DNP"))).toBeNull();
    expect(valueWarning(part("R1", "see note"))).toContain("R1");
    expect(valueWarning(part("R1", "4,7k"))).toBeNull();
    expect(valueWarning(part("R1", "-33R"))).toContain("negative");
  });
});

describe("pins of a part", () => {
  it("are remarked on where a lone name is neither a count nor both pins", () => {
    const part = (pins: string[]) => partDoc.parse({ reference: "R1", kind: "resistor", pins });
    expect(pinsWarning(part(["abc"]))).toContain("'abc' is neither a count nor the pins of R1.");
    expect([[], ["1", "2"], ["A", "K"]].map((pins) => pinsWarning(part(pins)))).toEqual([null, null, null]);
  });
});

describe("proposeLayer", () => {
  const copper = copperLayers(
    ["L1 Top", "L2 Ground", "L3 Inner", "L4 Inner", "L5 Power", "L6 Bottom"].map((name, index) => ({
      kind: "signal" as const,
      name,
      lineageId: String(index + 1),
    })),
  );
  it.each([
    ["l1 top", "1"],
    ["TOP", "1"],
    ["L1_TOP", "1"],
    ["BOTTOM", "6"],
    ["bot", "6"],
    ["L3", "3"],
    ["Layer 4", "4"],
    ["IN1", "2"],
    ["INT4", "5"],
    ["power", "5"],
    ["5", "5"],
    ["L9", null],
    ["Inner", null],
    ["DRILL", null],
  ])("takes %j for layer %j", (name, lineageId) => {
    expect(proposeLayer(name, copper)).toBe(lineageId);
  });
});

// Speed is read from the benchmark; here only the size is tried.
it("reads 20,000 rows into nets whole", () => {
  const rows = Array.from(
    { length: 20_000 },
    (_, index) =>
      `N${index >> 1},U${index % 7}.${index},${index % 2 ? "via" : `U9.${index}`},TOP,0.127,${1 + (index % 50)}`,
  );
  const preview = read(`${SECTIONS}${rows.join("\n")}\n`, "section list");
  expect([preview.good.length, preview.badRows]).toEqual([20_000, 0]);
  expect(netsFromSections(preview.good, { layers: {}, classes: [] })).toHaveLength(10_000);
});
