import type { NetClassDoc } from "@/lib/schemas/net-class";
import type { StoredStackupLayer } from "@/lib/schemas/stackup";
import { formatQuantity, toSi, type Quantity } from "@/lib/si/units";

/** Computer-aided manufacturing tells lines apart from this difference of their widths or gaps [m]. */
export const DISTINCT_LINES_M = 2.5e-6;

type ClassOfLines = Pick<NetClassDoc, "name" | "kind" | "targetImpedance" | "tolerancePercent" | "layers">;

interface NamedLine {
  className: string;
  kind: NetClassDoc["kind"];
  /** foot width, and gap of a pair [m] */
  width: number;
  gap: number | null;
  /** "0.18 mm", "0.12 mm with a gap of 0.15 mm" */
  shape: string;
  /** "50 Ω ±10 %" */
  asked: string;
}

/**
 * Lines of one layer that look alike on the board (kind, width, and gap of a pair) but are asked for with different
 * targets or tolerances, each in words: a fabricator tells lines apart by their width and cannot build both.
 */
export function lineConflicts(
  classes: readonly ClassOfLines[],
  layers: readonly Pick<StoredStackupLayer, "lineageId" | "name">[],
): string[] {
  const ordered = [...classes].sort((a, b) => (a.name < b.name ? -1 : 1));
  return layers.flatMap((layer) => {
    const lines = ordered.flatMap((entry) => linesOn(entry, layer.lineageId));
    return lines.flatMap((line, index) => {
      const twin = lines.slice(0, index).find((other) => alike(other, line) && other.asked !== line.asked);
      return twin
        ? [
            `${line.shape} on ${layer.name} is to be ${twin.asked} for ${twin.className} and ${line.asked} for ${line.className}`,
          ]
        : [];
    });
  });
}

function linesOn(entry: ClassOfLines, layerLineageId: string): NamedLine[] {
  const { targetImpedance, tolerancePercent, kind, name } = entry;
  if (!targetImpedance) return [];
  const asked = `${formatQuantity(targetImpedance)} ±${Number(tolerancePercent)} %`;
  return entry.layers
    .filter((line) => line.layerLineageId === layerLineageId)
    .flatMap(({ width, gap }) => {
      if (!width || (kind === "differential" && !gap)) return [];
      const ofPair = kind === "differential" ? gap : null;
      return [
        {
          className: name,
          kind,
          width: toSi(width, "length"),
          gap: ofPair && toSi(ofPair, "length"),
          shape: shapeOf(width, ofPair),
          asked,
        },
      ];
    });
}

function shapeOf(width: Quantity, gap: Quantity | null): string {
  return gap ? `${formatQuantity(width)} with a gap of ${formatQuantity(gap)}` : formatQuantity(width);
}

function alike(a: NamedLine, b: NamedLine): boolean {
  return a.kind === b.kind && close(a.width, b.width) && close(a.gap ?? 0, b.gap ?? 0);
}

function close(a: number, b: number): boolean {
  // Typed decimals that differ by just that much are distinct.
  return Math.abs(a - b) < DISTINCT_LINES_M * (1 - 1e-6);
}
