import type { ValidationChapter } from "../../lib/schemas/validation";
import figures from "../../tests/reference/measured-lines.json";
import { grouped, type CaseValues } from "./grouped";

/** Of the step, root mean square. */
const ALLOWED = 0.03;
const METHODS: Record<string, string> = {
  time: "Step responses, lines in time",
  frequency: "Step responses, lines over frequency",
};
const BOARDS: Record<string, string> = { open: "open line", stepped: "stepped line" };

/** Step responses of two measured boards; Dk, Df and launch come from two others. */
export function measuredLines(): ValidationChapter {
  const { dielectric, launch, misses } = figures.fit;
  const percent = (share: number) => (100 * share).toPrecision(1);
  const cases = figures.steps.map(({ board, wave, method, rms }): CaseValues => ({
    group: METHODS[method] ?? method,
    id: `${BOARDS[board] ?? board}, ${wave}`,
    values: [
      {
        quantity: `${wave} wave, root mean square difference`,
        unit: "V",
        reference: null,
        engine: null,
        error: rms,
      },
    ],
  }));
  return {
    id: "measured",
    title: "Step responses against measured microstrips",
    about: `Two straight microstrips of 100 and 200 mm give, once, Dk ${dielectric.er.toFixed(2)} and Df ${dielectric.tanD.toFixed(4)} at 1 GHz and a launch of ${(launch.delay * 1e12).toFixed(0)} ps, ${(launch.inductance * 1e9).toFixed(2)} nH and ${(launch.capacitance * 1e12).toFixed(2)} pF; the fit leaves ${percent(misses.phase)} % of the phase constant and ${percent(misses.attenuation)} % of the loss. With these and the stated geometry the engine predicts an open line and one with steps of 3, 8, 1 and 3 mm width. Differences are shares of the step, over 4 ns, for an edge of 150 ps.`,
    source: `${figures.origin} Computed where the measurements are at hand and kept with the project, not made anew at build.`,
    groups: grouped(cases, ALLOWED),
  };
}
