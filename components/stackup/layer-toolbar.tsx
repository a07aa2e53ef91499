"use client";

import { ArrowDown, ArrowUp, ChevronDown, CopyPlus, FlipVertical2, Trash2 } from "lucide-react";
import { Button } from "@/components/ui/button";
import { Menu, MenuItem } from "@/components/ui/menu";
import { type LayerKind, layerKinds } from "@/lib/schemas/stackup";
import { duplicateLayer, insertLayer, mirrorLayers, moveLayer, newLayer } from "./layer-edits";
import type { StackupEditor } from "./use-stackup-editor";

interface Props {
  editor: StackupEditor;
  onSaid: (message: string) => void;
  onRemove: (key: string) => void;
}

/** What can be done to the chosen layer and to all of them. */
export function LayerToolbar({ editor, onSaid, onRemove }: Props) {
  const { layers } = editor.stackup;
  const at = layers.findIndex(({ key }) => key === editor.selected);
  const layer = layers[at];

  function add(kind: LayerKind, place: number): void {
    const key = crypto.randomUUID();
    editor.changeLayers((present) => insertLayer(present, place, newLayer(kind, present, key)), key);
    onSaid(`A ${kind} layer was added as layer ${place + 1}.`);
  }
  function move(step: -1 | 1): void {
    if (!layer) return;
    editor.changeLayers((present) => moveLayer(present, layer.key, step), layer.key);
    onSaid(`${layer.name} is now layer ${at + step + 1} of ${layers.length}.`);
  }

  return (
    <div role="toolbar" aria-label="Layers" className="flex flex-wrap gap-1 py-2 print:hidden">
      <AddMenu label="Add above" onPick={(kind) => add(kind, Math.max(at, 0))} />
      <AddMenu label="Add below" onPick={(kind) => add(kind, at < 0 ? layers.length : at + 1)} />
      <Button
        size="icon"
        aria-label="Move the layer up"
        title="Move up (Alt ↑)"
        disabled={at <= 0}
        onClick={() => move(-1)}
      >
        <ArrowUp size={14} aria-hidden="true" />
      </Button>
      <Button
        size="icon"
        aria-label="Move the layer down"
        title="Move down (Alt ↓)"
        disabled={at < 0 || at === layers.length - 1}
        onClick={() => move(1)}
      >
        <ArrowDown size={14} aria-hidden="true" />
      </Button>
      <Button
        disabled={!layer}
        onClick={() => {
          const key = crypto.randomUUID();
          if (layer) editor.changeLayers((present) => duplicateLayer(present, layer.key, key), key);
        }}
      >
        <CopyPlus size={14} aria-hidden="true" />
        Duplicate
      </Button>
      <Button disabled={!layer} onClick={() => layer && onRemove(layer.key)}>
        <Trash2 size={14} aria-hidden="true" />
        Remove
      </Button>
      <Button
        disabled={layers.length < 2}
        title="Builds the lower half as the mirror of the upper one; names and nets stay"
        onClick={() => {
          editor.changeLayers(mirrorLayers);
          onSaid("The lower half is now built as the mirror of the upper one.");
        }}
      >
        <FlipVertical2 size={14} aria-hidden="true" />
        Mirror
      </Button>
    </div>
  );
}

function AddMenu({ label, onPick }: { label: string; onPick: (kind: LayerKind) => void }) {
  return (
    <Menu
      trigger={
        <Button>
          {label}
          <ChevronDown size={14} aria-hidden="true" />
        </Button>
      }
    >
      {layerKinds.map((kind) => (
        <MenuItem key={kind} onSelect={() => onPick(kind)}>
          {kind}
        </MenuItem>
      ))}
    </Menu>
  );
}
