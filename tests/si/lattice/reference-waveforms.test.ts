import { describe, expect, it } from "vitest";
import { simulate, UnsupportedError } from "@/lib/si";
import {
  largestMiss,
  networkOf,
  referenceCases,
  sourceSwing,
  type ReferenceCase,
} from "../network/reference-case";

/** Source of the values: tests/reference/network (exact rational lattice sums; a circuit simulator), its README states their error. */
function share(entry: ReferenceCase, accuracy?: "live" | "reference"): number {
  const { time, voltage } = simulate(networkOf(entry), { until: entry.settings.t_stop_ps * 1e-12, accuracy });
  return (
    Math.max(
      ...Object.entries(entry.waveforms).map(([name, waveform]) =>
        largestMiss(time, voltage[name]!, waveform),
      ),
    ) / sourceSwing(entry)
  );
}

describe("resistive networks", () => {
  it.each(referenceCases("A").map((entry) => [entry.id, entry] as const))(
    "%s meets the exact lattice sum to 1e-9 of the source swing",
    (_, entry) => {
      expect(share(entry)).toBeLessThan(1e-9);
    },
  );
});

const reactive = referenceCases("B").map((entry) => [entry.id, entry] as const);

describe("networks with capacitors, coils, tables, coupled and lossy lines meet the reference to 0.2 % of the source swing", () => {
  it.each(reactive)("%s", (_, entry) => expect(share(entry)).toBeLessThan(2e-3));
});

describe("the same, live, to 0.5 %", () => {
  it.each(reactive)("%s", (_, entry) => expect(share(entry, "live")).toBeLessThan(5e-3));
});

// README: the published points are decimated to 0.01 … 0.05 % of the swing; 0.035 % is the largest here.
describe("the same, finest, to 0.05 % beside the reference's own decimation", () => {
  it.each(reactive)("%s", (_, entry) => expect(share(entry, "reference")).toBeLessThan(5e-4 + 3.5e-4));
});

describe("what is not simulated", () => {
  const lossy = referenceCases("K");
  it.each(lossy.map((entry) => [entry.id, entry] as const))(
    "%s says so and names the section",
    (_, entry) => {
      const run = () => simulate(networkOf(entry), { until: entry.settings.t_stop_ps * 1e-12 });
      expect(run).toThrow(UnsupportedError);
      expect(run).toThrow(entry.circuit.sections[0]!.name);
    },
  );
});
