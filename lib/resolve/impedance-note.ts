import { FIELD_METHOD, lineOnLayer, stackupFromTyped, toSi, type Stackup } from "@/lib/si";
import { closedFormOf } from "./line-table";
import type { LineSpread } from "@/lib/si/rules/check-impedance";
import { LineSpreads } from "./line-spreads";
import { finishedCopperText, layerThickness } from "./note-layers";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import type { ImpedanceNote, NoteLine } from "@/lib/schemas/release";
import type { RevisionInputs } from "@/lib/schemas/snapshot";

export interface NoteHeading {
  title: string;
  remarks: string;
  releasedAt: number;
  signedBy: string;
  team: string;
}

export const CAUTION =
  "Predicted values are engineering estimates by a two-dimensional field solution. The fabricator's process, the laminate's data sheet and measurement on coupons decide; no result here replaces the review of a qualified engineer or a standard that the design must meet.";

/** Widths this close are one width: CAM tells lines apart from 2.5 µm. */
const SAME_WIDTH_M = 1.25e-6;

/** What the fabricator builds to: every controlled structure by layer and width, and the stackup it rests on. */
export function impedanceNote(inputs: RevisionInputs, heading: NoteHeading): ImpedanceNote {
  const layers = inputs.stackup.layers;
  return {
    project: inputs.project.name,
    revision: inputs.revision,
    ...heading,
    totalThickness_m: layers.reduce((sum, _layer, index) => sum + (layerThickness(layers, index) ?? 0), 0),
    stackup: layers.map((layer, index) => ({
      name: layer.name,
      kind: layer.kind,
      material: layer.material,
      thickness_m: layerThickness(layers, index) ?? 0,
      dk: layer.dk,
      df: layer.df,
      copper: finishedCopperText(layer),
    })),
    lines: noteLines(inputs),
    caution: CAUTION,
  };
}

/** One row a structure: classes that share layer, width, gap and target share it. Numbered in stackup order. */
function noteLines(inputs: RevisionInputs): NoteLine[] {
  const stackup = stackupFromTyped(inputs.stackup.layers);
  const spreads = new LineSpreads(inputs.stackup);
  const rows = new Map<string, NoteLine>();
  for (const netClass of [...inputs.classes].sort((a, b) => (a.name < b.name ? -1 : 1))) {
    if (!netClass.targetImpedance) continue;
    const targetOhms = toSi(netClass.targetImpedance, "resistance");
    for (const entry of netClass.layers) {
      const index = inputs.stackup.layers.findIndex((layer) => layer.lineageId === entry.layerLineageId);
      const layer = inputs.stackup.layers[index];
      if (!layer || !entry.width || (netClass.kind === "differential" && !entry.gap)) continue;
      const width = toSi(entry.width, "length");
      const gap = entry.gap && netClass.kind === "differential" ? toSi(entry.gap, "length") : null;
      const key = [
        index,
        width.toExponential(9),
        gap?.toExponential(9),
        targetOhms,
        netClass.tolerancePercent,
      ].join(" ");
      const routed = countNets(inputs, netClass, entry.layerLineageId, width);
      const existing = rows.get(key);
      if (existing) {
        existing.className.push(netClass.name);
        existing.routedNets = (existing.routedNets ?? 0) + routed;
        continue;
      }
      rows.set(key, {
        line: 0,
        layer: layer.name,
        layerLineageId: layer.lineageId,
        kind: netClass.kind,
        className: [netClass.name],
        width: entry.width,
        gap: gap === null ? null : entry.gap,
        targetOhms,
        tolerancePercent: Number(netClass.tolerancePercent),
        ...predict(stackup, index, width, gap),
        spread: spreadOf(
          spreads.of(index, { width, gap }, targetOhms, Number(netClass.tolerancePercent) / 100),
        ),
        routedNets: routed,
      });
    }
  }
  const order = new Map(inputs.stackup.layers.map((layer, index) => [layer.lineageId, index]));
  return [...rows.values()]
    .sort(
      (a, b) =>
        (order.get(a.layerLineageId) ?? 0) - (order.get(b.layerLineageId) ?? 0) ||
        a.targetOhms - b.targetOhms ||
        toSi(a.width, "length") - toSi(b.width, "length"),
    )
    .map((row, index) => ({ ...row, line: index + 1 }));
}

function spreadOf(spread: LineSpread | null): NoteLine["spread"] {
  return spread && { yield: spread.yield, low: spread.low, high: spread.high, method: spread.method };
}

function predict(
  stackup: Stackup,
  index: number,
  width: number,
  gap: number | null,
): Pick<NoteLine, "predictedOhms" | "method" | "closedForm" | "references"> {
  try {
    const { line, built } = lineOnLayer(stackup, index, gap === null ? { width } : { width, gap });
    const planes = [built.references.above, built.references.below].flatMap((plane) =>
      plane === undefined ? [] : [stackup.layers[plane]?.name ?? ""],
    );
    return {
      predictedOhms: line.pair?.differential ?? line.single?.impedance ?? null,
      method: FIELD_METHOD,
      closedForm: closedFormOf(line),
      references: planes.join(" and "),
    };
  } catch (error) {
    return {
      predictedOhms: null,
      method: error instanceof Error ? error.message : "no prediction",
      closedForm: null,
      references: "",
    };
  }
}

function countNets(
  inputs: RevisionInputs,
  netClass: StoredNetClass,
  layerLineageId: string,
  width: number,
): number {
  return inputs.nets.filter(
    (net) =>
      net.classLineageId === netClass.lineageId &&
      net.topology.sections.some(
        (section) =>
          section.layerLineageId === layerLineageId &&
          Math.abs(toSi(section.width, "length") - width) < SAME_WIDTH_M,
      ),
  ).length;
}
