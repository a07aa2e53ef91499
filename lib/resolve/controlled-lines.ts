import type { ControlledLine } from "@/lib/si/rules/check-impedance";
import type { RevisionInputs } from "@/lib/schemas/snapshot";
import { LimitResolver } from "./limits";
import { LineSpreads } from "./line-spreads";
import { LineTable } from "./line-table";
import { SiValues } from "./si-values";

/**
 * Every line that a class controls: one for each class with a target and each of its layers with a width. A field
 * solution and a spread each: whoever must not be held up takes them one by one.
 */
export function* controlledLines(inputs: RevisionInputs): Generator<ControlledLine> {
  const si = new SiValues();
  const table = new LineTable(inputs.stackup);
  const limits = new LimitResolver(inputs.ruleSet);
  const names = new Map(inputs.stackup.layers.map((layer) => [layer.lineageId, layer.name]));
  const spreads = new LineSpreads(inputs.stackup);
  const places = new Map(inputs.stackup.layers.map((layer, index) => [layer.lineageId, index]));
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
      const target = si.of(netClass.targetImpedance, "resistance");
      const tolerance = Number(netClass.tolerancePercent) / 100;
      const index = places.get(entry.layerLineageId);
      const solved = index !== undefined && !noGap && line.impedance !== null;
      yield {
        id: `line ${netClass.lineageId} ${entry.layerLineageId}`,
        className: netClass.name,
        classLineageId: netClass.lineageId,
        layer,
        layerLineageId: entry.layerLineageId,
        kind: netClass.kind,
        width,
        gap,
        target,
        tolerance,
        nominal: noGap ? null : line.impedance,
        method: line.method,
        closedForm: noGap ? null : line.closedForm,
        spread: solved ? spreads.of(index, { width, gap }, target, tolerance) : null,
        missing: noGap
          ? { input: `gap of ${netClass.name} on ${layer}`, detail: "A pair's impedance needs its gap." }
          : line.missing,
        limits: ofClass,
      };
    }
  }
}
