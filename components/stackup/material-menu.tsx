"use client";

import { useQuery } from "@tanstack/react-query";
import { ChevronDown } from "lucide-react";
import { Fragment, type ReactNode } from "react";
import { Button } from "@/components/ui/button";
import { Menu, MenuItem, MenuSeparator } from "@/components/ui/menu";
import { materialsQuery } from "@/lib/client/materials";
import type { StackupLayerDoc } from "@/lib/schemas/stackup";
import { genericMaterials, type LibraryMaterial, type MaterialKind } from "@/lib/si/materials";
import { isCopper } from "@/lib/si/stackup";
import { convert, formatQuantity } from "@/lib/si/units";
import { fillIn, materialKindsOf } from "./fill-in";

const HEADINGS: Record<MaterialKind, string> = {
  laminate: "Generic laminates, typical",
  prepreg: "Generic plies by glass style",
  foil: "Foils by weight, roughness by profile",
  mask: "Generic masks, typical",
};

interface Props {
  layer: StackupLayerDoc;
  onPick: (values: Partial<StackupLayerDoc>) => void;
}

/** Fills a layer in from a material, with the note of its source: the team's own first, then the generic library. */
export function MaterialMenu({ layer, onPick }: Props) {
  const kinds = materialKindsOf(layer);
  const { data, isError } = useQuery(materialsQuery());
  const own = kinds.flatMap((wanted) => data?.filter(({ kind }) => kind === wanted) ?? []);
  return (
    <Menu
      align="end"
      trigger={
        <Button>
          {isCopper(layer) ? "Fill in a foil" : "Fill in a material"}
          <ChevronDown size={14} aria-hidden="true" />
        </Button>
      }
    >
      <Heading>The team’s own</Heading>
      {own.length === 0 ? (
        <Heading>
          {isError
            ? "They could not be read. Close this and open it again."
            : data
              ? "None of this kind yet. Add them on the page Materials."
              : "Reading them…"}
        </Heading>
      ) : (
        own.map((entry) => (
          <Entry
            key={entry.id}
            material={entry}
            onSelect={() => onPick(fillIn(layer, entry, entry.origin))}
          />
        ))
      )}
      {kinds.map((wanted) => (
        <Fragment key={wanted}>
          <MenuSeparator />
          <Heading>{HEADINGS[wanted]}; the data sheet decides</Heading>
          {genericMaterials
            .filter(({ kind }) => kind === wanted)
            .map((entry) => (
              <Entry
                key={entry.name}
                material={entry}
                onSelect={() => onPick(fillIn(layer, entry, "assumed"))}
              />
            ))}
        </Fragment>
      ))}
    </Menu>
  );
}

function Heading({ children }: { children: ReactNode }) {
  return <p className="text-ink-soft px-2 py-1 text-xs">{children}</p>;
}

function Entry({ material, onSelect }: { material: LibraryMaterial; onSelect: () => void }) {
  return (
    <MenuItem onSelect={onSelect}>
      <span className="flex min-w-0 flex-1 flex-col py-1 sm:flex-row sm:items-baseline sm:justify-between sm:gap-6 sm:py-0">
        <span>{material.name}</span>
        <span className="text-ink-soft text-xs">{factsOf(material)}</span>
      </span>
    </MenuItem>
  );
}

/** "Dk 4.1, Df 0.019 at 1 GHz, 120 µm" */
function factsOf({ dk, df, frequency, thickness, roughness, kind }: LibraryMaterial): string {
  const at = frequency ? ` at ${convert(frequency, "GHz").value} GHz` : "";
  return [
    dk ? `Dk ${dk}${df ? `, Df ${df}` : ""}${at}` : null,
    thickness ? formatQuantity(kind === "foil" ? convert(thickness, "µm") : thickness) : null,
    roughness ? `${formatQuantity(roughness)} rms` : null,
  ]
    .filter(Boolean)
    .join(", ");
}
