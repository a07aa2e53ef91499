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
    tolerance: 0.1,
    nominal,
    method: "2-D field solution",
    closedForm: { ohms: 57.1, title: "Hammerstad–Jensen", inRange: false },
    spread: {
      yield: 0.991,
      low: 45.2,
      high: 55.1,
      chief: "the width",
      chiefShare: 0.61,
      method: "1,000 samples",
    },
    missing: null,
    limits: {
      "impedance-centring": { enabled: true, limit: 2, severity: "warning", origin: "default" },
      "impedance-yield": { enabled: true, limit: 95, severity: "warning", origin: "default" },
    },
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
  it("says width, layer, method, the formula beside it and distance from the target", () => {
    expect(finding(line(55))?.cause).toBe(
      "0.28 mm on L1 Top gives 55 Ω by 2-D field solution (Hammerstad–Jensen: 57.1 Ω, outside its range), 10 % from the target of 50 Ω.",
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
  it("leaves out lines whose class switches both rules off", () => {
    expect(
      checkImpedance([
        line(60, {
          limits: {
            "impedance-centring": { enabled: false, limit: 2, severity: "warning", origin: "class" },
            "impedance-yield": { enabled: false, limit: 95, severity: "warning", origin: "class" },
          },
        }),
      ]),
    ).toEqual([]);
  });
});

describe("impedance yield (common practice, no source)", () => {
  const of = (share: number) =>
    checkImpedance([line(50, { spread: { ...line(50).spread!, yield: share } })])[0]?.result.findings[1];
  it("passes above 98 %, is near down to 95 %, fails below", () => {
    expect(of(0.991)).toMatchObject({ rule: "impedance-yield", verdict: "pass" });
    expect(of(0.96)?.verdict).toBe("near");
    expect(of(0.9)?.verdict).toBe("fail");
  });
  it("says how far production spreads and what makes most of it", () => {
    expect(of(0.9)?.cause).toBe(
      "0.28 mm on L1 Top spreads from 45.2 Ω to 55.1 Ω in production; 90 % lies within ±10 % of 50 Ω. The width makes 61 % of the spread.",
    );
  });
  it("has no data without a spread, and then the line has none either", () => {
    const [entry] = checkImpedance([line(50, { spread: null })]);
    expect(entry?.result.verdict).toBe("no data");
  });
});
