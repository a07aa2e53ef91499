import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { decodeText } from "@/lib/formats/delimited/decode";
import { readTable } from "@/lib/formats/delimited/table";
import type { BoardFile } from "@/lib/formats/ipc2581/document";
import { findNeighbours } from "@/lib/formats/ipc2581/neighbours";
import { readBoard } from "@/lib/formats/ipc2581/read";
import { sectionListOf } from "@/lib/formats/ipc2581/to-lists";
import { guessMapping } from "@/lib/formats/lists/guess-mapping";
import { netsFromSections } from "@/lib/formats/lists/nets-from-rows";
import { previewTable } from "@/lib/formats/lists/preview";
import { stream } from "./board-xml";

// A real 18-layer board (the standard's test data), outer layers only, and the section list derived from it apart.
const beside = (name: string) =>
  fileURLToPath(new URL(`../../../../shared/reference/boards/${name}`, import.meta.url));
const file = beside("ipc2581-rev-c-assembly.xml.gz");
const list = beside("outer-sections.csv");
const present = existsSync(file) && existsSync(list);
if (!present)
  process.stdout.write("Skipped: the real board is not beside this repository (shared/reference/boards).\n");

/** A pin by its name; a via or junction by its kind, since each list counts them in its own order. */
const node = (name: string) => (name.includes(".") ? name : name.replace(/\d+$/, ""));

describe.skipIf(!present)("the real board as IPC-2581 revision C", () => {
  let known: Promise<BoardFile> | null = null;
  const told: number[] = [];
  const read = () => {
    const bytes = new Uint8Array(readFileSync(file));
    known ??= readBoard(stream(bytes, 65_536), {
      totalBytes: bytes.length,
      onProgress: (done) => told.push(done / bytes.length),
    });
    return known;
  };

  it("gives all its nets, parts, holes and lines, with progress; one line of 0.25 µm is told", async () => {
    const board = await read();
    expect(board.nets).toHaveLength(514);
    expect(board.nets.filter(({ sections }) => sections.length > 0)).toHaveLength(489);
    expect(board.nets.reduce((sum, { sections }) => sum + sections.length, 0)).toBe(1589);
    expect([board.parts.length, board.holeCount, board.unit]).toEqual([56, 1859, "in"]);
    expect(board.problems.map(({ line }) => line)).toEqual([17610]);
    expect(told.length).toBeGreaterThan(3);
    expect(told.at(-1)).toBe(1);
  });

  it("agrees with each of the 881 sections of 480 nets: ends, layer, width, length to 0.1 µm", async () => {
    const board = await read();
    const table = readTable(decodeText(readFileSync(list)).text);
    const preview = previewTable(table, {
      ...guessMapping(table, "section list", "mm"),
      kind: "section list",
    });
    const wanted = new Map<string, { ends: string; layer: string; width: number; length: number }[]>();
    for (const { value } of preview.good) {
      const rows = wanted.get(value.net) ?? [];
      rows.push({
        ends: [node(value.from), node(value.to)].sort().join(" "),
        layer: value.layer,
        width: Number(value.width.value),
        length: Number(value.length.value),
      });
      wanted.set(value.net, rows);
    }
    expect(wanted.size).toBe(480);
    let compared = 0;
    for (const [name, rows] of wanted) {
      const sections = board.nets.find((net) => net.name === name)?.sections ?? [];
      expect([name, sections.length]).toEqual([name, rows.length]);
      for (const section of sections) {
        const ends = [node(section.from), node(section.to)].sort().join(" ");
        const at = rows.findIndex(
          (row) =>
            row.ends === ends &&
            row.layer === section.layer &&
            // The list gives four digits of a millimetre.
            Math.abs(row.width - section.width_m * 1e3) <= 0.5001e-4 &&
            Math.abs(row.length - section.length_m * 1e3) <= 0.5001e-4,
        );
        expect([name, section.line, at >= 0]).toEqual([name, section.line, true]);
        rows.splice(at, 1);
        compared++;
      }
    }
    expect(compared).toBe(881);
  });

  it("makes the same routes as the section list: 322 nets in islands, 108 of one pin, 50 complete", async () => {
    const board = await read();
    const csv = new Set(readTable(decodeText(readFileSync(list)).text).rows.map(({ cells }) => cells[0]));
    const table = readTable(sectionListOf(board));
    const preview = previewTable(table, {
      ...guessMapping(table, "section list", "mm"),
      kind: "section list",
    });
    expect(preview.problems).toEqual([]);
    expect(preview.duplicates).toHaveLength(1);
    const nets = netsFromSections(preview.good, { layers: {}, classes: [] }).filter(({ name }) =>
      csv.has(name),
    );
    const of = (kind: string) => nets.filter((net) => net.gaps.some((gap) => gap.kind === kind)).length;
    expect([nets.length, of("islands"), of("one pin"), of("loop")]).toEqual([480, 322, 108, 0]);
    expect(nets.filter(({ scope }) => scope === "in")).toHaveLength(50);
  });

  it("finds the pairs beside each other that its names announce, and no copper of two nets that meets", async () => {
    const { rows, touching } = findNeighbours(await read(), { distance_m: 0.5e-3, least_m: 1e-3 });
    expect(touching).toEqual([]);
    const pair = rows.filter(({ net, neighbour }) => net === "LN0_PAD_TX_N" && neighbour === "LN0_PAD_TX_P");
    const longest = Math.max(...pair.map(({ parallel_m }) => parallel_m));
    expect(longest).toBeGreaterThan(20e-3);
  });
});
