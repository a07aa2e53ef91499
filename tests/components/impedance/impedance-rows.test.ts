import { describe, expect, it } from "vitest";
import { withClassWidth } from "@/components/impedance/class-width";
import { gridStep, lengthDigits } from "@/components/impedance/grids";
import { remarks, signedPercent } from "@/components/impedance/row-words";
import { widthTableCsv, widthTableText } from "@/components/impedance/width-table";
import { aClassOn, solvedRows } from "../../support/impedance-page";

const mm = (value: string) => ({ value, unit: "mm" });

const rowsOf = (classes: ReturnType<typeof aClassOn>[], grid: Parameters<typeof gridStep>[0] = "5 µm") =>
  solvedRows(classes, gridStep(grid));

describe("rows of the impedance page", () => {
  it("has one row for every class with a target on every signal layer", () => {
    const rows = rowsOf([
      aClassOn("Bus", { L1: ["0.2", null] }),
      aClassOn("No target", {}, { targetImpedance: null }),
    ]);
    expect(rows.map(({ netClass, layer }) => `${netClass.name} ${layer.name}`)).toEqual(["Bus L1", "Bus L4"]);
    expect(rows.map(({ allowed }) => allowed)).toEqual([true, false]);
  });

  it("finds widths on the grid, within half a step of the target", () => {
    for (const grid of ["1 µm", "5 µm", "0.1 mil"] as const) {
      const step = gridStep(grid);
      const [row] = rowsOf([aClassOn("Bus", { L1: ["0.2", null] })], grid);
      if (!row?.meets?.ok) throw new Error("No width was found.");
      const steps = row.meets.value.dimension / step;
      expect(Math.abs(steps - Math.round(steps))).toBeLessThan(1e-9);
      expect(Math.abs(row.meets.value.impedance - 50)).toBeLessThan(0.3);
    }
  });

  it("judges centring by the rule: a width that meets passes, one far off fails, none is no data", () => {
    const [found] = rowsOf([aClassOn("Bus", { L1: ["0.2", null] })]);
    if (!found?.meets?.ok) throw new Error("No width was found.");
    const meeting = String(Number((found.meets.value.dimension * 1e3).toFixed(4)));
    const verdict = (width: string | null) => rowsOf([aClassOn("Bus", { L1: [width, null] })])[0]?.centring;
    expect(verdict(meeting)).toBe("pass");
    expect(verdict("1")).toBe("fail");
    expect(verdict(null)).toBe("no data");
  });

  it("says of a target that cannot be met which range can", () => {
    const [row] = rowsOf([
      aClassOn("Feed", { L1: [null, null] }, { targetImpedance: { value: "400", unit: "Ω" } }),
    ]);
    expect(row?.meets?.ok).toBe(false);
    expect(row && remarks(row, "mm")[0]).toMatch(/^out of reach: [\d.]+ to [\d.]+\u2009Ω$/);
  });

  it("finds for a pair both the width at its gap and the gap at its width", () => {
    const [row] = rowsOf([
      aClassOn(
        "Link",
        { L1: ["0.15", "0.15"] },
        { kind: "differential", targetImpedance: { value: "100", unit: "Ω" } },
      ),
    ]);
    expect(row?.now?.ok && row.now.value.impedance).toBeGreaterThan(60);
    expect(row?.meets?.ok && Math.abs(row.meets.value.impedance - 100)).toBeLessThan(0.6);
    expect(row?.gapAssumed).toBe(false);
    expect(row?.gapMeets).not.toBeNull();
  });

  it("marks a pair's gap that no class told as assumed", () => {
    const [row] = rowsOf([aClassOn("Link", { L1: [null, null] }, { kind: "differential" })]);
    expect(row?.gapAssumed).toBe(true);
    expect(row && remarks(row, "mm")).toContain("no width yet");
  });
});

