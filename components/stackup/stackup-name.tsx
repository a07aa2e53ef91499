"use client";

import { stackupDoc } from "@/lib/schemas/stackup";
import { FieldText, useStackupFields } from "./stackup-fields";

/** The stackup's own name. */
export function StackupName({ name, onRename }: { name: string; onRename: (name: string) => void }) {
  const { readOnly } = useStackupFields();
  if (readOnly) return <p className="text-base font-semibold">{name}</p>;
  return (
    <FieldText
      className="w-72 max-w-full pb-2"
      label="Name of the stackup"
      labelHidden
      address="name"
      typed={name}
      shown={name}
      commit={(text) => {
        const parsed = stackupDoc.shape.name.safeParse(text);
        if (!parsed.success) throw new Error(parsed.error.issues[0]?.message ?? "Give it a name.");
        onRename(parsed.data);
      }}
    />
  );
}
