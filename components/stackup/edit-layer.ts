import type { ProcessDoc } from "@/lib/schemas/process";
import type { StackupDoc, StackupLayerDoc, StoredStackup } from "@/lib/schemas/stackup";

/** A layer in the editor: known by a key of its own, since a new one has no id until it was saved. */
export type EditLayer = StackupLayerDoc & { key: string };

export interface EditStackup {
  name: string;
  process?: ProcessDoc | undefined;
  layers: EditLayer[];
}

/** The stored stackup for the editor; a layer that is in it already keeps its key, and with it its selection. */
export function toEdit(
  stored: Pick<StoredStackup, "name" | "process" | "layers">,
  present: readonly EditLayer[] = [],
): EditStackup {
  const keys = new Map(present.flatMap((layer) => (layer.id ? [[layer.id, layer.key] as const] : [])));
  return {
    name: stored.name,
    process: stored.process,
    layers: stored.layers.map((layer) => {
      // What the server derives is not part of the document.
      const { thickness_m: _derived, ...doc } = layer as typeof layer & { thickness_m?: unknown };
      return { ...doc, key: keys.get(layer.id) ?? layer.id };
    }),
  };
}

/** The document that is sent. */
export function documentOf({ name, process, layers }: EditStackup): StackupDoc {
  return { name, ...(process ? { process } : {}), layers: layers.map(({ key: _own, ...layer }) => layer) };
}

/** What is compared to tell whether something is left to save: all but the ids, which the server gives. */
export function contentOf({ name, process, layers }: EditStackup): string {
  return JSON.stringify({
    name,
    process,
    layers: layers.map(({ id: _id, lineageId: _lineage, ...layer }) => layer),
  });
}

/** Takes over the ids that saving gave, layer for layer of what was sent. */
export function adoptIds(
  present: EditStackup,
  sent: EditStackup,
  stored: Pick<StoredStackup, "layers">,
): EditStackup {
  const ids = new Map(
    sent.layers.flatMap((layer, index) => {
      const kept = stored.layers[index];
      return kept ? [[layer.key, { id: kept.id, lineageId: kept.lineageId }] as const] : [];
    }),
  );
  return { ...present, layers: present.layers.map((layer) => ({ ...layer, ...ids.get(layer.key) })) };
}
