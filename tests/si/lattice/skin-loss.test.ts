import { describe, expect, it } from "vitest";
import {
  bounceTable,
  simulate,
  UnsupportedError,
  wavesAlong,
  type LineSection,
  type Network,
} from "@/lib/si";
import { erfc, skinFilter, skinRamp } from "@/lib/si/lattice/skin-fit";
import { skinWorker } from "@/lib/si/lattice/skin-worker";
import { pointToPoint, readAt } from "./nets";

const PS = 1e-12;
const ROOT_PS = 1e-6;
const T = 1e-9;

function lossy(skin: number, resistance: number, load: number | null, ramp: number, farads = 0): Network {
  const net = pointToPoint({ resistance, load, delay: T, ramp });
  (net.sections[0] as LineSection).skin = skin;
  // So small that it changes nothing but the way of computing.
  if (farads > 0) net.parts.push({ name: "C", kind: "C", a: "b", b: "0", value: farads });
  return net;
}

/** Closed form: k-th arrival at the far end after 2k + 1 passes, each of them erfc(A/2√t) of that many times A. */
function arrivals(
  skin: number,
  resistance: number,
  load: number | null,
  ramp: number,
): (t: number) => number {
  const far = load === null ? 1 : (load - 50) / (load + 50);
  const near = (resistance - 50) / (resistance + 50);
  return (t) => {
    let sum = 0;
    let wave = (50 / (resistance + 50)) * (1 + far);
    for (let passes = 1; passes * T < t; passes += 2) {
      const since = t - passes * T;
      const a = passes * skin;
      sum +=
        wave *
        (ramp > 0
          ? (skinRamp(a, since) - skinRamp(a, since - ramp)) / ramp
          : erfc(a / (2 * Math.sqrt(since))));
      wave *= near * far;
    }
    return sum;
  };
}

function miss(
  net: Network,
  wanted: (t: number) => number,
  until: number,
  accuracy: "standard" | "reference",
) {
  const { time, voltage } = simulate(net, { until, accuracy });
  let worst = 0;
  for (let i = 1; i < time.length; i++)
    for (const share of [0.3, 0.6, 1]) {
      const t = time[i - 1]! + share * (time[i]! - time[i - 1]!);
      const v = voltage.load![i - 1]! + share * (voltage.load![i]! - voltage.load![i - 1]!);
      worst = Math.max(worst, Math.abs(v - wanted(t)));
    }
  return worst;
}

describe("erfc (values from a table of the error function, from memory)", () => {
  it.each([
    [0, 1],
    [0.5, 0.4795001221869535],
    [1, 0.15729920705028513],
    [2, 0.004677734981047266],
    [3, 2.209049699858544e-5],
    [5, 1.5374597944280349e-12],
  ])("erfc(%d) to 1e-13", (z, value) => expect(Math.abs(erfc(z) - value)).toBeLessThan(1e-13));
});

describe("the sum of exponentials for skin loss", () => {
  it.each([0.001, 0.1, 1, 30, 3000])(
    "follows erfc(1/(2√τ)) of a steady ramp's rate to 1e-4, at steps of %f of skin² (computed)",
    (step) => {
      const count = 2000;
      const filter = skinWorker(skinFilter(1, step, count * step));
      const samples = Float64Array.from({ length: count }, (_, n) => n * step);
      for (let n = 0; n < count; n += 250) filter(samples, n, n + 250);
      for (let n = 10; n < count - 1; n += 7) {
        const wanted = skinRamp(1, n * step) / (n * step);
        expect(Math.abs(samples[n]! / (n * step) - wanted)).toBeLessThan(1e-4);
      }
    },
  );
});

const skins = [0.03, 0.3, 3, 30].map((skin) => skin * ROOT_PS);

describe("waveforms with skin loss against the sum of erfc's (exact, computed)", () => {
  for (const resistance of [50, 10])
    for (const ramp of [0, 100 * PS, 500 * PS])
      it.each(skins)(
        `skin %f √s, ${resistance} Ω into an open end, ramp ${ramp} s: 0.1 % of the source, finest 0.02 %`,
        (skin) => {
          const net = lossy(skin, resistance, null, ramp);
          const wanted = arrivals(skin, resistance, null, ramp);
          expect(miss(net, wanted, 12.9 * T, "standard")).toBeLessThan(1e-3);
          expect(miss(net, wanted, 12.9 * T, "reference")).toBeLessThan(2e-4);
        },
      );
});

