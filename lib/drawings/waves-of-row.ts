import type { SectionWaves as SimulatedWaves } from "@/lib/si/lattice/simulate";
import type { TableSection } from "./bounce-rays";
import type { SectionWaves } from "./line-voltages";

/**
 * The waves of a row out of a simulation: outward is what leaves each section's near end, inward what leaves its far
 * end. `time` is the simulation's own.
 *
 * @returns null when the simulation did not report waves, or lacks a section
 */
export function wavesOfRow(
  simulation: { time: Float64Array; waves?: readonly SimulatedWaves[] },
  row: readonly TableSection[],
): SectionWaves[] | null {
  const { time } = simulation;
  const found: SectionWaves[] = [];
  for (const { section, near } of row) {
    const waves = simulation.waves?.find((w) => w.section === section && w.mode === "line");
    if (!waves) return null;
    const far = near === "a" ? "b" : "a";
    found.push({
      outward: { time, volts: waves[near].outgoing },
      inward: { time, volts: waves[far].outgoing },
    });
  }
  return found;
}
