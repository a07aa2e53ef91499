"use client";

import { ChevronDown } from "lucide-react";
import { Button } from "@/components/ui/button";
import { Menu, MenuItem, MenuSeparator } from "@/components/ui/menu";
import type { LayerKind, StackupLayerDoc } from "@/lib/schemas/stackup";
import { copperFoils, dielectricFamilies, foilTreatments } from "@/lib/si/materials";
import { fromSi } from "@/lib/si/units";

type Pick = (values: Partial<StackupLayerDoc>) => void;

/** Typical values of a family of dielectrics, marked as assumed: the data sheet decides. */
export function MaterialMenu({ kind, onPick }: { kind: LayerKind; onPick: Pick }) {
  const families = dielectricFamilies.filter(({ use }) =>
    kind === "mask" ? use !== "laminate" : use !== "mask",
  );
  return (
    <Menu
      align="end"
      trigger={
        <Button>
          Fill in a material
          <ChevronDown size={14} aria-hidden="true" />
        </Button>
      }
    >
      <p className="text-ink-soft px-2 py-1 text-xs">Typical values; the laminate’s data sheet decides.</p>
      {families.map((family) => (
        <MenuItem
          key={family.id}
          onSelect={() =>
            onPick({
              material: family.name,
              dk: family.dk,
              df: family.df,
              dkFrequency: fromSi(family.frequency, "GHz"),
              origin: "assumed",
            })
          }
        >
          <span className="flex-1">{family.name}</span>
          <span className="text-ink-soft ml-6 text-xs">
            Dk {family.dk}, Df {family.df} at {family.frequency / 1e9} GHz
          </span>
        </MenuItem>
      ))}
    </Menu>
  );
}

/** Foils by weight and roughness by treatment. */
export function FoilMenu({ onPick }: { onPick: Pick }) {
  return (
    <Menu
      align="end"
      trigger={
        <Button>
          Fill in a foil
          <ChevronDown size={14} aria-hidden="true" />
        </Button>
      }
    >
      {copperFoils.map((foil) => (
        <MenuItem key={foil.name} onSelect={() => onPick({ baseFoil: foil.weight })}>
          <span className="flex-1">{foil.name}</span>
          <span className="text-ink-soft ml-6 text-xs">{Math.round(foil.gramsPerSquareMetre)} g/m²</span>
        </MenuItem>
      ))}
      <MenuSeparator />
      <p className="text-ink-soft px-2 py-1 text-xs">Roughness, typical</p>
      {foilTreatments.map((treatment) => (
        <MenuItem
          key={treatment.id}
          onSelect={() => onPick({ roughness: fromSi(treatment.roughness, "µm") })}
        >
          <span className="flex-1">{treatment.name}</span>
          <span className="text-ink-soft ml-6 text-xs">{fromSi(treatment.roughness, "µm").value} µm</span>
        </MenuItem>
      ))}
    </Menu>
  );
}
