import type { Domain } from "./axis";
import type { BounceRay, NodeVoltage } from "./bounce-rays";
import type { LineRow } from "./line-row";
import { ohmsText, quantityText, voltsText } from "./number-text";

/** The bounce diagram in sentences. */
export function describeBounces(
  row: LineRow,
  rays: readonly BounceRay[],
  voltages: readonly NodeVoltage[],
  emphasized: BounceRay | null,
  left: number,
  span: Domain,
): string {
  const sections = row.sections.map(
    (s, i) =>
      `${row.nodes[i] ?? ""} to ${row.nodes[i + 1] ?? ""}: ${ohmsText(s.impedance)}, ${quantityText(s.delay, "s")}`,
  );
  const say = (r: BounceRay): string => {
    const [from, to] = r.outward ? [r.section, r.section + 1] : [r.section + 1, r.section];
    return `${voltsText(r.amplitude, true)} from ${row.nodes[from] ?? ""} at ${quantityText(r.start, "s", { like: span[1] })} to ${row.nodes[to] ?? ""}`;
  };
  const strongest = [...rays].sort((a, b) => Math.abs(b.amplitude) - Math.abs(a.amplitude)).slice(0, 8);
  const ends = [0, row.sections.length].map((node) => {
    const steps = voltages.filter((v) => v.node === node && v.time <= span[1]).slice(0, 8);
    return `${row.nodes[node] ?? ""}: ${steps.map((v) => `${voltsText(v.volts)} at ${quantityText(v.time, "s", { like: span[1] })}`).join(", ") || "no change"}`;
  });
  return [
    `Place across, time down to ${quantityText(span[1], "s")}.`,
    `Sections: ${sections.join("; ")}.`,
    emphasized ? `The harmful bounce: ${say(emphasized)}.` : "",
    `Strongest waves: ${strongest.map(say).join("; ")}.`,
    `Voltages at the ends: ${ends.join("; ")}.`,
    left > 0 ? `${left} weaker waves are not drawn.` : "",
  ]
    .filter((s) => s !== "")
    .join(" ");
}
