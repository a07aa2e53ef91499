import { existsSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { decodeText } from "@/lib/formats/delimited/decode";
import { readTable } from "@/lib/formats/delimited/table";
import { guessKind, guessMapping } from "@/lib/formats/lists/guess-mapping";
import { netsFromSections } from "@/lib/formats/lists/nets-from-rows";
import { previewTable } from "@/lib/formats/lists/preview";
import { proposeFromNames } from "@/lib/formats/net-names";
import { assignRoles } from "@/lib/formats/pin-roles";

// A real 18-layer board, outer layers only; its counts are stated in the reference's README.
const file = fileURLToPath(new URL("../../../shared/reference/boards/outer-sections.csv", import.meta.url));
const present = existsSync(file);
if (!present)
  process.stdout.write(
    "Skipped: the real board's section list is not beside this repository (shared/reference/boards).\n",
  );

describe.skipIf(!present)("the real board's section list", () => {
  const read = () => {
    const table = readTable(decodeText(readFileSync(file)).text);
    const mapping = { ...guessMapping(table, "section list", "mm"), kind: "section list" as const };
    const preview = previewTable(table, mapping);
    return { table, preview, nets: netsFromSections(preview.good, { layers: {}, classes: [] }) };
  };

  it("is known for what it is and loses no row: 881 rows of 480 nets", () => {
    const { table, preview, nets } = read();
    expect(guessKind(table)).toBe("section list");
    expect([preview.total, preview.good.length, preview.badRows]).toEqual([881, 881, 0]);
    expect(nets).toHaveLength(480);
    expect(preview.layers).toEqual([
      { name: "TOP", rows: 860 },
      { name: "BOTTOM", rows: 21 },
    ]);
  });

  it("has 322 nets in islands, 108 of one pin, 50 complete between two pins", () => {
    const { nets } = read();
    const of = (kind: string) => nets.filter((net) => net.gaps.some((gap) => gap.kind === kind)).length;
    const complete = nets.filter((net) => net.scope === "in");
    expect([of("islands"), of("one pin"), complete.length]).toEqual([322, 108, 50]);
    expect(of("loop")).toBe(0);
    expect(complete.every((net) => net.topology.pins.length === 2)).toBe(true);
    expect(nets.filter((net) => net.scope === "incomplete").every((net) => net.gaps.length > 0)).toBe(true);
  });

  it("takes the row given twice once and says so", () => {
    const { preview, nets } = read();
    expect(preview.duplicates).toHaveLength(1);
    expect(preview.duplicates[0]).toMatchObject({ row: 79, firstRow: 78 });
    const net = nets.find(({ name }) => name === "LN8_PAD_TX_P");
    expect(net?.topology.sections.length).toBe(
      preview.good.filter(({ value }) => value.net === "LN8_PAD_TX_P").length - 1,
    );
  });

  it("names the gap", () => {
    const net = read().nets.find(({ name }) => name === "JTAG_TCK");
    expect(net?.gaps[0]?.text).toBe(
      "U1.E10 and U2.Y20 are not joined: islands {U1.E10, via1}, {U2.Y20, via4} and {U3.Y20, via3}",
    );
  });

  it("shows its supplies, pairs and buses by their names", () => {
    const names = read().nets.map(({ name }) => name);
    const proposals = proposeFromNames(names);
    const power = proposals.outOfScope.filter(({ kind }) => kind === "power").map(({ net }) => net);
    expect(power).toEqual(["+12V", "VDDD", "VREFL", "VREFR"]);
    expect(proposals.pairs.find(({ name }) => name === "REFCLK")).toMatchObject({
      positive: "REFCLK_P",
      negative: "REFCLK_N",
    });
    expect(proposals.buses.map(({ label }) => label)).toEqual([
      "L_ADDR[0..11]",
      "L_BE*[0..15]",
      "L_DQ[0..127]",
      "R_ADDR[0..11]",
      "R_DQ[0..127]",
    ]);
  });

  it("counts what 'U1 drives' decides", () => {
    const pins = read().nets.flatMap(({ name, topology }) =>
      topology.pins.map((pin) => ({ ...pin, net: name, partNumber: "" })),
    );
    const any = { partNumberPattern: "*", pinPattern: "*", netPattern: "*" };
    const result = assignRoles(pins, [
      { ...any, referencePattern: "U1", role: "driver" },
      { ...any, referencePattern: "*", role: "receiver" },
    ]);
    expect(result.pins.driver).toBe(pins.filter(({ reference }) => reference === "U1").length);
    expect(result.pins.driver + result.pins.receiver).toBe(pins.length);
    expect(result.pins.open).toBe(0);
  });
});
