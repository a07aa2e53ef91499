import fc from "fast-check";
import { expect, it } from "vitest";
import { newReading, readEdge } from "@/lib/si/rules/read-edge";
import { measureEdge } from "@/lib/si/waveform";

/** Random polylines from 0 to a settled 1 V, as a lattice gives them. */
const wave = fc
  .array(
    fc.record({
      dt: fc.double({ min: 0.01, max: 1, noNaN: true }),
      v: fc.double({ min: -0.5, max: 1.8, noNaN: true }),
    }),
    { minLength: 2, maxLength: 30 },
  )
  .map((points) => {
    const time = [0];
    const voltage = [0];
    for (const { dt, v } of points) {
      time.push((time.at(-1) ?? 0) + dt);
      voltage.push(v);
    }
    return { time: Float64Array.from(time), voltage: Float64Array.from(voltage) };
  });
const orNull = (value: number) => (Number.isNaN(value) ? null : value);

function expectNear(a: number | null, b: number | null) {
  if (a === null || b === null) expect(a).toBe(b);
  else expect(a).toBeCloseTo(b, 9);
}

it("one pass reads what measureEdge measures, on both edges, to 1e-9", () => {
  fc.assert(
    fc.property(wave, fc.double({ min: 0.3, max: 1, noNaN: true }), ({ time, voltage }, share) => {
      const until = share * (time.at(-1) ?? 1);
      const [vil, vih, vmeas] = [0.24, 0.61, 0.47];
      const rise = measureEdge(time, voltage, {
        edge: "rise",
        from: 0,
        to: until,
        low: 0,
        high: 1,
        vil,
        vih,
        vmeas,
        settleBand: 0.1,
      });
      const into = newReading();
      readEdge(time, voltage, until, { low: 0, high: 1, near: vil, meas: vmeas, far: vih }, into);
      expectNear(Math.max(0, into.max - 1), rise.overshoot);
      expectNear(orNull(into.nearCrossing), rise.vilCrossing);
      expectNear(orNull(into.measCrossing), rise.firstCrossing);
      expectNear(orNull(into.settled), rise.settling);
      expectNear(orNull(into.dipLevel), rise.ringback.level);

      const mirrored = voltage.map((v) => 1 - v);
      const fall = measureEdge(time, mirrored, {
        edge: "fall",
        from: 0,
        to: until,
        low: 0,
        high: 1,
        vil,
        vih,
        vmeas,
        settleBand: 0.1,
      });
      readEdge(time, voltage, until, { low: 0, high: 1, near: 1 - vih, meas: 1 - vmeas, far: 1 - vil }, into);
      expectNear(orNull(into.nearCrossing), fall.vihCrossing);
      expectNear(orNull(into.settled), fall.settling);
      expectNear(Number.isNaN(into.dipLevel) ? null : 1 - into.dipLevel, fall.ringback.level);
    }),
    { numRuns: 500, seed: 11 },
  );
});
