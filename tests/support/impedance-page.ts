import { netClassDoc, type NetClassDoc, type StoredNetClass } from "@/lib/schemas/net-class";
import type { StoredStackup } from "@/lib/schemas/stackup";
import type { ResolvedLimit } from "@/lib/si/path/types";
import { stackupFromTyped, stackupTemplates } from "@/lib/si/stackup";
import {
  cellJobOf,
  type ImpedanceRow,
  rowInputs,
  rowOf,
  spreadJobOf,
} from "@/components/impedance/impedance-rows";
import { leastOf } from "@/components/impedance/use-rows";
import { impedanceCentring } from "@/lib/si/rules/impedance-centring";
import { impedanceYield } from "@/lib/si/rules/impedance-yield";
import { runJob } from "@/lib/client/engine-jobs";
import { usualProcess } from "@/lib/schemas/process";

/** Limit of impedance centring as the defaults have it [%]. */
export const LIMIT: ResolvedLimit = { enabled: true, limit: 2, severity: "warning", origin: "default" };

/** Of yield as the defaults have it [%]. */
const YIELD: ResolvedLimit = { enabled: true, limit: 95, severity: "warning", origin: "default" };

/** By rule id. */
export const LIMITS = { [impedanceCentring.id]: LIMIT, [impedanceYield.id]: YIELD };

const uuid = (number: number) => `0198f000-0000-7000-8000-${String(number).padStart(12, "0")}`;

/** Four generic layers as stored: L1 and L4 carry traces, L2 and L3 are planes. */
export function aBoard() {
  const layers = (stackupTemplates.find(({ copperLayers }) => copperLayers === 4)?.layers ?? []).map(
    (layer, index) => ({
      ...layer,
      name: layer.name.replace(/^(L\d+) .*/, "$1"),
      id: uuid(index),
      lineageId: uuid(100 + index),
    }),
  );
  const stackup: StoredStackup = { name: "Four layers", version: 0, layers };
  return { stackup, si: stackupFromTyped(layers) };
}

/** A stored class of 50 Ω with foot width and gap in mm by the layer's name. */
export function aClassOn(
  name: string,
  widths: Record<string, [width: string | null, gap: string | null]>,
  over: Partial<NetClassDoc> = {},
): StoredNetClass {
  const { layers } = aBoard().stackup;
  const mm = (value: string | null) => (value === null ? null : { value, unit: "mm" });
  const doc = netClassDoc.parse({
    name,
    kind: "single",
    targetImpedance: { value: "50", unit: "Ω" },
    layers: Object.entries(widths).map(([layer, [width, gap]]) => ({
      layerLineageId: layers.find((entry) => entry.name === layer)?.lineageId,
      width: mm(width),
      gap: mm(gap),
    })),
    ...over,
  });
  const number = [...name].reduce((sum, letter) => sum + letter.charCodeAt(0), 1000);
  return { ...doc, id: uuid(number), lineageId: uuid(number + 5000), version: 1 };
}

/** The rows of the page with every answer there, solved in the test's own thread. */
export function solvedRows(classes: readonly StoredNetClass[], grid: number): ImpedanceRow[] {
  const { si, stackup } = aBoard();
  return rowInputs({ layers: stackup.layers, classes }).map((input) => {
    const spread = spreadJobOf(input, si, usualProcess);
    return rowOf(
      input,
      { cell: runJob(cellJobOf(input, si, grid)), spread: spread && runJob(spread) },
      leastOf(si, input.index, usualProcess),
      LIMITS,
    );
  });
}
