import { describe, expect, it } from "vitest";
import { bounceTable, UnsupportedError } from "@/lib/si";
import { networkOf, referenceCases } from "../network/reference-case";
import { pointToPoint } from "./nets";

describe("bounce table", () => {
  it.each(referenceCases("A").map((entry) => [entry.id, entry] as const))(
    "%s: every row of the exact rational table, to 1e-9",
    (_, entry) => {
      const table = bounceTable(networkOf(entry), { until: entry.settings.t_stop_ps * 1e-12, floor: 1e-15 });
      for (const row of entry.bounce_table!.rows) {
        const ends = new Set([...Object.keys(row.incident), ...Object.keys(row.outgoing)]);
        for (const end of ends) {
          const found = table.find(
            (bounce) =>
              Math.abs(bounce.time * 1e12 - row.t_ps) < 1e-6 && `${bounce.section}.${bounce.end}` === end,
          );
          expect(found, `${row.t_ps} ${end}`).toBeDefined();
          expect(found!.incident).toBeCloseTo(row.incident[end]?.[0] ?? 0, 9);
          expect(found!.outgoing).toBeCloseTo(row.outgoing[end]?.[0] ?? 0, 9);
          expect(found!.voltage).toBeCloseTo(row.v_node_running[0], 9);
        }
      }
    },
  );

  it("waves of 60 V, 100 Ω, 50 Ω, 25 Ω are 20, −6.667, −2.222, 0.741, 0.247, −0.082 V (university lattice-diagram example)", () => {
    const table = bounceTable(pointToPoint({ resistance: 100, load: 25, delay: 5e-9 }), { until: 26e-9 });
    const launched = table.filter((bounce) => bounce.outgoing !== 0).map((bounce) => 60 * bounce.outgoing);
    [20, -6.667, -2.222, 0.741, 0.247, -0.082].forEach((wave, i) => expect(launched[i]).toBeCloseTo(wave, 3));
  });

  it("drops waves below the floor and ends even where nothing dies out (0 Ω into an open line)", () => {
    const table = bounceTable(pointToPoint({ resistance: 0, load: null, delay: 1e-9 }), { until: 50e-9 });
    expect(table).toHaveLength(51);
    expect(
      bounceTable(pointToPoint({ resistance: 25, load: null, delay: 1e-9 }), { until: 1e-6, floor: 1e-3 })
        .length,
    ).toBeLessThan(20);
  });

  it("refuses what has no single height: a capacitor, by name", () => {
    const net = pointToPoint({ resistance: 25, load: null, delay: 1e-9 });
    net.parts.push({ name: "C7", kind: "C", a: "b", b: "0", value: 1e-12 });
    expect(() => bounceTable(net, { until: 1e-8 })).toThrow(UnsupportedError);
    expect(() => bounceTable(net, { until: 1e-8 })).toThrow("C7");
  });
});
