"use client";

import { Select } from "@/components/ui/select";
import { LENGTH_UNITS, parseLengthUnit } from "@/lib/client/preferences";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import { type GridName, gridNames } from "./grids";
import { type ImpedanceState, layerChoices, verdictChoices } from "./use-impedance-state";

const LAYER_WORDS = { allowed: "allowed by the class", all: "every signal layer" } as const;
const SHOW_WORDS = { any: "all", off: "off target", yield: "low yield", none: "without a width" } as const;

/** Which rows, on which grid, in which unit. */
export function FilterBar({ state, classes }: { state: ImpedanceState; classes: readonly StoredNetClass[] }) {
  const { set } = state;
  return (
    <div className="mb-3 grid grid-cols-2 gap-3 sm:flex sm:flex-wrap print:hidden">
      <Select
        label="Class"
        fieldClassName="sm:w-36"
        value={state.class ?? ""}
        placeholder="all classes"
        options={classes.map(({ lineageId, name }) => ({ value: lineageId, label: name }))}
        onChange={(event) => void set({ class: event.target.value || null })}
      />
      <Select
        label="Layers"
        fieldClassName="sm:w-40"
        value={state.layers}
        options={layerChoices.map((value) => ({ value, label: LAYER_WORDS[value] }))}
        onChange={(event) =>
          void set({ layers: layerChoices.find((value) => value === event.target.value) ?? null })
        }
      />
      <Select
        label="Rows"
        fieldClassName="sm:w-28"
        value={state.show}
        options={verdictChoices.map((value) => ({ value, label: SHOW_WORDS[value] }))}
        onChange={(event) =>
          void set({ show: verdictChoices.find((value) => value === event.target.value) ?? null })
        }
      />
      <Select
        label="Grid of widths"
        fieldClassName="sm:w-[104px]"
        value={state.grid}
        options={gridNames.map((value) => ({ value, label: value }))}
        onChange={(event) => void set({ grid: event.target.value as GridName })}
      />
      <Select
        label="Unit"
        fieldClassName="sm:w-[76px]"
        value={state.unit}
        options={LENGTH_UNITS.map((value) => ({ value, label: value }))}
        onChange={(event) => void set({ unit: parseLengthUnit(event.target.value) })}
      />
    </div>
  );
}
