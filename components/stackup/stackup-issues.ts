import { stackupDoc } from "@/lib/schemas/stackup";
import { type EditStackup, documentOf } from "./edit-layer";
import { fieldNames, type LayerField } from "./layer-field-text";

/** A text that a field could not take: it stays in the field until it is mended or given up. */
export interface Refusal {
  text: string;
  reason: string;
}

/** By `<layer key>.<field>`; the stackup's own name by "name", its process by `process.<field>`. */
export type Refusals = Readonly<Record<string, Refusal>>;

/** Why the stackup is not saved as it is. */
export interface StackupIssue {
  /** null: the stackup as a whole */
  layerKey: string | null;
  message: string;
}

/** Everything that keeps the stackup from being saved, the refused texts first; empty when it can be. */
export function stackupIssues(stackup: EditStackup, refusals: Refusals): StackupIssue[] {
  const refused = Object.entries(refusals).map(([address, { reason }]): StackupIssue => {
    const { layer, field } = locate(stackup, address);
    if (!layer) return { layerKey: null, message: `${PLACES[field] ?? "Fabricator’s process"}: ${reason}` };
    return {
      layerKey: layer.key,
      message: `${layer.name}, ${fieldNames[field as LayerField] ?? "plies"}: ${reason}`,
    };
  });
  const parsed = stackupDoc.safeParse(documentOf(stackup));
  if (parsed.success) return refused;
  const broken = parsed.error.issues.map(({ path, message }): StackupIssue => {
    const [, index, field] = path;
    const layer = typeof index === "number" ? stackup.layers[index] : undefined;
    if (!layer) return { layerKey: null, message };
    const named = layer.name !== "" && message.includes(layer.name);
    const name = layer.name || `Layer ${Number(index) + 1}`;
    const what = fieldNames[String(field) as LayerField] ?? String(field);
    return { layerKey: layer.key, message: named ? message : `${name}, ${what}: ${message}` };
  });
  return [...refused, ...broken];
}

/** What does not belong to a layer. */
const PLACES: Readonly<Record<string, string>> = { name: "Name of the stackup" };

function locate(stackup: EditStackup, address: string) {
  const layer = stackup.layers.find(({ key }) => address.startsWith(`${key}.`));
  return { layer, field: layer ? (address.slice(layer.key.length + 1).split(".")[0] ?? "") : address };
}

/** The refusals of layers that are still there. */
export function refusalsOf(layers: EditStackup["layers"], refusals: Refusals): Refusals {
  const left = Object.entries(refusals).filter(
    ([address]) =>
      address === "name" ||
      address.startsWith("process.") ||
      layers.some(({ key }) => address.startsWith(`${key}.`)),
  );
  return left.length === Object.keys(refusals).length ? refusals : Object.fromEntries(left);
}
