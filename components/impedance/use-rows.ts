"use client";

import { useEffect, useMemo, useState, useSyncExternalStore } from "react";
import type { Engine } from "@/lib/client/engine";
import type { CellAnswer } from "@/lib/client/engine-impedance";
import type { Outcome } from "@/lib/client/engine-line";
import { type Answered, EngineQueue, type Keyed } from "@/lib/client/engine-queue";
import type { SpreadFacts } from "@/lib/client/engine-spread";
import { type ProcessDoc, usualProcess } from "@/lib/schemas/process";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import type { StoredStackup } from "@/lib/schemas/stackup";
import { EngineError } from "@/lib/si/errors";
import type { ResolvedLimit } from "@/lib/si/path/types";
import type { Capability, Stackup } from "@/lib/si/stackup";
import { capabilityOf } from "@/lib/si/stackup/capability";
import { toSi } from "@/lib/si/units";
import { cellJobOf, type ImpedanceRow, type RowInput, rowInputs, rowOf, spreadJobOf } from "./impedance-rows";

/** Limits of centring and yield by class lineage, then by rule id. */
export type ClassLimits = Readonly<Record<string, Readonly<Record<string, ResolvedLimit>>>>;

interface Inputs {
  engines: { live: Engine; background: Engine };
  /** A panel is open: what is dragged there has the live engine to itself. */
  panelOpen: boolean;
  stackup: StoredStackup;
  si: Stackup;
  classes: readonly StoredNetClass[];
  limits: ClassLimits;
  /** [m] */
  grid: number;
  /** Which rows are solved at all. */
  isWanted: (row: RowInput) => boolean;
}

/** The rows of the table, each filled in as the engine answers. */
export function useRows({
  engines,
  panelOpen,
  stackup,
  si,
  classes,
  limits,
  grid,
  isWanted,
}: Inputs): ImpedanceRow[] {
  const [queue] = useState(() => new EngineQueue([engines.background, engines.live]));
  const known = useSyncExternalStore(queue.subscribe, queue.known, queue.known);
  const process = stackup.process ?? usualProcess;
  const inputs = useMemo(() => rowInputs({ layers: stackup.layers, classes }), [stackup.layers, classes]);
  const asked = useMemo(() => {
    const board = JSON.stringify(si);
    return inputs.map((row) => ({ row, ...jobsOf(row, { si, board, grid, process }) }));
  }, [inputs, si, grid, process]);

  useEffect(() => {
    const wanted = asked.filter(({ row }) => isWanted(row));
    // Every line first: a spread takes longer and says less.
    queue.want(
      [...wanted.map(({ cell }) => cell), ...wanted.flatMap(({ spread }) => spread ?? [])],
      panelOpen ? 1 : 2,
    );
  }, [queue, asked, isWanted, panelOpen]);
  useEffect(() => () => queue.want([]), [queue]);

  const least = useMemo(
    () => new Map(inputs.map(({ index }) => [index, leastOf(si, index, process)])),
    [inputs, si, process],
  );
  return useMemo(
    () =>
      asked.map(({ row, cell, spread }) =>
        rowOf(
          row,
          {
            cell: cellOf(known.get(cell.key)),
            spread: spread && outcomeOf<SpreadFacts>(known.get(spread.key)),
          },
          least.get(row.index) ?? null,
          limits[row.netClass.lineageId] ?? {},
        ),
      ),
    [asked, known, least, limits],
  );
}

function jobsOf(
  row: RowInput,
  { si, board, grid, process }: { si: Stackup; board: string; grid: number; process: ProcessDoc },
): { cell: Keyed; spread: Keyed | null } {
  const cell = cellJobOf(row, si, grid);
  const spread = spreadJobOf(row, si, process);
  const key = (job: object) => JSON.stringify({ ...job, stackup: null }) + board;
  // One target finds the same widths on mirrored layers, whichever class asks.
  const share = `${row.line} ${row.target}`;
  return {
    cell: { key: key(cell), job: cell, share },
    spread: spread && { key: key(spread), job: spread, share },
  };
}

/** A row whose solution stopped says why in its remarks. */
function cellOf(known: Answered | undefined): CellAnswer | undefined {
  if (!known || "answer" in known) return known?.answer as CellAnswer | undefined;
  return { now: null, meets: { ok: false, reason: known.error, reachable: null }, gapMeets: null };
}

function outcomeOf<T>(known: Answered | undefined): Outcome<T> | undefined {
  if (!known || "answer" in known) return known?.answer as Outcome<T> | undefined;
  return { ok: false, reason: known.error, reachable: null };
}

/** null where the layer's copper is not told */
export function leastOf(stackup: Stackup, index: number, process: ProcessDoc): Capability | null {
  const own = (quantity: ProcessDoc["minWidth"]) => (quantity ? toSi(quantity, "length") : null);
  try {
    return capabilityOf(stackup, index, { minWidth: own(process.minWidth), minGap: own(process.minGap) });
  } catch (error) {
    if (error instanceof EngineError) return null;
    throw error;
  }
}
