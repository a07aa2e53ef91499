import type { Domain, PlotBox, Scale } from "./axis";
import type { NodeVoltage } from "./bounce-rays";
import { line, type Mark, text } from "./marks";
import { voltsText } from "./number-text";

const ROW = 15;

/**
 * The voltages one end of the row takes, beside it at their times. Steps that follow each other closer than a line
 * of text are shown by the last of them.
 */
export function nodeVoltages(
  voltages: readonly NodeVoltage[],
  node: number,
  span: Domain,
  y: Scale,
  box: PlotBox,
): Mark[] {
  const out = node > 0 ? 1 : -1;
  const x = node > 0 ? box.right : box.left;
  const steps = voltages
    .filter((v) => v.node === node && v.time >= span[0] && v.time <= span[1] && Number.isFinite(v.volts))
    .sort((a, b) => a.time - b.time);
  const runs: NodeVoltage[][] = [];
  for (const step of steps) {
    const run = runs.at(-1);
    if (run?.[0] && y(step.time) - y(run[0].time) < ROW) run.push(step);
    else runs.push([step]);
  }
  let shown = "";
  return runs.flatMap((run) => {
    const step = run.at(-1);
    const first = run[0];
    if (!step || !first) return [];
    const words = voltsText(step.volts);
    if (words === shown) return [];
    shown = words;
    const at = y(first.time);
    return [
      ...run.map((s) => line(x, y(s.time), x + 5 * out, y(s.time), { stroke: "ink" })),
      text(x + 10 * out, at + 4, words, { anchor: node > 0 ? "start" : "end" }),
    ];
  });
}
