"use client";

import { StackupSection } from "@/components/charts/stackup-section";
import type { ImpedanceNote } from "@/lib/schemas/release";
import type { SectionLayer } from "@/lib/drawings/stackup-layer";

/** The released stackup to scale, from the note alone. */
export function NoteSection({ layers }: { layers: ImpedanceNote["stackup"] }) {
  return <StackupSection layers={layers.map(drawn)} unit="mm" title="Stackup" />;
}

function drawn(layer: ImpedanceNote["stackup"][number]): SectionLayer {
  return {
    id: layer.name,
    kind: layer.kind as SectionLayer["kind"],
    name: layer.name,
    material: layer.material,
    thickness_m: layer.thickness_m,
    dk: layer.dk === null ? null : Number(layer.dk),
  };
}
