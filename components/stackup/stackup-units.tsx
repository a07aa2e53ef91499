"use client";

import { createContext, type ReactNode, useContext, useMemo } from "react";
import { useLengthUnit } from "@/components/shell/length-unit";
import type { LengthUnit } from "@/lib/client/preferences";

interface Units {
  /** in which lengths are shown, and bare numbers typed over them are read: this person's choice */
  reader: LengthUnit;
  /** in which the bare numbers of a list are read: the project's */
  project: LengthUnit;
}

const Context = createContext<Units | null>(null);

export function StackupUnits({ project, children }: { project: LengthUnit; children: ReactNode }) {
  const { unit: reader } = useLengthUnit();
  const units = useMemo(() => ({ reader, project }), [reader, project]);
  return <Context.Provider value={units}>{children}</Context.Provider>;
}

export function useStackupUnits(): Units {
  const units = useContext(Context);
  if (!units) throw new Error("The stackup's fields need to know their units.");
  return units;
}