describe("on a grid (a capacitor of 1 aF forces it)", () => {
  it.each(skins)("skin %f √s, 10 Ω, open end: 0.2 % of the source, finest 0.07 %", (skin) => {
    const net = lossy(skin, 10, null, 200 * PS, 1e-18);
    const wanted = arrivals(skin, 10, null, 200 * PS);
    expect(miss(net, wanted, 20.3 * T, "standard")).toBeLessThan(2e-3);
    expect(miss(net, wanted, 20.3 * T, "reference")).toBeLessThan(7e-4);
  });

  it("a source that jumps, with a capacitor of 1 pF at the end: the same as a ramp of 0.2 ps, to 0.3 %", () => {
    const jump = simulate(lossy(3 * ROOT_PS, 40, 60, 0, 1e-12), { until: 3 * T });
    const ramp = simulate(lossy(3 * ROOT_PS, 40, 60, 0.2 * PS, 1e-12), { until: 3 * T, step: 0.1 * PS });
    for (let t = 0.01 * T; t < 3 * T; t += 0.0137 * T)
      expect(
        Math.abs(readAt(jump.time, jump.voltage.load!, t) - readAt(ramp.time, ramp.voltage.load!, t)),
      ).toBeLessThan(3e-3);
  });

  it("a branched net, one by one and on the grid, agree to 0.1 %", () => {
    const net = lossy(2 * ROOT_PS, 20, null, 200 * PS);
    net.sections.push(
      { name: "T2", kind: "line", a: "b", b: "c", impedance: 65, delay: 0.4 * T, skin: 1 * ROOT_PS },
      { name: "T3", kind: "line", a: "b", b: "d", impedance: 40, delay: 0.3 * T },
    );
    net.parts.push({ name: "R", kind: "R", a: "c", b: "0", value: 50 });
    const gridded = {
      ...net,
      parts: [...net.parts, { name: "C", kind: "C" as const, a: "d", b: "0", value: 1e-18 }],
    };
    const one = simulate(net, { until: 4 * T });
    const two = simulate(gridded, { until: 4 * T, accuracy: "reference" });
    for (let t = 0; t < 4 * T; t += 0.0173 * T)
      expect(
        Math.abs(readAt(one.time, one.voltage.load!, t) - readAt(two.time, two.voltage.load!, t)),
      ).toBeLessThan(1e-3);
  });
});

describe("laws of a line with skin loss", () => {
  it("rests at the DC divider and ends near the new one, its own resistance being nothing at DC", () => {
    const net = lossy(3 * ROOT_PS, 25, 75, 100 * PS);
    net.drivers[0] = {
      name: "U1",
      kind: "thevenin",
      node: "a",
      resistance: 25,
      wave: { kind: "pwl", time: [1 * T, 1.1 * T], value: [1, 3] },
    };
    for (const farads of [0, 1e-18]) {
      const whole =
        farads > 0
          ? {
              ...net,
              parts: [...net.parts, { name: "C", kind: "C" as const, a: "b", b: "0", value: farads }],
            }
          : net;
      const { voltage } = simulate(whole, { until: 2000 * T, accuracy: "live" });
      expect(voltage.load![0]).toBeCloseTo(0.75, 9);
      expect(voltage.load!.at(-1)).toBeGreaterThan(2.24);
      expect(voltage.load!.at(-1)).toBeLessThan(2.2501);
    }
  });

  it("a net that nothing else damps rings down (0 Ω into an open end): every swing below the one before", () => {
    for (const farads of [0, 1e-18]) {
      const { time, voltage } = simulate(lossy(3 * ROOT_PS, 0, null, 100 * PS, farads), { until: 61 * T });
      let before = Infinity;
      for (let k = 0; k < 15; k++) {
        let swing = 0;
        for (let i = 0; i < time.length; i++)
          if (time[i]! >= (4 * k + 1) * T && time[i]! < (4 * k + 5) * T)
            swing = Math.max(swing, Math.abs(voltage.load![i]! - 1));
        expect(swing).toBeLessThan(before);
        before = swing;
      }
    }
  });

  it("waves add up to the voltage at both ends, to 1e-12 (1e-6 at the marked top of a round peak)", () => {
    for (const farads of [0, 2e-12]) {
      const { time, voltage, waves } = simulate(lossy(3 * ROOT_PS, 20, 80, 100 * PS, farads), {
        until: 6 * T,
        waves: true,
      });
      const { a, b } = waves![0]!;
      time.forEach((_, i) => {
        expect(a.incident[i]! + a.outgoing[i]!).toBeCloseTo(voltage.source![i]!, farads > 0 ? 6 : 12);
        expect(b.incident[i]! + b.outgoing[i]!).toBeCloseTo(voltage.load![i]!, farads > 0 ? 6 : 12);
      });
      expect(wavesAlong(waves![0]!, time, 0, 3 * T).forward).toBeCloseTo(readAt(time, a.outgoing, 3 * T), 12);
    }
  });

  it("has no bounce table, and says which section is why", () => {
    expect(() => bounceTable(lossy(3 * ROOT_PS, 20, 80, 0), { until: 9 * T })).toThrow(UnsupportedError);
    expect(() => bounceTable(lossy(3 * ROOT_PS, 20, 80, 0), { until: 9 * T })).toThrow("T1");
  });
});
