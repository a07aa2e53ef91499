import { gzipSync } from "node:zlib";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { BoardFileError } from "@/lib/formats/ipc2581/errors";
import { readBoard, type ReadOptions } from "@/lib/formats/ipc2581/read";
import { boardXml, feature, line, pad, stream, via } from "./board-xml";

const refused = async (file: string | Uint8Array, options?: ReadOptions) => {
  const error: unknown = await readBoard(stream(file, 65_536), options).then(
    () => null,
    (reason: unknown) => reason,
  );
  if (!(error instanceof BoardFileError)) throw new Error(`not refused: ${String(error)}`);
  expect(error.message).toMatch(/^[A-Z].*[.]$/s);
  return error.code;
};
const good = boardXml({
  step:
    feature("TOP", pad("A", 0, 0, "U1.1") + line("A", ["0,0", "9,0"]) + line("B", ["0,1", "9,1"])) +
    feature("DRILL", via("A", 9, 0)),
});

describe("a file that is not read", () => {
  it.each([
    ["nothing at all", "", "empty"],
    ["words", "once upon a tide", "not xml"],
    ["a page", "<html><body/></html>", "not ipc-2581"],
    ["a zip archive", "PK\u0003\u0004 and so on", "not xml"],
    ["a broken tag", good.replace("<CadData>", "<CadData"), "not xml"],
    ["an end that is missing", good.slice(0, -40), "cut off"],
    ["a document type", boardXml({ prolog: `<!DOCTYPE x SYSTEM "file:///etc/hosts">` }), "doctype"],
    [
      "an entity bomb",
      boardXml({ prolog: `<!DOCTYPE b [<!ENTITY a "aaaa"><!ENTITY b "&a;&a;&a;&a;">]>`, step: "&b;" }),
      "doctype",
    ],
    [
      "a document type without an end",
      `<?xml version="1.0"?><!DOCTYPE b [${"<!ENTITY a 'a'>".repeat(90_000)}`,
      "doctype",
    ],
    ["an entity that nobody declared", good.replace('net="B"', 'net="&tide;"'), "entity"],
    ["units that are none", boardXml({ units: "FATHOM" }), "units"],
    ["no header with units", good.replace(/<CadHeader[^>]*><\/CadHeader>/, ""), "units"],
    ["no layout", boardXml(), "nothing"],
    ["an encoding that is unknown", good.replace("UTF-8", "tidal-9"), "not text"],
  ])("is refused with a sentence: %s", async (_, file, code) => {
    expect(await refused(file)).toBe(code);
  });

  it("is refused where elements stand 100,000 deep", async () => {
    const deep = boardXml({ step: "<Set>".repeat(100_000) + "</Set>".repeat(100_000) });
    expect(await refused(deep)).toBe("too deep");
  });

  it("is refused where a small file expands without end, before it is unpacked", async () => {
    const bomb = new Uint8Array(gzipSync(boardXml({ step: " ".repeat(64 * 1024 * 1024) })));
    expect(bomb.length).toBeLessThan(200_000);
    expect(await refused(bomb)).toBe("too large");
  });

  it("is refused beyond the limit on unpacked bytes and on what is kept", async () => {
    expect(await refused(good, { limits: { expandedBytes: 1000 } })).toBe("too large");
    expect(await refused(good, { limits: { items: 3 } })).toBe("too large");
  });

  it("is refused where gzip is damaged or cut off", async () => {
    const bytes = new Uint8Array(gzipSync(good));
    expect(await refused(bytes.subarray(0, bytes.length - 30))).toBe("damaged");
  });

  it("stops when told to", async () => {
    const stop = new AbortController();
    stop.abort();
    expect(await refused(good, { signal: stop.signal })).toBe("cancelled");
  });
});

describe("an element that cannot be used", () => {
  it.each([
    ["a corner that is no number", good.replace('x="9" y="1"', 'x="nine" y="1"'), "PolyStepSegment"],
    ["a corner a mile off", good.replace('x="9" y="1"', 'x="1e9" y="1"'), "PolyStepSegment"],
    [
      "a width that the dictionary lacks",
      good.replace(/W150(?="\/><\/Polyline><\/Features><\/Set><\/Layer)/, "W9"),
      "Polyline",
    ],
    ["a step before the beginning", good.replace('<PolyBegin x="0" y="1"/>', ""), "PolyStepSegment"],
  ])("is told by its line and left out, the rest kept: %s", async (_, file, element) => {
    const board = await readBoard(stream(file));
    expect(board.problems.map((problem) => problem.element)).toContain(element);
    expect(board.problems.every((problem) => problem.line > 1)).toBe(true);
    expect(board.nets.find(({ name }) => name === "A")?.sections).toHaveLength(1);
    expect(board.nets.find(({ name }) => name === "B")?.sections ?? []).toEqual([]);
  });

  it("ends in an answer or a typed refusal for any mutation of a file (seeded slice)", async () => {
    const bytes = new TextEncoder().encode(good);
    const edit = fc.record({
      at: fc.nat(bytes.length - 1),
      cut: fc.nat(40),
      put: fc.oneof(
        fc.constantFrom(
          "<",
          ">",
          '"',
          "&",
          "/>",
          "</Set>",
          "<Set>",
          "1e308",
          "-0",
          "NaN",
          "<Polygon>",
          "<!--",
          "]]>",
        ),
        fc.string({ maxLength: 12 }),
      ),
    });
    await fc.assert(
      fc.asyncProperty(fc.array(edit, { minLength: 1, maxLength: 6 }), async (edits) => {
        let text = good;
        for (const { at, cut, put } of edits) text = text.slice(0, at) + put + text.slice(at + cut);
        try {
          const board = await readBoard(stream(text, 4096));
          for (const { sections } of board.nets)
            for (const { length_m, width_m, path, from, to } of sections) {
              expect([length_m, width_m, ...path].every(Number.isFinite)).toBe(true);
              expect(length_m).toBeGreaterThan(0);
              expect(from).not.toBe(to);
            }
        } catch (error) {
          if (!(error instanceof BoardFileError)) throw error;
        }
      }),
      { seed: 2581, numRuns: 400 },
    );
  });
});
