import { scaleLinear } from "@visx/scale";
import { line, type Mark, text } from "./marks";
import { type BaseUnit, numberText, type ScaledUnit, scaledUnit, withUnit } from "./number-text";

export type Domain = readonly [low: number, high: number];
export type Scale = ReturnType<typeof linear>;

export interface Tick {
  value: number;
  label: string;
}

/** A linear scale from values to pixels. */
export function linear(domain: Domain, range: readonly [number, number]) {
  return scaleLinear<number>({ domain: [...domain], range: [...range] });
}

/** Round tick values with their unit on each, as many decimals as the step needs. */
export function ticksFor(domain: Domain, count: number, base: BaseUnit): { ticks: Tick[]; unit: ScaledUnit } {
  const unit = scaledUnit(Math.max(Math.abs(domain[0]), Math.abs(domain[1])), base);
  const scale = linear([domain[0] / unit.factor, domain[1] / unit.factor], [0, 1]);
  const values = scale.ticks(Math.max(count, 2));
  const step = Math.abs((values[1] ?? 1) - (values[0] ?? 0));
  const decimals = step > 0 ? Math.max(0, -Math.floor(Math.log10(step) + 1e-9)) : 0;
  const ticks = values.map((v) => ({
    value: v * unit.factor,
    label: withUnit(numberText(v, decimals), unit.unit),
  }));
  return { ticks, unit };
}

/** A range with a little air on both sides; a flat one gets a range of its own size. */
export function padded(low: number, high: number, share = 0.06): Domain {
  if (!Number.isFinite(low) || !Number.isFinite(high)) return [0, 1];
  const span = high - low || Math.max(Math.abs(high), 1e-12);
  return [low - span * share, high + span * share];
}

export interface PlotBox {
  left: number;
  top: number;
  right: number;
  bottom: number;
}

/** Hairlines across the plot and their values at its left. */
export function leftAxis(scale: Scale, ticks: readonly Tick[], box: PlotBox): Mark[] {
  return ticks.flatMap(({ value, label }) => {
    const y = scale(value);
    return [
      line(box.left, y, box.right, y, { stroke: "rule-line" }),
      text(box.left - 8, y + 4, label, { anchor: "end", ink: "ink-soft" }),
    ];
  });
}

/** Ticks below the plot with their values; a label that would touch the one before is left out. */
export function bottomAxis(scale: Scale, ticks: readonly Tick[], box: PlotBox, grid = true): Mark[] {
  const marks: Mark[] = [line(box.left, box.bottom, box.right, box.bottom, { stroke: "ink-soft" })];
  for (const { value, label } of ticks) {
    const x = scale(value);
    if (grid) marks.push(line(x, box.top, x, box.bottom, { stroke: "rule-line" }));
    marks.push(line(x, box.bottom, x, box.bottom + 4, { stroke: "ink-soft" }));
    marks.push(text(x, box.bottom + 18, label, { anchor: "middle", ink: "ink-soft" }));
  }
  return marks;
}
