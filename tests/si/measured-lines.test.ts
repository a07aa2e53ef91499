import { describe, expect, it } from "vitest";
import { measuredLinesFigures } from "@/scripts/measured-lines/figures";
import { measurements } from "@/scripts/measured-lines/measurement";
import committed from "../reference/measured-lines.json";

// Measured microstrips of an open library (BSD-3), which are not part of this project.
const measured = measurements();
if (!measured)
  process.stdout.write(
    "Skipped: the measured lines are not beside this repository (shared/reference/touchstone).\n",
  );

/** Of the step, root mean square. */
const ALLOWED = 0.03;

it("the committed figures hold what is asked: 3 % rms of the step", () => {
  expect(committed.steps).toHaveLength(6);
  for (const { rms } of committed.steps) expect(rms).toBeLessThan(ALLOWED);
});

describe.skipIf(!measured)("two straight microstrips give Dk, Df and launch; with them", () => {
  const figures = measured ? measuredLinesFigures(measured) : null;

  it("the line follows its own measurement: phase to 0.1 %, attenuation to 6 %, scattering to 0.01, rms", () => {
    const { dielectric, misses } = figures!.fit;
    expect(dielectric.er).toBeGreaterThan(4.2);
    expect(dielectric.er).toBeLessThan(4.7);
    expect(dielectric.tanD).toBeGreaterThan(0.01);
    expect(dielectric.tanD).toBeLessThan(0.025);
    expect(misses.phase).toBeLessThan(1e-3);
    expect(misses.attenuation).toBeLessThan(0.06);
    expect(misses.scattering).toBeLessThan(0.01);
  });

  it("the open and the stepped line answer a step as measured, to 3 % rms, over frequency and in time", () => {
    for (const { board, wave, method, rms } of figures!.steps)
      expect(rms, `${board} ${wave} ${method}`).toBeLessThan(ALLOWED);
  });

  it("the committed figures are these, to 0.2 % of the step", () => {
    figures!.steps.forEach(({ rms }, i) =>
      expect(Math.abs(rms - committed.steps[i]!.rms)).toBeLessThan(2e-3),
    );
    expect(Math.abs(figures!.fit.dielectric.er - committed.fit.dielectric.er)).toBeLessThan(0.02);
  });
});
