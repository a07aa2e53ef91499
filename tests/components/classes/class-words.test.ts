import { describe, expect, it } from "vitest";
import { readBindingRows, writeBindingRows } from "@/components/classes/binding-rows";
import { editModelOf } from "@/components/classes/edit-model";
import { checkModel } from "@/components/classes/model-checks";
import { readModelRows, writeModelRows } from "@/components/classes/model-rows";
import { suggestTermination } from "@/components/classes/suggest-termination";
import { classPresets } from "@/lib/schemas/class-presets";
import type { StoredModel } from "@/lib/schemas/model";
import { modelPresets } from "@/lib/schemas/model-presets";
import { eSeriesBetween } from "@/lib/si/units";
import { aClass, aModel } from "../../support/documents";

const LINEAGE = "0198f000-0000-7000-8000-000000000061";
function stored(typical: string): StoredModel {
  const doc = aModel("Pin");
  if (doc.driver) doc.driver.resistance.typical = { value: typical, unit: "Ω" };
  return { ...doc, id: LINEAGE, lineageId: LINEAGE, version: 0 };
}
const subject = (ohms: string) =>
  aClass("A", { targetImpedance: { value: ohms, unit: "Ω" }, driverModelLineageId: LINEAGE });

describe("suggested termination", () => {
  it("is in series the E24 value nearest by ratio to Z0 − driver, for every whole driver below 50 Ω (computed)", () => {
    const standard = eSeriesBetween(0.1, 100, "E24");
    for (let driver = 1; driver < 50; driver++) {
      const value = Number(
        suggestTermination("series", subject("50"), [stored(String(driver))])?.values?.resistance?.value,
      );
      const off = (r: number) => Math.abs(Math.log(r / (50 - driver)));
      const best = Math.min(...standard.map(off));
      expect(off(value)).toBeCloseTo(best, 9);
    }
  });

  it("offers nothing where the driver is not below the line, and says why", () => {
    const found = suggestTermination("series", subject("50"), [stored("55")]);
    expect(found?.values).toBeNull();
    expect(found?.words).toMatch(/55.*50/);
  });

  it("matches the line at its end: 51 Ω and 100 Ω for 50 Ω and 100 Ω; Thevenin twice the line (computed)", () => {
    expect(suggestTermination("parallel", subject("50"), [])?.values?.resistance?.value).toBe("51");
    expect(suggestTermination("differential", subject("100"), [])?.values?.resistance?.value).toBe("100");
    expect(suggestTermination("thevenin", subject("50"), [])?.values).toEqual({
      resistance: { value: "100", unit: "Ω" },
      resistanceLow: { value: "100", unit: "Ω" },
    });
  });
});

describe("checks of a model", () => {
  it("finds no error in the models to start from", () => {
    for (const { doc } of modelPresets) {
      const edit = editModelOf({ ...doc, id: LINEAGE, lineageId: LINEAGE, version: 0 });
      expect(checkModel(edit).filter(({ kind }) => kind === "error")).toEqual([]);
    }
  });

  it("refuses corners out of order and thresholds the wrong way round", () => {
    const edit = editModelOf(stored("17"));
    edit.driver = { ...edit.driver, "resistance.slow": { value: "10", unit: "Ω" } };
    edit.receiver = { vil: { value: "2", unit: "V" }, vih: { value: "0.8", unit: "V" } };
    const errors = checkModel(edit).flatMap(({ kind, text }) => (kind === "error" ? [text] : []));
    expect(errors.some((text) => text.startsWith("Resistance slow (10 Ω) is below typical"))).toBe(true);
    expect(errors).toContain("VIL (2 V) must be below VIH (0.8 V).");
  });
});

describe("pasted rows", () => {
  it("reads back the models that were copied, to the digit", () => {
    const models = modelPresets.map(({ doc }, at) => ({
      ...doc,
      id: String(at),
      lineageId: String(at),
      version: 0,
    }));
    const rows = readModelRows(writeModelRows(models), models);
    expect(rows.map(({ problems }) => problems)).toEqual(models.map(() => []));
    expect(rows.map(({ doc }) => doc)).toEqual(modelPresets.map(({ doc }) => doc));
  });

  it("names row, column and reason of a bad cell and keeps the good rows", () => {
    const text = "Name\tReceiver supply\tC min\tC typical\tC max\nGood\t3.3\t2\t3\t4\nBad\t3.3\t2\t3x\t4";
    const [good, bad] = readModelRows(text, []);
    expect(good?.doc?.receiver?.capacitance.typical).toEqual({ value: "3", unit: "pF" });
    expect(bad?.row).toBe(3);
    expect(bad?.problems[0]).toMatch(/^Column C typical: '3x' is not a capacitance/);
  });

  it("reads bindings with a model by its name and refuses an unknown one", () => {
    const models = [stored("17")];
    const [good, bad] = readBindingRows("U1\t*\tA*\t\tdriver\tpin\nU2\t\t\t\treceiver\tNobody", models);
    expect(good?.doc).toMatchObject({
      referencePattern: "U1",
      pinPattern: "A*",
      netPattern: "*",
      modelLineageId: LINEAGE,
    });
    expect(bad?.problems[0]).toContain("no model named 'Nobody'");
    expect(writeBindingRows(good?.doc ? [good.doc] : [], models)).toContain("U1\t*\tA*\t*\tdriver\tPin");
  });
});

describe("classes to start from", () => {
  it("are whole, named apart, and say that they are common practice", () => {
    expect(new Set(classPresets.map(({ doc }) => doc.name)).size).toBe(classPresets.length);
    for (const { source, doc } of classPresets) {
      expect(source).toBe("Common practice, from memory.");
      expect(doc.targetImpedance).not.toBeNull();
    }
  });
});
