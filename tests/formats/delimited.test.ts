import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { decodeText } from "@/lib/formats/delimited/decode";
import { delimiters, detectDelimiter } from "@/lib/formats/delimited/delimiter";
import { DelimitedError } from "@/lib/formats/delimited/errors";
import { readHeader } from "@/lib/formats/delimited/header-unit";
import { readTable } from "@/lib/formats/delimited/table";
import { neutraliseCell, restoreCell, writeDelimited } from "@/lib/formats/delimited/write";

const bytes = (text: string) => new TextEncoder().encode(text);
const utf16 = (text: string, big: boolean) =>
  Uint8Array.from(
    [...text].flatMap((char) => {
      const code = char.charCodeAt(0);
      return big ? [code >> 8, code & 255] : [code & 255, code >> 8];
    }),
  );
const codeOf = (act: () => unknown) => {
  try {
    act();
  } catch (error) {
    return error instanceof DelimitedError ? error.code : `untyped: ${String(error)}`;
  }
  return "none";
};

describe("decodeText", () => {
  it("strips the byte-order mark of UTF-8 and both UTF-16", () => {
    const text = "net,width µm\nA,1\n";
    expect(decodeText(Uint8Array.from([0xef, 0xbb, 0xbf, ...bytes(text)])).text).toBe(text);
    expect(decodeText(Uint8Array.from([0xff, 0xfe, ...utf16(text, false)]))).toMatchObject({
      text,
      encoding: "UTF-16 LE",
    });
    expect(decodeText(Uint8Array.from([0xfe, 0xff, ...utf16(text, true)]))).toMatchObject({
      text,
      encoding: "UTF-16 BE",
    });
  });

  it("reads UTF-16 without a mark and says so", () => {
    const found = decodeText(utf16("net,width\nA,1\n", false));
    expect(found).toMatchObject({ text: "net,width\nA,1\n", encoding: "UTF-16 LE" });
    expect(found.notices).toHaveLength(1);
  });

  it("falls back to Windows-1252 with a notice", () => {
    const found = decodeText(Uint8Array.from([...bytes("net,gap "), 0xb5, ...bytes("m\nA,1\n")]));
    expect(found).toMatchObject({ text: "net,gap µm\nA,1\n", encoding: "Windows-1252" });
    expect(found.notices[0]).toContain("not UTF-8");
  });

  it.each([
    ["zip", [0x50, 0x4b, 3, 4, 20, 0]],
    ["PNG", [0x89, 0x50, 0x4e, 0x47, 13, 10]],
    ["PDF", [...bytes("%PDF-1.7\n")]],
    ["gzip", [0x1f, 0x8b, 8, 0]],
    ["XML", [...bytes('<?xml version="1.0"?><a/>')]],
    ["HTML", [...bytes("<!DOCTYPE html><html></html>")]],
    ["JSON", [...bytes('{"a": 1}')]],
  ])("refuses a %s file that calls itself a table, with a way out", (_, data) => {
    const error = (() => {
      try {
        decodeText(Uint8Array.from(data));
      } catch (thrown) {
        return thrown;
      }
    })();
    expect(error).toBeInstanceOf(DelimitedError);
    expect((error as DelimitedError).code).toBe("wrong type");
    expect((error as DelimitedError).message).toMatch(/choose that file|choose the|CSV/i);
  });

  it("refuses bytes that are no text, nothing at all, and too much", () => {
    expect(codeOf(() => decodeText(Uint8Array.from([65, 0, 1, 2, 66, 3, 4, 5])))).toBe("not text");
    expect(codeOf(() => decodeText(new Uint8Array()))).toBe("empty");
    expect(codeOf(() => decodeText(bytes(" \n\n")))).toBe("empty");
    expect(codeOf(() => decodeText(bytes("a,b\n1,2\n"), 4))).toBe("too large");
  });

  it("throws nothing untyped on any bytes, and what it reads can be tabled or is refused by type", () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 400 }), (data) => {
        expect(codeOf(() => readTable(decodeText(data).text))).not.toContain("untyped");
      }),
      { numRuns: 500 },
    );
  });
});

