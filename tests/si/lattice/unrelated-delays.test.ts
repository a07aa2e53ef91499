import { describe, expect, it } from "vitest";
import { simulate, type Network, type Section } from "@/lib/si";
import { edge, readAt } from "./nets";

const PS = 1e-12;

/** Delays with no common measure: a tee whose arms are 211.37, 89.31 and 154.93 ps. */
function tee(farads: number, shift = 0): Network {
  const line = (name: string, a: string, b: string, impedance: number, delay: number): Section => ({
    name,
    kind: "line",
    a,
    b,
    impedance,
    delay: (delay + shift) * PS,
  });
  return {
    rails: [],
    drivers: [{ name: "U1", kind: "thevenin", node: "n", resistance: 20, wave: edge(1, 150 * PS) }],
    sections: [
      line("t", "n", "j", 50, 211.37),
      line("u", "j", "e", 65, 89.31 * Math.SQRT1_2),
      line("w", "j", "f", 40, 154.93),
    ],
    parts:
      farads > 0
        ? ["e", "f"].map((node) => ({ name: `C${node}`, kind: "C" as const, a: node, b: "0", value: farads }))
        : [],
    probes: ["n", "j", "e", "f"].map((node) => ({ name: node, node })),
  };
}

function difference(
  net: Network,
  other: Network,
  options: { step?: number; accuracy?: "reference" },
): number {
  const until = 5e-9;
  const one = simulate(net, { until });
  const two = simulate(other, { until, ...options });
  let worst = 0;
  for (const { name } of net.probes)
    for (let t = 0; t < until; t += 1.7 * PS)
      worst = Math.max(
        worst,
        Math.abs(readAt(one.time, one.voltage[name]!, t) - readAt(two.time, two.voltage[name]!, t)),
      );
  return worst;
}

describe("delays without a common measure", () => {
  it("with capacitors: within 0.2 % of the same with steps ten times finer (computed)", () => {
    expect(difference(tee(2e-12), tee(2e-12), { step: 0.2 * PS, accuracy: "reference" })).toBeLessThan(2e-3);
  });

  it("resistive: the echoes one by one and the fine grid agree to 0.05 % (a capacitor of 1 aF forces the grid)", () => {
    expect(difference(tee(0), tee(1e-18), { step: 0.2 * PS, accuracy: "reference" })).toBeLessThan(5e-4);
  });
});

describe("a line far shorter than the edge", () => {
  it.each([0.02, 0.3, 0.55])(
    "of %d ps is lumped and stays within 0.2 % of the same in fine steps",
    (delay) => {
      const net = tee(2e-12);
      net.sections.push({ name: "via", kind: "line", a: "e", b: "g", impedance: 30, delay: delay * PS });
      net.parts.push({ name: "Cg", kind: "C", a: "g", b: "0", value: 1e-12 });
      // Asking for the waves keeps every section a line.
      const fine = { ...net };
      const until = 3e-9;
      const one = simulate(net, { until });
      const two = simulate(fine, {
        until,
        accuracy: "reference",
        step: Math.max(0.05, delay / 2) * PS,
        waves: delay > 0.1,
      });
      for (const { name } of net.probes)
        for (let t = 0; t < until; t += 3.3 * PS)
          expect(
            Math.abs(readAt(one.time, one.voltage[name]!, t) - readAt(two.time, two.voltage[name]!, t)),
          ).toBeLessThan(2e-3);
    },
  );
});
