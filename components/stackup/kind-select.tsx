"use client";

import { cn } from "@/components/ui/class-names";
import { controlClasses } from "@/components/ui/field";
import { type LayerKind, layerKinds } from "@/lib/schemas/stackup";
import { useStackupFields } from "./stackup-fields";

interface Props {
  label: string;
  labelHidden?: boolean;
  kind: LayerKind;
  onChange: (kind: LayerKind) => void;
}

/** What a layer is; in a table it looks like text until one points at it. */
export function KindSelect({ label, kind, onChange }: Props) {
  const { readOnly } = useStackupFields();
  if (readOnly) return <span className="block px-2">{kind}</span>;
  return (
    <select
      aria-label={label}
      value={kind}
      onChange={(event) => onChange(event.target.value as LayerKind)}
      className={cn(
        controlClasses,
        "hover:border-field-line focus:border-field-line focus:bg-sheet h-7 border-transparent bg-transparent px-1",
      )}
    >
      {layerKinds.map((option) => (
        <option key={option}>{option}</option>
      ))}
    </select>
  );
}
