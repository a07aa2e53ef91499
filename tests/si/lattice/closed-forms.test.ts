import { describe, expect, it } from "vitest";
import { simulate, type Network } from "@/lib/si";
import { referenceCases } from "../network/reference-case";
import { edge, pointToPoint, readAt } from "./nets";

/** Largest difference from a formula over [from, to], closer than `hole` to `around` left out. */
function miss(
  time: Float64Array,
  value: Float64Array,
  wanted: (t: number) => number,
  from: number,
  to: number,
  around = NaN,
  hole = 0,
): number {
  let worst = 0;
  for (let t = from; t < to; t += (to - from) / 3001)
    if (!(Math.abs(t - around) < hole)) worst = Math.max(worst, Math.abs(readAt(time, value, t) - wanted(t)));
  return worst;
}

describe("a step into a matched 50 Ω line with 2 pF at its end (exact: 1 − exp(−t/ZC), computed)", () => {
  const net = pointToPoint({ resistance: 50, load: null, delay: 1e-9 });
  net.parts.push({ name: "C", kind: "C", a: "b", b: "0", value: 2e-12 });
  const { time, voltage } = simulate(net, { until: 5e-9 });
  const rise = (t: number) => (t > 1e-9 ? 1 - Math.exp(-(t - 1e-9) / 1e-10) : 0);

  it("charges the capacitor to 0.05 %", () =>
    expect(miss(time, voltage.load!, rise, 0, 5e-9)).toBeLessThan(5e-4));

  it("sends back −1 at first, then +1, to 0.05 % away from the jump", () => {
    const echo = (t: number) => 0.5 + (t > 2e-9 ? rise(t - 1e-9) - 0.5 : 0);
    expect(miss(time, voltage.source!, echo, 1e-12, 5e-9, 2e-9, 1.5e-11)).toBeLessThan(5e-4);
  });
});

describe("a coil in series with the load", () => {
  it("5 nH into 50 Ω: 1 − exp(−t·2Z/L)/… to 0.05 % (exact, computed)", () => {
    const net = pointToPoint({ resistance: 50, load: null, delay: 1e-9 });
    net.parts.push(
      { name: "L", kind: "L", a: "b", b: "c", value: 5e-9 },
      { name: "R", kind: "R", a: "c", b: "0", value: 50 },
    );
    net.probes.push({ name: "end", node: "c" });
    const { time, voltage } = simulate(net, { until: 4e-9 });
    const tau = 5e-9 / 100;
    expect(
      miss(time, voltage.end!, (t) => (t > 1e-9 ? 0.5 * (1 - Math.exp(-(t - 1e-9) / tau)) : 0), 0, 4e-9),
    ).toBeLessThan(5e-4);
  });
});

describe("a capacitor straight from an ideal source into a matched line", () => {
  it("passes the jump whole and decays with ZC, to 0.01 % (exact, computed)", () => {
    const net = pointToPoint({ resistance: 0, load: 50, delay: 1e-9 });
    net.drivers[0]!.node = "pin";
    net.parts.push({ name: "C", kind: "C", a: "pin", b: "a", value: 4e-12 });
    const { time, voltage } = simulate(net, { until: 4e-9 });
    expect(miss(time, voltage.load!, (t) => Math.exp(-(t - 1e-9) / 2e-10), 1.01e-9, 4e-9)).toBeLessThan(1e-4);
  });
});

describe("no line at all", () => {
  it("a ramp into RC follows t − τ + τ·exp(−t/τ), to 0.05 % (exact, computed)", () => {
    const net: Network = {
      rails: [],
      drivers: [{ name: "U1", kind: "thevenin", node: "a", resistance: 100, wave: edge(1, 1e-9) }],
      sections: [],
      parts: [{ name: "C", kind: "C", a: "a", b: "0", value: 2e-12 }],
      probes: [{ name: "v", node: "a" }],
    };
    const { time, voltage } = simulate(net, { until: 1e-9 });
    const tau = 2e-10;
    expect(miss(time, voltage.v!, (t) => (t - tau + tau * Math.exp(-t / tau)) / 1e-9, 0, 1e-9)).toBeLessThan(
      5e-4,
    );
  });
});

describe("nothing but capacitors at a node", () => {
  it("divides as 1/C, to 1e-9 (law)", () => {
    const net: Network = {
      rails: [],
      drivers: [{ name: "U1", kind: "thevenin", node: "a", resistance: 0, wave: edge(1, 1e-9) }],
      sections: [],
      parts: [
        { name: "C1", kind: "C", a: "a", b: "m", value: 1e-12 },
        { name: "C2", kind: "C", a: "m", b: "0", value: 3e-12 },
      ],
      probes: [{ name: "m", node: "m" }],
    };
    const { voltage } = simulate(net, { until: 3e-9 });
    expect(voltage.m!.at(-1)).toBeCloseTo(0.25, 9);
  });
});

interface Startup {
  length_wavelengths: number;
  r_source_ohm: number;
  freq_GHz: number;
  td_ps: number;
  sample_ps: number;
  v: Record<string, number[]> | null;
}

describe("sine start-up, to 0.1 % of the source's peak to peak (exact lattice sums, tests/reference/network S cases)", () => {
  const cases = referenceCases("S").flatMap((entry) => {
    const { startup } = entry.waveforms as unknown as { startup: Startup[] };
    const load = (entry.circuit.parts[0] as unknown as { ohm: number }).ohm;
    return startup
      .filter((run) => run.v !== null)
      .map(
        (run) =>
          [`${entry.id}, ${run.length_wavelengths} wavelengths, ${run.r_source_ohm} Ω`, run, load] as const,
      );
  });

  it.each(cases)("%s", (_, run, load) => {
    const net = pointToPoint({ resistance: run.r_source_ohm, impedance: 74, load, delay: run.td_ps * 1e-12 });
    net.drivers[0] = {
      name: "U1",
      kind: "thevenin",
      node: "a",
      resistance: run.r_source_ohm,
      wave: { kind: "sine", offset: 0, amplitude: 1, frequency: run.freq_GHz * 1e9, phase: 0, start: 0 },
    };
    const wanted = run.v!.source_end!;
    const { time, voltage } = simulate(net, { until: wanted.length * run.sample_ps * 1e-12 });
    for (const [probe, series] of [
      ["source", wanted],
      ["load", run.v!.load_end!],
    ] as const)
      series.forEach((value, k) =>
        expect(Math.abs(readAt(time, voltage[probe]!, k * run.sample_ps * 1e-12) - value)).toBeLessThan(2e-3),
      );
  });
});
