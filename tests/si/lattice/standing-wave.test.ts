import { describe, expect, it } from "vitest";
import {
  DomainError,
  nodeSpectrum,
  simulate,
  standingWave,
  UnsupportedError,
  type LineSection,
  type Network,
} from "@/lib/si";
import { referenceCases } from "../network/reference-case";
import { pointToPoint } from "./nets";

const GHZ = 1e9;
const T = 1e-9;

function sineNet(
  resistance: number,
  impedance: number,
  load: number | null,
  frequency = GHZ,
  delay = T,
): Network {
  const net = pointToPoint({ resistance, impedance, load, delay });
  net.drivers = [
    {
      name: "U1",
      kind: "thevenin",
      node: "a",
      resistance,
      wave: { kind: "sine", offset: 0, amplitude: 1, frequency, phase: 0, start: 0 },
    },
  ];
  return net;
}

interface Steady {
  length_wavelengths: number;
  r_source_ohm: number;
  diverges: boolean;
  magnitude: number[];
  phase_deg: number[];
}

describe("standing waves of the reference (closed-form phasors, tests/reference/network S cases)", () => {
  const cases = referenceCases("S").flatMap((entry) => {
    const rows = (entry.metrics as unknown as { phasor_steady_state: Steady[] }).phasor_steady_state;
    const load = (entry.circuit.parts[0] as unknown as { ohm: number }).ohm;
    return rows.map(
      (row) =>
        [`${entry.id}, ${row.length_wavelengths} wavelengths, ${row.r_source_ohm} Ω`, row, load] as const,
    );
  });

  it.each(cases)("%s: magnitude to 1e-9, phase to 1e-6 where there is a voltage", (_, row, load) => {
    const net = sineNet(row.r_source_ohm, 74, load, GHZ, row.length_wavelengths / GHZ);
    if (row.diverges) {
      expect(() => standingWave(net, GHZ)).toThrow(DomainError);
      return;
    }
    const points = standingWave(net, GHZ, { points: row.magnitude.length });
    expect(points).toHaveLength(row.magnitude.length);
    row.magnitude.forEach((magnitude, k) => {
      expect(Math.abs(points[k]!.magnitude - magnitude)).toBeLessThan(1e-9);
      if (magnitude < 1e-6) return;
      const turn = points[k]!.phase - (row.phase_deg[k]! * Math.PI) / 180;
      expect(Math.abs(Math.sin(turn / 2))).toBeLessThan(1e-6);
    });
  });
});

/** Largest magnitude on the line, for each length in wavelengths. */
const peak = (load: number | null, lengths: number[]) =>
  lengths.map((length) =>
    Math.max(
      ...standingWave(sineNet(1, 50, load, GHZ, length / GHZ), GHZ, { points: 257 }).map((p) => p.magnitude),
    ),
  );

describe("where it builds up and where round trips cancel (laws, 1 Ω source, 50 Ω line)", () => {
  it("a shorted end builds up to Z/R at half-wave multiples; at odd quarters the peak is the source's own, to 1e-9", () => {
    peak(0, [0.5, 1, 1.5]).forEach((value) => expect(value).toBeCloseTo(50, 6));
    peak(0, [0.25, 0.75, 1.25]).forEach((value) => expect(value).toBeCloseTo(1, 9));
  });

  it("an open end the other way round, to 1e-9", () => {
    peak(null, [0.25, 0.75, 1.25]).forEach((value) => expect(value).toBeCloseTo(50, 6));
    peak(null, [0.5, 1, 1.5]).forEach((value) => expect(value).toBeCloseTo(1, 9));
  });

  it("between them the peak lies between, and half-wave multiples are its maxima (shorted end)", () => {
    const lengths = Array.from({ length: 81 }, (_, k) => 0.1 + k / 100);
    const found = peak(0, lengths);
    const best = lengths[found.indexOf(Math.max(...found))]!;
    expect(best).toBeCloseTo(0.5, 9);
  });

  it("a matched end has the same magnitude everywhere and a phase of −2π a wavelength, to 1e-12", () => {
    for (const { magnitude, position, phase } of standingWave(sineNet(50, 50, 50), GHZ)) {
      expect(magnitude).toBeCloseTo(0.5, 12);
      expect(Math.sin((phase + 2 * Math.PI * position) / 2)).toBeCloseTo(0, 12);
    }
  });
});

