import type { Domain } from "./axis";
import { quantityText, voltsText } from "./number-text";
import { extent } from "./wave-samples";
import type { LimitLine, WaveProbe } from "./waveform-chart.geometry";
import type { Violation } from "./waveform-violations";

/** The chart in sentences: what each wave reaches, each limit, and what passes it where. */
export function describeWaveforms(
  probes: readonly WaveProbe[],
  limits: readonly LimitLine[],
  violations: readonly Violation[],
  span: Domain,
): string {
  const waves = probes.map((p) => {
    const e = extent([p]);
    return e ? `${p.label} from ${voltsText(e.low)} to ${voltsText(e.high)}` : `${p.label}: no data`;
  });
  const judged = limits.map((l) => {
    const broken = violations.filter((v) => v.limit === l.id);
    const name = `${l.label} at ${voltsText(l.volts)}`;
    if (l.reference) return `${name}, for reference`;
    if (broken.length === 0) return `${name}: kept`;
    const spans = broken.map((v) => {
      const label = probes.find((p) => p.id === v.probe)?.label ?? v.probe;
      const like = span[1];
      return `${label} by ${voltsText(v.worst.past)} at ${quantityText(v.worst.time, "s", { like })} (${quantityText(v.from, "s", { like })} to ${quantityText(v.to, "s", { like })})`;
    });
    return `${name}: passed by ${spans.join(", ")}`;
  });
  return [
    `Voltage over time, ${quantityText(span[0], "s", { like: span[1] })} to ${quantityText(span[1], "s")}.`,
    `${waves.join("; ")}.`,
    judged.length > 0 ? `Limits: ${judged.join("; ")}.` : "No limit is drawn.",
  ].join(" ");
}
