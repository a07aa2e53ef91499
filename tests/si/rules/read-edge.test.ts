import { describe, expect, it } from "vitest";
import { newReading, readEdge } from "@/lib/si/rules/read-edge";

/** 0 → 1 V by 1 ns, over to 1.3 at 2 ns, back to 0.85 at 3 ns, 1 from 4 ns. */
const time = Float64Array.of(0, 1, 2, 3, 4, 10);
const voltage = Float64Array.of(0, 1, 1.3, 0.85, 1, 1);
const levels = { low: 0, high: 1, near: 0.2, meas: 0.5, far: 0.8 };

function read(until: number, over: Partial<typeof levels> = {}, v = voltage) {
  const into = newReading();
  readEdge(time, v, until, { ...levels, ...over }, into);
  return into;
}

describe("one pass over a rising wave (values by hand)", () => {
  it("finds extremes, crossings, settling and the dip", () => {
    const seen = read(10);
    expect(seen).toMatchObject({ max: 1.3, maxTime: 2, min: 0, minTime: 0, dipLevel: 0.85, dipTime: 3 });
    expect(seen.nearCrossing).toBeCloseTo(0.2, 12);
    expect(seen.measCrossing).toBeCloseTo(0.5, 12);
    // last outside ± 0.1: 0.9 on the way up from 0.85 at 3 to 1 at 4
    expect(seen.settled).toBeCloseTo(3 + 1 / 3, 12);
  });
  it("cuts at the window's end between samples", () => {
    const seen = read(2.5);
    expect(seen.dipLevel).toBeCloseTo(1.075, 12);
    expect(seen.settled).toBeCloseTo(2 + 0.2 / 0.45, 12);
    expect(read(1.5).settled).toBeNaN();
  });
  it("says never where a level is not reached", () => {
    const low = read(
      10,
      {},
      voltage.map((v) => 0.15 * v),
    );
    expect(low.nearCrossing).toBeNaN();
    expect(low.dipLevel).toBeNaN();
    expect(low.settled).toBeNaN();
  });
  it("takes the last level for the dip where nothing drops", () => {
    expect(read(10, {}, Float64Array.of(0, 0.9, 0.95, 0.97, 1, 1)).dipLevel).toBe(1);
  });
  it("reads a jump as a step", () => {
    const into = newReading();
    readEdge(Float64Array.of(0, 1, 1, 5), Float64Array.of(0, 0, 1, 1), 5, levels, into);
    expect(into.measCrossing).toBe(1);
    expect(into.settled).toBe(1);
  });
});