describe("the table for the layout program", () => {
  const classes = () => [
    aClassOn("=Bus", { L1: ["0.2", null] }),
    aClassOn(
      "Link",
      { L4: ["0.127", "0.1524"] },
      { kind: "differential", targetImpedance: { value: "100", unit: "Ω" } },
    ),
  ];

  it("is tab-separated, has widths as the classes have them in the unit, and no cell that is a formula", () => {
    const rows = rowsOf(classes()).filter(({ allowed }) => allowed);
    const [bus, link] = rows.map((row) => (row.now?.ok ? row.now.value.impedance.toFixed(1) : ""));
    expect(widthTableText(rows, "mil", "present")).toBe(
      [
        "Class\tLayer\tWidth (mil)\tGap (mil)\tTarget (Ω)\tImpedance (Ω)",
        `'=Bus\tL1\t7.874\t\t50\t${bus}`,
        `Link\tL4\t5\t6\t100\t${link}`,
        "",
      ].join("\n"),
    );
  });

  it("gives the widths that meet the target on the grid, as CSV as well", () => {
    const rows = rowsOf(classes(), "1 µm").filter(({ allowed }) => allowed);
    const [bus] = rows;
    if (!bus?.meets?.ok) throw new Error("No width was found.");
    const width = (bus.meets.value.dimension * 1e3).toFixed(3).replace(/0+$/, "");
    const csv = widthTableCsv(rows, "mm", "meeting", []);
    expect(csv.split("\r\n")[1]).toMatch(
      `'=Bus,L1,${width},,50,${bus.meets.value.impedance.toFixed(1)},10,${bus.meets.value.formula?.ohms.toFixed(1)},`,
    );
  });

  it("carries field value, formula, spread and yield of the classes' own widths into the CSV", () => {
    const rows = rowsOf(classes()).filter(({ allowed }) => allowed);
    const spreads = rows.map(({ spread }) => spread);
    const [head, bus] = widthTableCsv(rows, "mm", "present", spreads).split("\r\n");
    const [first] = rows;
    if (!first?.now?.ok || !first.spread?.ok) throw new Error("The row was not solved.");
    const { low, high, yield: share } = first.spread.value;
    expect(head).toContain("Impedance (Ω),Tolerance (%),Formula (Ω),Formula,Spread low (Ω)");
    expect(bus).toContain(`,${first.now.value.impedance.toFixed(1)},10,`);
    expect(bus).toContain(`,${low.toFixed(1)},${high.toFixed(1)},${(100 * share).toFixed(1)},`);
  });
});

describe("a width written into its class", () => {
  it("changes that layer's entry, or adds it, and leaves the rest", () => {
    const link = aClassOn("Link", { L1: ["0.15", "0.15"] }, { kind: "differential" });
    const [layer] = link.layers;
    if (!layer) throw new Error("The class has no layer.");
    const changed = withClassWidth(link, layer.layerLineageId, { width: 0.115e-3, gap: 0.2e-3 }, "mm");
    expect(changed.layers).toEqual([{ ...layer, width: mm("0.115"), gap: mm("0.2") }]);
    const other = "0198f000-0000-7000-8000-0000000000ff";
    expect(withClassWidth(link, other, { width: 0.127e-3, gap: 0.127e-3 }, "mil").layers).toEqual([
      layer,
      { layerLineageId: other, width: { value: "5", unit: "mil" }, gap: { value: "5", unit: "mil" } },
    ]);
    expect(changed).not.toHaveProperty("version");
  });

  it("has no gap in a class of single traces", () => {
    const bus = aClassOn("Bus", { L1: ["0.2", null] });
    const layer = bus.layers[0]?.layerLineageId ?? "";
    expect(withClassWidth(bus, layer, { width: 0.2e-3, gap: 0.1e-3 }, "mm").layers[0]?.gap).toBeNull();
  });
});

describe("words of the impedance page", () => {
  it("writes lengths as their grid needs and deviations with a true minus", () => {
    expect(lengthDigits(0.115e-3, "mm")).toBe("0.115");
    expect(lengthDigits(4.5 * 25.4e-6, "mil")).toBe("4.5");
    expect(signedPercent(-1.234)).toBe("−1.2");
    expect(signedPercent(-0.01)).toBe("0.0");
  });
});
