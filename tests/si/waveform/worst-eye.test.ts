import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  bitWave,
  DomainError,
  patternEye,
  patternResponse,
  pseudoRandomBits,
  pulseResponse,
  simulate,
  worstEye,
  type Network,
  type Waveform,
} from "@/lib/si";
import { networkOf, referenceCases, type ReferenceCase } from "../network/reference-case";

const PS = 1e-12;

interface ReferenceEye {
  bit_time_ps: number;
  eye_height_V: number;
  eye_width_at_zero_ps: number;
  sample_phase_ps: number;
  worst_one_V: number;
  worst_zero_V: number;
  degenerate_100pct?: boolean;
  /** what the reference's own step response still moves by at its end */
  step_residual_at_end_V: number;
}

/** The case's network with nothing but its rising edge. */
function risingOnly(entry: ReferenceCase): Network | null {
  const net = networkOf(entry);
  const moving = net.drivers.filter(
    (driver) => driver.kind === "thevenin" && driver.wave.kind === "pwl" && driver.wave.time.length > 1,
  );
  for (const driver of moving) {
    if (driver.kind !== "thevenin" || driver.wave.kind !== "pwl") continue;
    const { time, value } = driver.wave;
    const rise = time.findIndex((_, i) => i > 0 && value[i] !== value[i - 1]);
    if (rise < 1 || value[rise]! < value[rise - 1]!) return null;
    driver.wave = { kind: "pwl", time: time.slice(0, rise + 1), value: value.slice(0, rise + 1) };
  }
  return net;
}

/** Source: tests/reference/network, README §3 "eyes": step response of 60 ns, grid of a 64th of a bit. */
const eyes = [...referenceCases("A"), ...referenceCases("B")].flatMap((entry) =>
  Object.entries(entry.metrics).flatMap(([probe, metrics]) => {
    const list = (metrics as { eyes?: ReferenceEye[] }).eyes ?? [];
    const scored = list.filter((eye) => !eye.degenerate_100pct);
    return scored.length > 0 ? [[`${entry.id} ${probe}`, entry, probe, scored] as const] : [];
  }),
);

describe("worst eye against the reference: height to 0.5 % of the swing, width to 1 % of a bit, and what its record cuts off", () => {
  it.each(eyes)("%s", (name, entry, probe, list) => {
    const net = risingOnly(entry);
    expect(net, name).not.toBeNull();
    const { time, voltage } = simulate(net!, { until: entry.id.startsWith("B43") ? 30e-9 : 60e-9 });
    const swing = Math.max(...entry.circuit.drivers.flatMap((d) => d.wave.v));
    for (const eye of list) {
      const bit = eye.bit_time_ps * PS;
      const found = worstEye(pulseResponse({ time, voltage: voltage[probe]! }, bit), bit);
      const cut = 2 * Math.abs(eye.step_residual_at_end_V);
      expect(Math.abs(found.height - eye.eye_height_V), `${eye.bit_time_ps} ps`).toBeLessThan(
        5e-3 * swing + cut,
      );
      if (eye.eye_height_V > 0.01 * swing)
        expect(Math.abs(found.width / PS - eye.eye_width_at_zero_ps)).toBeLessThan(
          (0.01 + cut / eye.eye_height_V) * eye.bit_time_ps,
        );
    }
  });
});

describe("worst eye by trying every pattern", () => {
  it("is the worst of all 2ⁿ patterns of a short answer, at the cursor, to 1e-12 (brute force)", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -0.5, max: 0.5, noNaN: true }), { minLength: 1, maxLength: 9 }),
        fc.nat(8),
        (rest, at) => {
          const p = [...rest];
          const cursor = at % (p.length + 1);
          p.splice(cursor, 0, 1);
          // One sample a bit is what the cursor sees; two are asked for, the second of them always nothing.
          const voltage = Float64Array.from([0, 0, ...p.flatMap((v) => [v, 0])]);
          const time = Float64Array.from(voltage, (_, i) => i / 2);
          const found = worstEye({ time, voltage }, 1, { samples: 2 });
          let lowestOne = Infinity;
          let highestZero = -Infinity;
          for (let code = 0; code < 2 ** p.length; code++) {
            let v = 0;
            p.forEach((part, k) => (v += (code >> k) & 1 ? part : 0));
            if ((code >> cursor) & 1) lowestOne = Math.min(lowestOne, v);
            else highestZero = Math.max(highestZero, v);
          }
          expect(found.heights[2 + 2 * cursor]!).toBeCloseTo(lowestOne - highestZero, 12);
          // A closed eye is best looked at where nothing ever comes.
          if (lowestOne <= highestZero) return;
          expect(found.height).toBeCloseTo(lowestOne - highestZero, 12);
          expect(found.lowestOne).toBeCloseTo(lowestOne, 12);
          expect(found.highestZero).toBeCloseTo(highestZero, 12);
        },
      ),
      { numRuns: 60, seed: 7 },
    );
  });

  const net: Network = {
    rails: [],
    drivers: [
      {
        name: "U1",
        kind: "thevenin",
        node: "a",
        resistance: 20,
        wave: { kind: "pwl", time: [0, 150 * PS], value: [0, 1] },
      },
    ],
    sections: [{ name: "T1", kind: "line", a: "a", b: "b", impedance: 50, delay: 430 * PS }],
    parts: [{ name: "C", kind: "C", a: "b", b: "0", value: 2e-12 }],
    probes: [{ name: "rx", node: "b" }],
  };
  const bit = 800 * PS;
  const { time, voltage } = simulate(net, { until: 20e-9 });
  const pulse = pulseResponse({ time, voltage: voltage.rx! }, bit);
  const worst = worstEye(pulse, bit);

  it("no pattern of pseudo-random bits is worse, and its worst bits reach the lowest one, to 1e-9 (law)", () => {
    for (const order of [7, 9] as const) {
      const eye = patternEye(patternResponse(pulse, pseudoRandomBits(order), bit), bit);
      expect(eye.height).toBeGreaterThan(worst.height - 1e-9);
      expect(eye.height).toBeLessThan(1);
    }
    const sent = patternResponse(pulse, [...worst.worstBits, ...Array.from({ length: 40 }, () => 0)], bit);
    const at = worst.at + (worst.worstBits.length - 1) * bit;
    const n = Math.round(at / worst.step);
    expect(sent.voltage[n]!).toBeCloseTo(worst.lowestOne, 9);
  });

  it("superposition of single bits is the simulation of the whole pattern, to 0.2 %", () => {
    const bits = pseudoRandomBits(7);
    const wave = bitWave([...bits, ...bits.slice(0, 40)], bit, { low: 0, high: 1, rise: 150 * PS });
    const whole = simulate(
      { ...net, drivers: [{ ...net.drivers[0]!, kind: "thevenin", resistance: 20, wave }] },
      { until: 160 * bit },
    );
    const added = patternResponse(pulse, bits, bit);
    const last = added.time[added.time.length - 1]!;
    let i = 0;
    whole.time.forEach((t, k) => {
      // Steady once the answer to the first bits has died out.
      if (t < 130 * bit || t - last < 0) return;
      const at = t - last;
      while (i + 1 < added.time.length && added.time[i + 1]! <= at) i++;
      const share = (at - added.time[i]!) / worst.step;
      const v = added.voltage[i]! + share * ((added.voltage[i + 1] ?? 0) - added.voltage[i]!);
      expect(Math.abs(v - whole.voltage.rx![k]!)).toBeLessThan(4e-3);
    });
  });

  it("the eye of the same pattern is the same with the bits told and without, where it is open", () => {
    const bits = pseudoRandomBits(7);
    const response = patternResponse(pulse, bits, bit);
    const without = patternEye(response, bit);
    const told = patternEye(response, bit, { bits });
    expect(told.height).toBe(without.height);
    expect(told.width + told.jitter.peakToPeak).toBeCloseTo(bit, 15);
    expect(told.ones.filter(Boolean)).toHaveLength(without.ones.filter(Boolean).length);
  });
});

