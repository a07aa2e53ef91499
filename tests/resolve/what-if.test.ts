import { describe, expect, it } from "vitest";
import { applyWhatIf, NEW_END, NEW_SERIES, NO_CHANGE, whatIfStart } from "@/lib/resolve/what-if";
import { checkPath } from "@/lib/si/rules/check-path";
import { allCorners } from "@/lib/si/rules/corners";
import { driverModel, pointToPoint, section } from "../support/resolved-path";

const ns = 1e-9;
const path = pointToPoint(driverModel(20, 0.5 * ns), 50, 1.3 * ns);
const corners = [...allCorners];
const above = (of: typeof path) =>
  checkPath(of, { corners }).findings.find((finding) => finding.rule === "above-rail")?.value;

describe("changes on trial", () => {
  it("leave the path as it is when none is made", () => {
    expect(applyWhatIf(path, "U1.1", NO_CHANGE)).toBe(path);
  });

  it("put a series resistor in that, with the driver, matches the line: no peak (law: ρ = 0), to 1e-9 V", () => {
    const changed = applyWhatIf(path, "U1.1", { ...NO_CHANGE, seriesOhms: 30 });
    expect(changed.parts.map((part) => part.reference)).toEqual([NEW_SERIES]);
    expect(above(changed)).toBeCloseTo(0, 9);
    expect(path.parts).toEqual([]);
  });

  it("change the series resistor that is there instead of adding another", () => {
    const fitted = {
      ...path,
      sections: [section("R1.2", "U2.1", 50, 1.3 * ns)],
      parts: [{ reference: "R1", kind: "R", a: "U1.1", b: "R1.2", value: 10, role: "series" } as const],
    };
    expect(whatIfStart(fitted, "U1.1")).toMatchObject({ seriesOhms: 10, seriesReference: "R1" });
    const changed = applyWhatIf(fitted, "U1.1", { ...NO_CHANGE, seriesOhms: 30 });
    expect(changed.parts).toMatchObject([{ reference: "R1", value: 30 }]);
    expect(above(changed)).toBeCloseTo(0, 9);
  });

  it("end the line with its own impedance: no reflection, so no peak, to 1e-9 V", () => {
    const changed = applyWhatIf(path, "U1.1", { ...NO_CHANGE, endOhms: 50, endTo: "half" });
    expect(changed.parts).toMatchObject([{ reference: NEW_END, a: "U2.1", role: "termination" }]);
    expect(changed.rails).toMatchObject([{ volts: 1.65 }]);
    // divided between 20 Ω and 50 Ω to half the supply
    expect(above(changed)).toBeCloseTo(1.65 + (1.65 * 50) / 70 - 3.3, 9);
  });

  it("keep the ratio of the corners when the typical value moves", () => {
    const spread = driverModel(20, 0.5 * ns, { resistance: { slow: 30, typical: 20, fast: 14 } });
    const changed = applyWhatIf(pointToPoint(spread, 50, 1 * ns), "U1.1", { ...NO_CHANGE, driverOhms: 40 });
    expect(changed.drivers[0]?.driver?.resistance).toEqual({ slow: 60, typical: 40, fast: 28 });
  });

  it("scale length and impedance of every section", () => {
    const changed = applyWhatIf(path, "U1.1", { ...NO_CHANGE, lengthScale: 0.5, impedance: 60 });
    expect(changed.sections[0]?.length).toBeCloseTo((path.sections[0]?.length ?? NaN) / 2, 12);
    expect(changed.sections[0]?.impedance?.nominal).toBeCloseTo(60, 12);
  });
});
