import type { StoredStackup } from "@/lib/schemas/stackup";
import { LineTable } from "./line-table";
import type { WidthPoint } from "./width-points";

const POINTS = 33;
const FACTOR = 2.5;

/**
 * What widths around a trace's own give on its layer, falling impedance with rising width; empty where no formula
 * speaks of the layer.
 *
 * @param layer  as a resolved section names it
 * @param width  the trace's own [m], > 0
 */
export function widthTable(stackup: StoredStackup, layer: string, width: number): WidthPoint[] {
  const found = stackup.layers.find((entry) => entry.name === layer);
  if (!found || !(width > 0)) return [];
  const table = new LineTable(stackup);
  return Array.from({ length: POINTS }, (_, i) => width * FACTOR ** ((2 * i) / (POINTS - 1) - 1)).flatMap(
    (at) => {
      const { impedance } = table.line(found.lineageId, layer, at);
      return impedance === null ? [] : [{ width: at, impedance }];
    },
  );
}
