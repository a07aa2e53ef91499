import { describe, expect, it } from "vitest";
import { materialForm, type MaterialTexts, textsOf } from "@/components/materials/material-form";
import { filterMaterials, materialRows, materialsCsv } from "@/components/materials/material-rows";
import type { StoredMaterial } from "@/lib/schemas/material";
import { aMaterial } from "@/tests/support/documents";

const texts = (over: Partial<MaterialTexts>): MaterialTexts => ({ ...textsOf(aMaterial("Core")), ...over });
const read = (over: Partial<MaterialTexts>) => materialForm("mm").safeParse(texts(over));
const refused = (over: Partial<MaterialTexts>) =>
  read(over).error?.issues.map(({ path, message }) => `${path.join(".")}: ${message}`);

const own: StoredMaterial = {
  ...aMaterial("=Estuary core", { source: 'Data sheet, "rev 2"' }),
  id: "0198f000-0000-7000-8000-000000000001",
  version: 0,
  createdAt: 0,
  updatedAt: 0,
  createdByName: "Dana",
};

describe("the form of a material", () => {
  it("an entry goes through the form and comes out as it was", () => {
    const doc = aMaterial("Core", { glassStyle: "1078", resinPercent: "63" });
    expect(materialForm("mil").parse(textsOf(doc))).toEqual(doc);
  });

  it("reads bare numbers in the reader's unit, decimal commas and per cent", () => {
    expect(read({ thickness: "0,1", resinPercent: "54 %", dk: "3,7", frequency: "5" }).data).toMatchObject({
      thickness: { value: "0.1", unit: "mm" },
      resinPercent: "54",
      dk: "3.7",
      frequency: { value: "5", unit: "GHz" },
    });
  });

  it("keeps of each kind its own fields only", () => {
    expect(read({ kind: "foil", thickness: "1/2 oz", roughness: "0.8" }).data).toMatchObject({
      dk: null,
      frequency: null,
      thickness: { value: "0.5", unit: "oz" },
      roughness: { value: "0.8", unit: "µm" },
    });
  });

  it("says in its field what is wrong with it", () => {
    expect(refused({ thickness: "12..7" })).toEqual([
      "thickness: '12..7' is not a length. Write 12.7 mm or 500 mil.",
    ]);
    expect(refused({ dk: "", name: "" })).toEqual(["name: Give it a name.", "dk: A laminate needs a Dk."]);
    expect(refused({ source: "" })?.[0]).toMatch(/^source: Say where/);
  });
});

describe("the rows of the library", () => {
  const rows = materialRows([own]);

  it("are the team's own first; search takes words anywhere, the filters kind and whose", () => {
    expect(rows[0]?.own).toBe(own);
    const names = (q: string, kind = "", whose = "") =>
      filterMaterials(rows, { q, kind, whose }).map(({ material }) => material.name);
    expect(names("low 1080 loss", "prepreg")).toContain("Modified epoxy, low loss, 1080");
    expect(names("", "", "team")).toEqual(["=Estuary core"]);
    expect(names("estuary", "", "generic")).toEqual([]);
    expect(names("", "mask", "generic")).toEqual(["Solder mask, liquid", "Solder mask, dry film"]);
  });

  it("are copied as CSV that no spreadsheet takes for a formula", () => {
    const [header, first] = materialsCsv(rows.slice(0, 1)).split("\r\n");
    expect(header).toMatch(/^name,kind,whose,glass style,resin %,Dk,Df,Dk and Df at,Dk at 10 GHz,/);
    expect(first).toBe(
      '\'=Estuary core,laminate,team,,,3.62,0.0041,10 GHz,3.62,0.1 mm,,data sheet,"Data sheet, ""rev 2"""',
    );
  });
});
