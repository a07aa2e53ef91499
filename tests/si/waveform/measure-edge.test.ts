import { describe, expect, it } from "vitest";
import { DomainError, measureEdge, measureExcursion, type EdgeWindow } from "@/lib/si";

// Waveforms drawn by hand; every value follows from the definitions (computed).
const window: EdgeWindow = { edge: "rise", from: 0, to: 10, low: 0, high: 1, vil: 0.3, vih: 0.7, vmeas: 0.5 };
const time = Float64Array.of(0, 1, 2, 3, 4, 10);
const ringing = Float64Array.of(0, 1.5, 0.6, 1.2, 1, 1);

describe("a ringing rise", () => {
  const m = measureEdge(time, ringing, window);

  it("levels: 0.5 V above, 0.4 V dip, area of the two triangles", () => {
    expect(m.overshoot).toBeCloseTo(0.5, 12);
    expect(m.undershoot).toBeCloseTo(0.4, 12);
    // 0.5 · 0.5/1.5 / 2 + 0.5 · 0.5/0.9 / 2 + 0.2 · 0.2/0.6 / 2 + 0.2 · 1 / 2
    expect(m.overshootArea).toBeCloseTo(0.25 / 3 + 0.25 / 1.8 + 0.04 / 1.2 + 0.1, 12);
  });

  it("times: peak at 1, crossings on the first flank, last entry above VIH at 2.1667", () => {
    expect(m.peakTime).toBe(1);
    expect(m.firstCrossing).toBeCloseTo(1 / 3, 12);
    expect(m.lastCrossing).toBeCloseTo(1 / 3, 12);
    expect(m.vilCrossing).toBeCloseTo(0.2, 12);
    expect(m.vihCrossing).toBeCloseTo(0.7 / 1.5, 12);
    expect(m.farThresholdLast).toBeCloseTo(2 + 0.1 / 0.6, 12);
    expect(m.settling).toBeCloseTo(3.75, 12);
    expect(m.slew2080).toBeCloseTo(1.5, 12);
  });

  it("rings back to 0.6 V, 0.1 V below VIH", () => {
    expect(m.ringback).toEqual({ present: true, level: 0.6, margin: 0.6 - 0.7 });
    expect(m.nonMonotonic).toBeCloseTo(0.1, 12);
    expect(m.monotonic).toBe(false);
  });

  it("its mirror measured as a falling edge gives the same, thresholds keeping their names", () => {
    const fall = measureEdge(
      time,
      ringing.map((v) => 1 - v),
      { ...window, edge: "fall" },
    );
    expect(fall.overshoot).toBeCloseTo(m.overshoot, 12);
    expect(fall.undershoot).toBeCloseTo(m.undershoot, 12);
    expect(fall.vihCrossing).toBeCloseTo(m.vilCrossing!, 12);
    expect(fall.vilCrossing).toBeCloseTo(m.vihCrossing!, 12);
    expect(fall.ringback.margin).toBeCloseTo(m.ringback.margin!, 12);
    expect(fall.ringback.level).toBeCloseTo(0.4, 12);
  });

  it("an AC threshold beyond the peak has no ringback to look at", () => {
    expect(measureEdge(time, ringing, { ...window, vihAc: 1.6 }).ringback).toEqual({
      present: false,
      level: null,
      margin: null,
    });
  });
});

describe("reading rules", () => {
  it("the window starts with the value after a jump and ends with the value before one", () => {
    const t = Float64Array.of(0, 1, 1, 2, 2, 3);
    const v = Float64Array.of(0, 0, 1, 1, 5, 5);
    const m = measureEdge(t, v, { ...window, from: 1, to: 2 });
    expect(m.overshoot).toBe(0);
    expect(m.firstCrossing).toBe(0);
    expect(m.lastCrossing).toBeNull();
    expect(m.settling).toBe(0);
    expect(m.slew2080).toBeNull();
  });

  it("an edge that never arrives has no crossings and has not settled", () => {
    const m = measureEdge(Float64Array.of(0, 10), Float64Array.of(0, 0.2), window);
    expect([m.firstCrossing, m.vihCrossing, m.settling, m.farThresholdLast, m.ringFrequency]).toEqual([
      null,
      null,
      null,
      null,
      null,
    ]);
    expect(m.undershoot).toBe(0);
  });

  it("ringing of period 2 about the new level reads 0.5", () => {
    const t = Float64Array.from({ length: 401 }, (_, i) => i / 40);
    const v = t.map((x) => 1 - Math.exp(-0.2 * x) * Math.cos(Math.PI * x));
    expect(measureEdge(t, v, window).ringFrequency).toBeCloseTo(0.5, 3);
  });

  it("no swing and no window are errors that name the field", () => {
    expect(() => measureEdge(time, ringing, { ...window, high: 0 })).toThrow(DomainError);
    expect(() => measureEdge(time, ringing, { ...window, to: 0 })).toThrow(DomainError);
    expect(() => measureEdge(new Float64Array(0), new Float64Array(0), window)).toThrow(DomainError);
  });
});

describe("excursion beyond the rails", () => {
  it("reads height, area and longest time on both sides", () => {
    const beyond = measureExcursion(Float64Array.of(0, 1, 2, 4, 5), Float64Array.of(0, 2, 0, -1, 0), {
      high: 1,
      low: 0,
    });
    expect(beyond.above).toBe(1);
    expect(beyond.aboveArea).toBeCloseTo(0.5, 12);
    expect(beyond.aboveTime).toBeCloseTo(1, 12);
    expect(beyond.below).toBe(1);
    expect(beyond.belowArea).toBeCloseTo(1.5, 12);
    expect(beyond.belowTime).toBeCloseTo(3, 12);
  });

  it("is nothing inside them", () => {
    expect(measureExcursion(Float64Array.of(0, 1), Float64Array.of(0, 1), { high: 1, low: 0 })).toEqual({
      above: 0,
      below: 0,
      aboveArea: 0,
      belowArea: 0,
      aboveTime: 0,
      belowTime: 0,
    });
  });
});
