import type { ValidationChapter } from "../../lib/schemas/validation";
import { simulate } from "../../lib/si";
import { largestMiss, networkOf, referenceCases, sourceSwing } from "../../tests/si/network/reference-case";
import { type CaseValues, grouped } from "./grouped";

const KINDS = [
  { group: "A", title: "Resistive ends, any topology", allowed: 1e-9 },
  { group: "B", title: "Capacitors, coils, clamps, tables, pairs, loss", allowed: 2e-3 },
  { group: "K", title: "Skin effect", allowed: 2e-3 },
] as const;

/** Waveforms at every receiver against exact sums and a circuit simulator. */
export function waveforms(): ValidationChapter {
  return {
    id: "waveforms",
    title: "Waveforms against exact sums and a circuit simulator",
    about:
      "The largest difference between the engine’s waveform and the reference’s at each receiver, away from jumps, as a share of the peak-to-peak voltage of all sources.",
    source:
      "Exact rational sums of reflections for resistive networks; a general-purpose circuit simulator at tight tolerances for the others. Computed for this project apart from its code.",
    groups: KINDS.flatMap(({ group, title, allowed }) => {
      const cases = referenceCases(group).map((entry): CaseValues => {
        const { time, voltage } = simulate(networkOf(entry), { until: entry.settings.t_stop_ps * 1e-12 });
        const values = Object.entries(entry.waveforms).map(([name, waveform]) => ({
          quantity: `${name}, largest difference`,
          unit: "V",
          reference: null,
          engine: null,
          error: largestMiss(time, voltage[name] ?? new Float64Array(), waveform) / sourceSwing(entry),
        }));
        return { group: title, id: entry.id, values };
      });
      return grouped(cases, allowed);
    }),
  };
}
