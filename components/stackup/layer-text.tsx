"use client";

import type { ReactNode } from "react";
import type { StackupLayerDoc } from "@/lib/schemas/stackup";
import type { EditLayer } from "./edit-layer";
import { bareUnit, type LayerField, readLayerField, shownText, typedText } from "./layer-field-text";
import { FieldText } from "./stackup-fields";
import { useStackupUnits } from "./stackup-units";

interface Props {
  layer: EditLayer;
  field: LayerField;
  label: string;
  onChange: (key: string, change: Partial<StackupLayerDoc>) => void;
  /** Roughness and the like: shown in µm to those who read mm. */
  small?: boolean;
  hint?: ReactNode;
  suggestions?: readonly string[];
  inTable?: boolean;
  alignRight?: boolean;
  placeholder?: string;
  className?: string;
}

/** One field of a layer, as text with its unit. */
export function LayerText({ layer, field, label, onChange, small = false, inTable, ...look }: Props) {
  const { reader } = useStackupUnits();
  const unit = small && reader === "mm" ? "µm" : reader;
  return (
    <FieldText
      {...look}
      inTable={inTable}
      label={inTable ? `${label} of ${layer.name}` : label}
      address={`${layer.key}.${field}`}
      typed={typedText(layer, field, unit)}
      shown={shownText(layer, field, unit)}
      commit={(text) => onChange(layer.key, readLayerField(field, text, bareUnit(layer, field, unit)))}
    />
  );
}
