import { describe, expect, it } from "vitest";
import { checkImpedance, type ControlledLine } from "@/lib/si/rules/check-impedance";

function line(nominal: number | null, over: Partial<ControlledLine> = {}): ControlledLine {
  return {
    id: "line class-1 layer-1",
    className: "Data",
    classLineageId: "class-1",
    layer: "L1 Top",
    layerLineageId: "layer-1",
    kind: "single",
    width: 0.28e-3,
    gap: null,
    target: 50,
    nominal,
    method: "Hammerstad–Jensen",
    missing: null,
    limit: { enabled: true, limit: 2, severity: "warning", origin: "default" },
    ...over,
  };
}
const finding = (entry: ControlledLine) => checkImpedance([entry])[0]?.result.findings[0];

describe("impedance centring (common practice, no source)", () => {
  it("is near from 1 %, passes at 2 %, fails beyond", () => {
    expect(finding(line(50.4))?.verdict).toBe("pass");
    expect(finding(line(49.4))?.verdict).toBe("near");
    expect(finding(line(51))).toMatchObject({ verdict: "near", value: 2, margin: 0 });
    expect(finding(line(48.9))?.verdict).toBe("fail");
  });
  it("says width, layer, formula and distance from the target", () => {
    expect(finding(line(55))?.cause).toBe(
      "0.28 mm on L1 Top gives 55 Ω by Hammerstad–Jensen, 10 % from the target of 50 Ω.",
    );
  });
  it("has no data where the section cannot be computed", () => {
    const [entry] = checkImpedance([
      line(null, { missing: { input: "reference plane of L1 Top", detail: "No plane." } }),
    ]);
    expect(entry?.result).toMatchObject({
      verdict: "no data",
      problems: [{ mechanism: "missing input", title: "Missing: reference plane of L1 Top" }],
    });
  });
  it("leaves out lines whose class switches the rule off", () => {
    expect(
      checkImpedance([
        line(60, { limit: { enabled: false, limit: 2, severity: "warning", origin: "class" } }),
      ]),
    ).toEqual([]);
  });
});
