"use client";

import { createContext, type ReactNode, useContext, useMemo, useState } from "react";
import { choosePreference } from "@/lib/client/own-preferences";
import type { LengthUnit } from "@/lib/client/preferences";

interface LengthUnitState {
  unit: LengthUnit;
  setUnit: (unit: LengthUnit) => void;
}

const Context = createContext<LengthUnitState | null>(null);

/** Holds the length unit of this person (mm or mil) for every table and drawing below. */
export function LengthUnitProvider({ initial, children }: { initial: LengthUnit; children: ReactNode }) {
  const [unit, setState] = useState(initial);
  const value = useMemo(
    () => ({
      unit,
      setUnit: (next: LengthUnit) => {
        void choosePreference({ lengthUnit: next });
        setState(next);
      },
    }),
    [unit],
  );
  return <Context value={value}>{children}</Context>;
}

/** The unit in which this person reads lengths, and how to change it. */
export function useLengthUnit(): LengthUnitState {
  const state = useContext(Context);
  if (!state) throw new Error("useLengthUnit needs a LengthUnitProvider above it.");
  return state;
}
