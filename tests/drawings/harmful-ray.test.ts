import { describe, expect, it } from "vitest";
import { harmfulRay, harmSense } from "@/lib/drawings/harmful-ray";
import type { BounceRay } from "@/lib/drawings/bounce-rays";

const ns = 1e-9;
const row = {
  sections: [
    { id: "main", impedance: 50, delay: 1 * ns },
    { id: "stub", impedance: 50, delay: 0.01 * ns },
  ],
  nodes: ["U1", "", "U2"],
};
const ray = (section: number, outward: boolean, start: number, amplitude: number): BounceRay => ({
  id: `${section}${outward ? ">" : "<"}${start}`,
  section,
  outward,
  start: start * ns,
  amplitude,
});
const rays = [ray(0, true, 0, 2.4), ray(1, true, 1, 2.4), ray(0, true, 2.02, -1), ray(1, true, 3.02, -1)];

describe("the harmful ray", () => {
  it("of a peak is the wave that arrives then, seen in its longest section", () => {
    expect(harmfulRay(row, rays, { time: 1.4 * ns, sense: 1, ramp: 0.5 * ns })).toBe("0>0");
  });
  it("of a dip back is the wave that pulls back", () => {
    expect(harmfulRay(row, rays, { time: 3.5 * ns, sense: -1, ramp: 0.5 * ns })).toBe("0>2.02");
  });
  it("is none before anything arrives", () => {
    expect(harmfulRay(row, rays, { time: 0.4 * ns, sense: 0, ramp: 0.5 * ns })).toBeNull();
  });
  it("pulls back from a falling level upward", () => {
    expect([harmSense("ringback", "rise"), harmSense("ringback", "fall")]).toEqual([-1, 1]);
  });
});
