import type { ControlledLine } from "@/lib/si/rules/check-impedance";
import type { RevisionInputs } from "@/lib/schemas/snapshot";
import { LimitResolver } from "./limits";
import { LineTable } from "./line-table";
import { SiValues } from "./si-values";

/** Every line that a class controls: one for each class with a target and each of its layers with a width. */
export function controlledLines(inputs: RevisionInputs): ControlledLine[] {
  const si = new SiValues();
  const table = new LineTable(inputs.stackup);
  const limits = new LimitResolver(inputs.ruleSet);
  const names = new Map(inputs.stackup.layers.map((layer) => [layer.lineageId, layer.name]));
  const lines: ControlledLine[] = [];
  for (const netClass of inputs.classes) {
    if (!netClass.targetImpedance) continue;
    const ofClass = limits.of([], netClass, null);
    for (const entry of netClass.layers) {
      if (!entry.width) continue;
      const width = si.of(entry.width, "length");
      const gap = netClass.kind === "differential" ? si.orNull(entry.gap, "length") : null;
      const layer = names.get(entry.layerLineageId) ?? "a removed layer";
      const line = table.line(entry.layerLineageId, layer, width, gap);
      const noGap = netClass.kind === "differential" && gap === null;
      lines.push({
        id: `line ${netClass.lineageId} ${entry.layerLineageId}`,
        className: netClass.name,
        classLineageId: netClass.lineageId,
        layer,
        layerLineageId: entry.layerLineageId,
        kind: netClass.kind,
        width,
        gap,
        target: si.of(netClass.targetImpedance, "resistance"),
        tolerance: Number(netClass.tolerancePercent) / 100,
        nominal: noGap ? null : line.impedance,
        method: line.method,
        closedForm: noGap ? null : line.closedForm,
        spread: null,
        missing: noGap
          ? { input: `gap of ${netClass.name} on ${layer}`, detail: "A pair's impedance needs its gap." }
          : line.missing,
        limits: ofClass,
      });
    }
  }
  return lines;
}