describe("standing waves against the waveform once it is steady", () => {
  /** A tee with a coil, capacitors, a coupled pair and skin loss: amplitude over the last period. */
  const frequency = 0.7 * GHZ;
  const net = sineNet(30, 50, null, frequency, 0.4 * T);
  net.sections.push(
    { name: "T2", kind: "line", a: "b", b: "c", impedance: 70, delay: 0.3 * T, skin: 3e-6 },
    {
      name: "P",
      kind: "pair",
      a1: "b",
      a2: "d",
      b1: "e",
      b2: "f",
      even: { impedance: 60, delay: 0.5 * T },
      odd: { impedance: 45, delay: 0.4 * T },
    },
    { name: "R", kind: "rlc", a: "c", b: "g", l: 3e-7, c: 1.2e-10, r: 40, length: 0.05 },
  );
  net.parts.push(
    { name: "L1", kind: "L", a: "e", b: "h", value: 2e-9 },
    { name: "R1", kind: "R", a: "h", b: "0", value: 60 },
    { name: "R2", kind: "R", a: "d", b: "0", value: 50 },
    { name: "R3", kind: "R", a: "f", b: "0", value: 50 },
    { name: "R4", kind: "R", a: "g", b: "0", value: 80 },
    { name: "C1", kind: "C", a: "g", b: "0", value: 1e-12 },
    { name: "C2", kind: "C", a: "e", b: "f", value: 0.3e-12 },
  );
  net.probes = ["a", "b", "c", "d", "e", "f", "g", "h"].map((node) => ({ name: node, node }));
  const { probes } = nodeSpectrum(net, [frequency]);
  const until = 80 / frequency;
  const run = simulate(net, { until, accuracy: "reference" });
  const along = standingWave(net, frequency);

  it.each(net.probes.map(({ name }) => name))("%s to 0.2 % of the source", (name) => {
    let worst = 0;
    run.time.forEach((t, i) => {
      if (t < until - 2 / frequency || t > until) return;
      const { magnitude, phase } = probes[name]!;
      const wanted = magnitude[0]! * Math.sin(2 * Math.PI * frequency * t + phase[0]!);
      worst = Math.max(worst, Math.abs(run.voltage[name]![i]! - wanted));
    });
    expect(worst).toBeLessThan(2e-3);
  });

  it("the ends of each section are the nodes they join, to 1e-9", () => {
    const at = (section: string, conductor: string, position: number) =>
      along.find((p) => p.section === section && p.conductor === conductor && p.position === position)!
        .magnitude;
    for (const [section, conductor, a, b] of [
      ["T1", "first", "a", "b"],
      ["T2", "first", "b", "c"],
      ["P", "first", "b", "e"],
      ["P", "second", "d", "f"],
      ["R", "first", "c", "g"],
    ] as const) {
      expect(at(section, conductor, 0)).toBeCloseTo(probes[a]!.magnitude[0]!, 9);
      expect(at(section, conductor, 1)).toBeCloseTo(probes[b]!.magnitude[0]!, 9);
    }
  });
});

describe("spectrum over a sweep", () => {
  it("a low-pass of 50 Ω and 2 pF falls as 1/√(1 + (ωRC)²), to 1e-12 (exact)", () => {
    const net: Network = {
      rails: [],
      drivers: [
        {
          name: "U1",
          kind: "thevenin",
          node: "a",
          resistance: 50,
          wave: { kind: "pwl", time: [0, 1e-10], value: [0, 3.3] },
        },
      ],
      sections: [],
      parts: [{ name: "C", kind: "C", a: "a", b: "0", value: 2e-12 }],
      probes: [{ name: "v", node: "a" }],
    };
    const { frequency, probes } = nodeSpectrum(net, [1e7, 1e9, 1e10]);
    frequency.forEach((f, i) => {
      const x = 2 * Math.PI * f * 1e-10;
      expect(probes.v!.magnitude[i]).toBeCloseTo(1 / Math.sqrt(1 + x * x), 12);
      expect(probes.v!.phase[i]).toBeCloseTo(-Math.atan(x), 12);
    });
  });

  it("skin loss: a matched line passes exp(−A·√(πf)), to 1e-12 (exact)", () => {
    const net = sineNet(50, 50, 50);
    (net.sections[0] as LineSection).skin = 3e-6;
    const { frequency, probes } = nodeSpectrum(net, [1e8, 1e9, 5e9]);
    frequency.forEach((f, i) =>
      expect(probes.load!.magnitude[i]).toBeCloseTo(0.5 * Math.exp(-3e-6 * Math.sqrt(Math.PI * f)), 12),
    );
  });

  it("says infinite where a lossless resonance has no steady state, and goes on", () => {
    const { probes } = nodeSpectrum(sineNet(0, 50, null), [0.25 * GHZ, 0.3 * GHZ]);
    expect(probes.load!.magnitude[0]).toBe(Infinity);
    expect(Number.isFinite(probes.load!.magnitude[1])).toBe(true);
  });

  it("refuses no frequency and a diode, by name", () => {
    expect(() => standingWave(sineNet(50, 50, 50), 0)).toThrow(DomainError);
    const net = sineNet(50, 50, 50);
    net.parts.push({
      name: "D7",
      kind: "diode",
      a: "b",
      b: "0",
      saturationCurrent: 1e-12,
      emission: 1,
      thermalVoltage: 0.026,
      seriesResistance: 1,
    });
    expect(() => standingWave(net, GHZ)).toThrow(UnsupportedError);
    expect(() => standingWave(net, GHZ)).toThrow("D7");
  });
});