describe("eyes of known shape (exact, computed)", () => {
  const trapezoid = (rise: number): Waveform => ({
    time: Float64Array.of(0, rise, 1, 1 + rise, 6),
    voltage: Float64Array.of(0, 1, 1, 0, 0),
  });

  it("a clean trapezoid: full height, width of the bit, no jitter", () => {
    const eye = worstEye(trapezoid(0.25), 1);
    expect(eye.height).toBeCloseTo(1, 12);
    expect(eye.width).toBeCloseTo(1, 9);
    const folded = patternEye(patternResponse(trapezoid(0.25), pseudoRandomBits(7), 1), 1);
    expect(folded.height).toBeCloseTo(1, 12);
    expect(folded.width).toBeCloseTo(1, 12);
    expect(folded.jitter.peakToPeak).toBeCloseTo(0, 12);
    expect(folded.jitter.rms).toBeCloseTo(0, 9);
    expect(folded.crossing).toBeCloseTo(0.125, 12);
  });

  it("crossings early and late by 0.05 of a bit: peak to peak 0.1, deviation 0.05, width 0.9", () => {
    const time: number[] = [];
    const voltage: number[] = [];
    for (let k = 1; k <= 40; k++) {
      const shift = k % 4 < 2 ? -0.05 : 0.05;
      time.push(k + shift - 0.1, k + shift + 0.1);
      voltage.push(k % 2 ? 0 : 1, k % 2 ? 1 : 0);
    }
    const eye = patternEye({ time: Float64Array.from(time), voltage: Float64Array.from(voltage) }, 1, {
      from: 0.5,
    });
    expect(eye.jitter.peakToPeak).toBeCloseTo(0.1, 9);
    expect(eye.jitter.rms).toBeCloseTo(0.05, 3);
    expect(eye.width).toBeCloseTo(0.9, 9);
    expect(eye.height).toBeCloseTo(1, 9);
  });

  it("a path that inverts has the same eye upside down", () => {
    const { time, voltage } = trapezoid(0.3);
    const eye = worstEye({ time, voltage: voltage.map((v) => 2 - v) }, 1);
    expect(eye.height).toBeCloseTo(1, 12);
    expect(eye.lowestOne).toBeCloseTo(1, 12);
    expect(eye.highestZero).toBeCloseTo(2, 12);
  });

  it("refuses a record shorter than a bit and a pulse of nothing", () => {
    expect(() => worstEye({ time: Float64Array.of(0, 0.5), voltage: Float64Array.of(0, 1) }, 1)).toThrow(
      DomainError,
    );
    expect(() => worstEye({ time: Float64Array.of(0, 5), voltage: Float64Array.of(1, 1) }, 1)).toThrow(
      DomainError,
    );
  });
});

describe("pseudo-random bits (law)", () => {
  it.each([7, 9, 15] as const)("order %d: every run of that many bits but all zeros, once", (order) => {
    const bits = pseudoRandomBits(order);
    expect(bits).toHaveLength(2 ** order - 1);
    const seen = new Set<number>();
    for (let k = 0; k < bits.length; k++) {
      let word = 0;
      for (let j = 0; j < order; j++) word = (word << 1) | bits[(k + j) % bits.length]!;
      seen.add(word);
    }
    expect(seen.size).toBe(bits.length);
    expect(seen.has(0)).toBe(false);
  });
});