describe("readTable", () => {
  it.each([
    [",", "net,from,to\nA,U1.1,U2.2\n"],
    [";", "net;from;width\nA;U1.1;0,127\nB;U1.2;0,15\n"],
    ["\t", "net\tfrom, then to\nA\tU1.1\n"],
    [",", 'net,note\nA,"a;b;c"\nB,"c;d;e"\n'],
    [",", "net,receivers\nA,U1.1;U2.1\nB,U1.2;U2.2\n"],
  ] as const)("finds %j between the cells", (delimiter, text) => {
    expect(detectDelimiter(text)).toBe(delimiter);
  });

  it("knows the decimal comma", () => {
    expect(readTable("net;width;length\nA;0,127;12,5\n").decimalComma).toBe(true);
    expect(readTable("net,width\nA,0.127\n").decimalComma).toBe(false);
    expect(readTable("net;width\nA;0.127\n").decimalComma).toBe(false);
    expect(readTable("net;width;length\nA;0,127;1.270,5\n").decimalComma).toBe(true);
    expect(readTable("net;width;length\nA;0.127;1,270.5\n").decimalComma).toBe(false);
  });

  it("knows none where every comma is followed by three digits: 1,500 may be fifteen hundred", () => {
    expect(readTable("net\tlength_mil\nA\t1,500\nB\t1,250\n").decimalComma).toBe(false);
    expect(readTable("net;length\nA;1,500 mil\nB;-2,250\n").decimalComma).toBe(false);
  });

  it("counts rows as a spreadsheet does, blank ones too", () => {
    const table = readTable("net,width\n\nA,1\n,\nB,2\n");
    expect(table.rows.map(({ row }) => row)).toEqual([1, 3, 5]);
    expect(table.blankRows).toBe(2);
  });

  it("obeys a sep= line", () => {
    expect(readTable("sep=;\na;b,c\n1;2\n").rows[0]?.cells).toEqual(["a", "b,c"]);
  });

  it("names the row of a quote that is never closed", () => {
    expect(() => readTable('a,b\n1,2\n3,"4\n5,6\n')).toThrow(/Row 3: .*not closed/);
    expect(codeOf(() => readTable('a,b\n1,"x" y\n2,3\n'))).toBe("open quote");
  });

  it("refuses too many rows and columns by type", () => {
    expect(codeOf(() => readTable("a\n1\n2\n3\n", { maxRows: 3 }))).toBe("too many rows");
    expect(codeOf(() => readTable("a,b,c\n1,2,3\n", { maxColumns: 2 }))).toBe("too many columns");
  });
});

describe("writeDelimited", () => {
  const cell = fc
    .string({ unit: "grapheme", maxLength: 20 })
    .map((text) => text.replace(/\r\n?/g, "\n").trim());

  it("is read back cell by cell as it was, whatever the cells hold", () => {
    fc.assert(
      fc.property(
        fc.array(fc.array(cell, { minLength: 3, maxLength: 3 }), { minLength: 1, maxLength: 6 }),
        fc.constantFrom(...delimiters),
        (rows, delimiter) => {
          const kept = rows.filter((row) => row.some((text) => text !== ""));
          const text = writeDelimited(rows, delimiter).replace(/\r\n/g, "\n");
          expect(readTable(text, { delimiter }).rows.map(({ cells }) => cells)).toEqual(kept);
        },
      ),
      { numRuns: 400 },
    );
  });

  it("gives no spreadsheet a formula, and leaves numbers alone", () => {
    for (const danger of ["=1+1", "+12V", "-VEE", "@SUM(A1)", "\tx", "\rx", "-5 mil"])
      expect(neutraliseCell(danger)).toBe(`'${danger}`);
    for (const number of ["-0.3", "+5", "-1e-9", "-12,5", "-.5", "7"])
      expect(neutraliseCell(number)).toBe(number);
  });

  it("restores what it made harmless", () => {
    fc.assert(
      fc.property(fc.stringMatching(/^'{0,3}[=+\-@a5]{0,3}[x1.]{0,3}$/), (text) => {
        expect(restoreCell(neutraliseCell(text))).toBe(text);
      }),
    );
  });
});

describe("readHeader", () => {
  it.each([
    ["length_mm", "length", "mm"],
    ["Length [mil]", "length", "mil"],
    ["width (um)", "width", "µm"],
    ["Trace width, mils", "trace width", "mil"],
    ["gap/µm", "gap", "µm"],
    ["widthMm", "width", "mm"],
    ["LENGTH MM", "length", "mm"],
    ["Net Name", "net name", null],
    ["netName", "net name", null],
    ["from", "from", null],
    ["in", "in", null],
  ])("splits %j into name and unit", (text, name, unit) => {
    expect(readHeader(text)).toEqual({ name, unit });
  });
});
