"use client";

import { parseAsString, parseAsStringLiteral, useQueryStates } from "nuqs";
import { useEffect, useRef } from "react";
import { useLengthUnit } from "@/components/shell/length-unit";
import { LENGTH_UNITS, type LengthUnit } from "@/lib/client/preferences";
import { defaultGrid, type GridName, gridNames } from "./grids";
import { trialParsers } from "./trial-address";

export const layerChoices = ["allowed", "all"] as const;
export const verdictChoices = ["any", "off", "yield", "none"] as const;

const parsers = {
  /** the row whose panel is open */
  cell: parseAsString,
  unit: parseAsStringLiteral(LENGTH_UNITS),
  grid: parseAsStringLiteral(gridNames),
  class: parseAsString,
  layers: parseAsStringLiteral(layerChoices).withDefault("allowed"),
  show: parseAsStringLiteral(verdictChoices).withDefault("any"),
  ...trialParsers,
};

/** What the page shows, all of it in the address. Its unit is this person's, unless the address names another. */
export function useImpedanceState() {
  const { unit: own } = useLengthUnit();
  const [state, set] = useQueryStates(parsers, { history: "replace" });
  const unit: LengthUnit = state.unit ?? own;
  const grid: GridName = state.grid ?? defaultGrid[unit];

  // Whoever turns the switch in the header means this page too.
  const before = useRef(own);
  useEffect(() => {
    if (before.current === own) return;
    before.current = own;
    void set({ unit: null, grid: null });
  }, [own, set]);

  return { ...state, unit, grid, set };
}

export type ImpedanceState = ReturnType<typeof useImpedanceState>;
