import type { EditStackup } from "./edit-layer";
import { type Refusals, refusalsOf } from "./stackup-issues";

/** What was on screen and not on the server when the editor left. */
export interface UnsavedStackup {
  /** that it was read at */
  version: number;
  stackup: EditStackup;
  refusals: Refusals;
}

interface State {
  stackup: EditStackup;
  refusals: Refusals;
  selected: string | null;
}

/** The same with each layer known by its id, as whoever comes back reads it from the server. */
export function unsavedOf(version: number, stackup: EditStackup, refusals: Refusals): UnsavedStackup {
  const keys = new Map(stackup.layers.map((layer) => [layer.key, layer.id ?? layer.key]));
  return {
    version,
    stackup: {
      ...stackup,
      layers: stackup.layers.map((layer) => ({ ...layer, key: keys.get(layer.key) ?? layer.key })),
    },
    refusals: Object.fromEntries(
      Object.entries(refusals).map(([address, refusal]) => {
        const from = [...keys.keys()].find((key) => address.startsWith(`${key}.`));
        return [from ? `${keys.get(from)}${address.slice(from.length)}` : address, refusal];
      }),
    ),
  };
}

/** What was left, on screen again; saving it tells whether somebody else changed the stackup meanwhile. */
export function restored(present: State, { stackup, refusals }: UnsavedStackup): State {
  const { layers } = stackup;
  const selected = layers.some(({ key }) => key === present.selected) ? present.selected : layers[0]?.key;
  return { stackup, refusals: refusalsOf(layers, refusals), selected: selected ?? null };
}
