import { describe, expect, it } from "vitest";
import { decodeText } from "@/lib/formats/delimited/decode";
import { readTable } from "@/lib/formats/delimited/table";
import { contentsOf, neighbourRowsOf } from "@/lib/formats/ipc2581/contents";
import { findNeighbours } from "@/lib/formats/ipc2581/neighbours";
import { readBoard } from "@/lib/formats/ipc2581/read";
import { neighbourListOf, partsListOf, sectionListOf } from "@/lib/formats/ipc2581/to-lists";
import { guessKind, guessMapping } from "@/lib/formats/lists/guess-mapping";
import { netsFromSections } from "@/lib/formats/lists/nets-from-rows";
import { previewTable } from "@/lib/formats/lists/preview";
import type { ListKind } from "@/lib/schemas/import-list";
import { toSi } from "@/lib/si/units";
import { boardXml, feature, line, pad, stream, via } from "./board-xml";

function readList<K extends ListKind>(text: string, kind: K) {
  const table = readTable(decodeText(new TextEncoder().encode(text)).text);
  // The unit of the column counts, whatever the project's own is.
  const preview = previewTable(table, { ...guessMapping(table, kind, "cm"), kind });
  expect(preview.problems).toEqual([]);
  return { kind: guessKind(table), good: preview.good };
}

describe("the lists of a board", () => {
  const step =
    `<Package name="Q"><Pin number="A1"><Location x="0" y="0"/></Pin><Pin number="A2"><Location x="0" y="9"/></Pin></Package><Component refDes="U1" packageRef="Q" layerRef="TOP" part="gauge, fast; small"><Location x="0" y="0"/></Component>` +
    feature(
      "TOP",
      pad("+3V", 0, 0, "U1.1") + line("+3V", ["0,0", "7.5,0"]) + line("=TIDE", ["0,0.4", "7.5,0.4"]),
    ) +
    feature("BOTTOM", pad("+3V", 7.5, 3, "U2.E10") + line("+3V", ["7.5,0", "7.5,3"], "W200")) +
    feature("DRILL", via("+3V", 7.5, 0));

  it.each(["INCH", "MILLIMETER", "MICRON"])("read back as the same graph, in %s", async (units) => {
    const board = await readBoard(stream(boardXml({ units, step })));
    const { kind, good } = readList(sectionListOf(board), "section list");
    expect(kind).toBe("section list");
    const nets = netsFromSections(good, { layers: {}, classes: [] });
    expect(nets.map(({ name }) => name)).toEqual(["+3V", "=TIDE"]);
    const [supply] = nets;
    expect(supply).toMatchObject({ scope: "in", gaps: [], topology: { viaCount: 1 } });
    expect(supply?.topology.pins.map(({ node }) => node)).toEqual(["U1.1", "U2.E10"]);
    const [told] = board.nets;
    supply?.topology.sections.forEach(({ length, width, at }, index) => {
      const section = told?.sections[index];
      expect(toSi(length, "length")).toBeCloseTo(section?.length_m ?? -1, 9);
      expect(toSi(width, "length")).toBeCloseTo(section?.width_m ?? -1, 9);
      expect(at?.x2 && toSi(at.x2, "length")).toBeCloseTo(section?.path.at(-2) ?? -1, 9);
    });
  });

  it("keep a part's words with the marks that part columns", async () => {
    const board = await readBoard(stream(boardXml({ step })));
    const { kind, good } = readList(partsListOf(board), "parts list");
    expect(kind).toBe("parts list");
    expect(good.map(({ value }) => [value.reference, value.partNumber, value.pins])).toEqual([
      ["U1", "gauge, fast; small", ["A1", "A2"]],
    ]);
  });
});

