import { type Domain, padded } from "./axis";
import type { LineRow } from "./line-row";
import { quantityText, voltsText } from "./number-text";
import { type Samples, voltsAt } from "./wave-samples";
import type { LimitLine } from "./waveform-chart.geometry";

/** The two waves of a section, each at the end where it enters: outward at the driver's side, inward at the other. */
export interface SectionWaves {
  outward: Samples;
  inward: Samples;
}

/** One place at one instant. */
export interface PlaceVoltage {
  section: number;
  /** 0 at the section's driver side, 1 at its other */
  share: number;
  incident: number;
  reflected: number;
  total: number;
}

const STEPS = 40;

/**
 * Voltages along the line at an instant. A wave keeps its shape within a section: at a share p of a section of
 * delay T it is what entered p T (or (1 − p) T) earlier.
 */
export function voltagesAlong(row: LineRow, waves: readonly SectionWaves[], time: number): PlaceVoltage[] {
  return row.sections.flatMap((s, section) => {
    const w = waves[section];
    if (!w) return [];
    return Array.from({ length: STEPS + 1 }, (_, i) => {
      const share = i / STEPS;
      const incident = voltsAt(w.outward, time - share * s.delay) ?? 0;
      const reflected = voltsAt(w.inward, time - (1 - share) * s.delay) ?? 0;
      return { section, share, incident, reflected, total: incident + reflected };
    });
  });
}

/** Lowest and highest voltage anywhere on the line at any time, with room: the fixed axis of the drawing. */
export function alongLineDomain(
  row: LineRow,
  waves: readonly SectionWaves[],
  span: Domain,
  limits: readonly LimitLine[] = [],
): Domain {
  let [low, high] = [0, 0];
  const instants = 96;
  for (let k = 0; k <= instants; k++)
    for (const p of voltagesAlong(row, waves, span[0] + ((span[1] - span[0]) * k) / instants)) {
      low = Math.min(low, p.total, p.reflected, p.incident);
      high = Math.max(high, p.total, p.reflected, p.incident);
    }
  const marks = limits.map((l) => l.volts).filter(Number.isFinite);
  return padded(Math.min(low, ...marks), Math.max(high, ...marks));
}

/** The instant in one sentence. */
export function describeAlong(row: LineRow, waves: readonly SectionWaves[], time: number): string {
  const places = voltagesAlong(row, waves, time).filter((p, i) => i === 0 || p.share === 1);
  const says = places.map(
    (p, i) =>
      `${row.nodes[i] ?? ""} ${voltsText(p.total)} (incident ${voltsText(p.incident)}, reflected ${voltsText(p.reflected)})`,
  );
  return `At ${quantityText(time, "s")}: ${says.join("; ")}.`;
}
