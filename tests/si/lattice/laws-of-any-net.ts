import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { nodeSpectrum, simulate, type Network, type Pwl, type Simulation } from "@/lib/si";
import { anyNets, netOf, type Kinds } from "./any-net";
import { edge, readAt } from "./nets";

const PS = 1e-12;
const linear: Kinds = { capacitors: true, coils: true, pairs: true, skin: true, lossy: true, rings: true };
const all: Kinds = { ...linear, clamps: true };

function worst(
  one: Simulation,
  two: Simulation,
  until: number,
  at: (t: number) => number = (t) => t,
): number {
  let miss = 0;
  for (const name of Object.keys(one.voltage))
    for (let k = 1; k < 120; k++) {
      const t = (k * until) / 120.37;
      miss = Math.max(
        miss,
        Math.abs(readAt(one.time, one.voltage[name]!, t) - readAt(two.time, two.voltage[name]!, at(t))),
      );
    }
  return miss;
}

/** The laws that every net keeps, each over `runs` nets drawn by lot; CI runs a slice of what the long campaign does. */
export function lawsOfAnyNet(runs: number, seed: number): void {
  const settings = (share = 1) => ({ numRuns: Math.max(4, Math.round(runs * share)), seed });
  const UNTIL = 3e-9;

  describe(`laws of any net of lines, pairs, loss, coils and rings (${runs} by lot)`, () => {
    it("superposition: the answer to a sum of sources is the sum of the answers, to 0.3 % of both", () => {
      fc.assert(
        fc.property(anyNets(5, linear), (net) => {
          const waves: Pwl[] = [
            edge(1, 200 * PS),
            edge(-0.4, 300 * PS, 700 * PS),
            { kind: "pwl", time: [0, 200 * PS, 700 * PS, 1000 * PS], value: [0, 1, 1, 0.6] },
          ];
          const [one, two, both] = waves.map((wave) => simulate(netOf(net, { wave }), { until: UNTIL }));
          for (const name of Object.keys(both!.voltage))
            for (let t = 0; t < UNTIL; t += 37 * PS) {
              const read = ({ time, voltage }: Simulation) => readAt(time, voltage[name]!, t);
              expect(Math.abs(read(one!) + read(two!) - read(both!))).toBeLessThan(1.4 * 3e-3);
            }
        }),
        settings(),
      );
    });

    it("a later source gives the same later, to 0.2 % (a grid from another start)", () => {
      fc.assert(
        fc.property(anyNets(5, linear), fc.integer({ min: 1, max: 900 }), (net, late) => {
          const now = simulate(netOf(net), { until: UNTIL });
          const later = simulate(netOf(net, { wave: edge(1, net.ramp * PS, late * PS) }), {
            until: UNTIL + late * PS,
          });
          expect(worst(now, later, UNTIL, (t) => t + late * PS)).toBeLessThan(2e-3);
        }),
        settings(),
      );
    });

    it("impedances times k leave voltages alone, times times k stretch them, to 1e-4", () => {
      fc.assert(
        fc.property(anyNets(5, linear), fc.constantFrom(0.5, 2, 4), (net, k) => {
          const plain = simulate(netOf(net), { until: UNTIL });
          expect(worst(plain, simulate(netOf(net, { ohms: k }), { until: UNTIL }), UNTIL)).toBeLessThan(1e-4);
          const slow = simulate(netOf(net, { time: k }), { until: UNTIL * k });
          expect(worst(plain, slow, UNTIL, (t) => t * k)).toBeLessThan(1e-4);
        }),
        settings(0.6),
      );
    });

    it("energy: what a source has put in is never less than nothing, and never more comes out (passive)", () => {
      fc.assert(
        fc.property(anyNets(6, linear), (net) => {
          const wave: Pwl = { kind: "pwl", time: [0, 150 * PS, 400 * PS, 550 * PS], value: [0, 1, 1, 0] };
          const { time, voltage } = simulate(netOf(net, { wave }), { until: 3 * UNTIL });
          const source = (t: number) =>
            t < 150 * PS ? t / (150 * PS) : t < 400 * PS ? 1 : Math.max(0, (550 * PS - t) / (150 * PS));
          const v = voltage.n0!;
          let energy = 0;
          let most = 0;
          for (let i = 1; i < time.length; i++) {
            const power = (k: number) => (v[k]! * (source(time[k]!) - v[k]!)) / net.resistance;
            energy += ((power(i) + power(i - 1)) / 2) * (time[i]! - time[i - 1]!);
            most = Math.max(most, energy);
            // From rest the net can only give back what it was given.
            if (!(energy > -2e-3 * most - 1e-18)) throw new Error(`${energy} J of ${most} J`);
          }
        }),
        settings(),
      );
    });

    it("once the source rests at 0 nothing grows: the last third's peak is below the one before, to 0.5 %", () => {
      fc.assert(
        fc.property(anyNets(6, { ...linear, skin: false }), (net) => {
          const wave: Pwl = { kind: "pwl", time: [0, 100 * PS, 200 * PS, 300 * PS], value: [0, 1, 1, 0] };
          const until = 60e-9;
          const { time, voltage } = simulate(netOf(net, { wave }), { until, accuracy: "live" });
          const peak = (from: number, to: number) => {
            let top = 0;
            for (const v of Object.values(voltage))
              for (let i = 0; i < time.length; i++)
                if (time[i]! >= from && time[i]! < to) top = Math.max(top, Math.abs(v[i]!));
            return top;
          };
          expect(peak(40e-9, 60e-9)).toBeLessThan(peak(20e-9, 40e-9) + 5e-3);
          expect(peak(0, 60e-9)).toBeLessThan(20);
        }),
        settings(0.5),
      );
    });

    it("a slow ramp ends at the resistive solution (the phasor at next to no frequency), to 0.5 %", () => {
      fc.assert(
        fc.property(anyNets(4, { ...linear, skin: false }), (net) => {
          const slow = 40e-9;
          const { voltage, time } = simulate(netOf(net, { wave: edge(1, slow) }), {
            until: 6 * slow,
            accuracy: "live",
          });
          const still = nodeSpectrum(netOf(net), [1]);
          for (const [name, v] of Object.entries(voltage))
            expect(Math.abs(v[time.length - 1]! - still.probes[name]!.magnitude[0]!)).toBeLessThan(5e-3);
        }),
        settings(0.5),
      );
    });

    it("equal legs of a star see equal voltages, whatever hangs on them, exactly", () => {
      fc.assert(
        fc.property(anyNets(3, { ...all, rings: false }), fc.integer({ min: 2, max: 4 }), (net, legs) => {
          const leg = netOf(net);
          const star: Network = { ...leg, sections: [], parts: [], probes: [] };
          for (let k = 0; k < legs; k++) {
            const own = (node: string) =>
              node === "0" || node === "n0" || node === "vdd" ? node : `${node}.${k}`;
            for (const section of leg.sections)
              star.sections.push(
                section.kind === "pair"
                  ? {
                      ...section,
                      a1: own(section.a1),
                      a2: own(section.a2),
                      b1: own(section.b1),
                      b2: own(section.b2),
                    }
                  : { ...section, name: `${section.name}.${k}`, a: own(section.a), b: own(section.b) },
              );
            for (const part of leg.parts) star.parts.push({ ...part, a: own(part.a), b: own(part.b) });
            star.probes.push({ name: `k${k}`, node: `n1.${k}` });
          }
          const { voltage } = simulate(star, { until: UNTIL, accuracy: "live" });
          for (let k = 1; k < legs; k++)
            for (let i = 0; i < voltage.k0!.length; i++)
              expect(Math.abs(voltage[`k${k}`]![i]! - voltage.k0![i]!)).toBeLessThan(1e-9);
        }),
        settings(0.5),
      );
    });

    it("is a number everywhere, time never goes back, and it ends: any valid net of up to 40 sections", () => {
      fc.assert(
        fc.property(anyNets(40, all), fc.boolean(), (net, waves) => {
          const run = simulate(netOf(net), { until: 1.5e-9, accuracy: "live", waves });
          const { time } = run;
          for (let i = 1; i < time.length; i++)
            if (!(time[i]! >= time[i - 1]!)) throw new Error(`time goes back to ${time[i]}`);
          expect(time[0]).toBe(0);
          expect(time[time.length - 1]).toBeGreaterThanOrEqual(1.5e-9 * (1 - 1e-12));
          const series = [
            ...Object.values(run.voltage),
            ...(run.waves ?? []).flatMap(({ a, b }) => [a.incident, a.outgoing, b.incident, b.outgoing]),
          ];
          for (const values of series) {
            expect(values).toHaveLength(time.length);
            for (const v of values) if (!Number.isFinite(v) || Math.abs(v) > 60) throw new Error(`${v} V`);
          }
        }),
        settings(0.5),
      );
    });
  });
}