describe("neighbours", () => {
  const board = (sets: string) => readBoard(stream(boardXml({ step: feature("TOP", sets) })));
  const search = { distance_m: 0.3e-3, least_m: 0.5e-3 };

  it("are told with the gap edge to edge and the length that they face each other, to 1e-9 m", async () => {
    const { nets } = await board(line("A", ["0,0", "20,0"]) + line("B", ["5,0.4", "30,0.4"], "W200"));
    const { rows, touching } = findNeighbours({ nets }, search);
    expect(touching).toEqual([]);
    expect(rows).toHaveLength(1);
    expect(rows[0]).toMatchObject({ net: "A", neighbour: "B", layer: "TOP" });
    expect(rows[0]?.gap_m).toBeCloseTo(0.4e-3 - 0.075e-3 - 0.1e-3, 9);
    expect(rows[0]?.parallel_m).toBeCloseTo(15e-3, 9);
    const { kind, good } = readListOf(rows);
    expect(kind).toBe("neighbour list");
    expect(good).toHaveLength(1);
  });

  it("are the same whichever way a line is drawn or the board is turned", async () => {
    const turn = ([x, y]: [number, number]) =>
      `${(x * Math.cos(0.5) - y * Math.sin(0.5)).toFixed(9)},${(x * Math.sin(0.5) + y * Math.cos(0.5)).toFixed(9)}`;
    const straight = await board(line("A", ["0,0", "20,0"]) + line("B", ["5,0.4", "30,0.4"]));
    const turned = await board(
      line("B", [turn([30, 0.4]), turn([5, 0.4])]) + line("A", [turn([0, 0]), turn([20, 0])]),
    );
    const [a] = findNeighbours(straight, search).rows;
    const [b] = findNeighbours(turned, search).rows;
    expect(b?.parallel_m).toBeCloseTo(a?.parallel_m ?? -1, 8);
    expect(b?.gap_m).toBeCloseTo(a?.gap_m ?? -1, 8);
  });

  it("follow a bend: one row of both sides", async () => {
    const { nets } = await board(
      line("A", ["0,0", "10,0", "10,10"]) + line("B", ["0,0.4", "9.6,0.4", "9.6,10"]),
    );
    const { rows } = findNeighbours({ nets }, search);
    expect(rows).toHaveLength(1);
    expect(rows[0]?.parallel_m).toBeCloseTo(9.6e-3 + 9.6e-3, 9);
  });

  it("are none across, beyond the distance, on another layer, or of one net", async () => {
    const { nets } = await board(
      line("A", ["0,0", "20,0"]) +
        line("B", ["10,-5", "10,-0.2"]) +
        line("C", ["0,0.6", "20,0.6"]) +
        line("A", ["0,0.3", "20,0.3"]),
    );
    // A's second line is nearer to C than 0.3 mm.
    expect(findNeighbours({ nets }, { ...search, distance_m: 0.1e-3 }).rows).toEqual([]);
    expect(findNeighbours({ nets }, search).rows.map(({ net, neighbour }) => [net, neighbour])).toEqual([
      ["A", "C"],
    ]);
  });

  it("tell copper of two nets that meets, instead of a gap that is none", async () => {
    const { nets } = await board(line("A", ["0,0", "20,0"]) + line("B", ["0,0.1", "20,0.1"]));
    expect(findNeighbours({ nets }, search)).toEqual({
      rows: [],
      touching: [{ net: "A", other: "B", layer: "TOP" }],
    });
  });

  function readListOf(rows: ReturnType<typeof findNeighbours>["rows"]) {
    return readList(neighbourListOf(rows, "mm"), "neighbour list");
  }
});

describe("contents", () => {
  it("count what the file holds and carry its lists", async () => {
    const board = await readBoard(
      stream(
        boardXml({
          step:
            feature(
              "TOP",
              pad("A", 0, 0, "U1.1") + line("A", ["0,0", "9,0"]) + line("B", ["0,0.4", "9,0.4"]),
            ) + feature("DRILL", via("A", 9, 0) + via("C", 3, 3)),
        }),
      ),
    );
    const contents = contentsOf(board);
    expect(contents.counts).toEqual({
      nets: 3,
      routed: 2,
      sections: 2,
      parts: 0,
      pins: 1,
      holes: 2,
      vias: 2,
    });
    expect(contents.layers.map(({ name, plane, sections }) => [name, plane, sections])).toEqual([
      ["TOP", false, 2],
      ["GND", true, 0],
      ["IN2", false, 0],
      ["BOTTOM", false, 0],
    ]);
    expect(contents.sectionList.rows).toBe(2);
    expect(neighbourRowsOf(board, 0.5e-3)).toMatchObject({ rows: 1, touching: [] });
  });
});
