import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { spreadLabels } from "@/lib/drawings/spread-labels";

describe("spreadLabels", () => {
  it("leaves labels that do not touch where they are", () => {
    expect(spreadLabels([20, 60, 100], 15, 0, 200)).toEqual([20, 60, 100]);
  });

  it("centres two that coincide about their place", () => {
    expect(spreadLabels([50, 50], 10, 0, 200)).toEqual([45, 55]);
  });

  it("never lets two overlap, keeps their order, and stays inside where there is room (property)", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -100, max: 500, noNaN: true }), { maxLength: 25 }),
        fc.double({ min: 4, max: 16, noNaN: true }),
        (wanted, size) => {
          const placed = spreadLabels(wanted, size, 0, 400);
          const order = wanted.map((_, i) => i).sort((a, b) => (wanted[a] ?? 0) - (wanted[b] ?? 0) || a - b);
          const sorted = order.map((i) => placed[i] ?? 0);
          sorted.forEach((centre, i) => {
            if (i > 0) expect(centre - (sorted[i - 1] ?? 0)).toBeGreaterThan(size - 1e-6);
            expect(centre).toBeGreaterThan(size / 2 - 1e-6);
            if (wanted.length * size <= 400) expect(centre).toBeLessThan(400 - size / 2 + 1e-6);
          });
        },
      ),
    );
  });
});
