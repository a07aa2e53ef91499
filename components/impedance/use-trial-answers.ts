"use client";

import { useMemo, useState } from "react";
import type { Engine } from "@/lib/client/engine";
import type { CurveJob, SearchJob, TrialJob } from "@/lib/client/engine-impedance";
import type { FieldJob } from "@/lib/client/engine-field";
import type { LossJob } from "@/lib/client/engine-loss";
import { SOUGHT } from "@/lib/client/engine-sought";
import type { BandJob, SpreadJob } from "@/lib/client/engine-spread";
import { useEngine } from "@/lib/client/use-engine";
import { sectionWindow } from "@/lib/drawings/trace-placement";
import { trialSides, type TrialSides, trialStackup } from "@/lib/resolve/trial-stackup";
import type { ProcessDoc } from "@/lib/schemas/process";
import { EngineError } from "@/lib/si/errors";
import type { Stackup } from "@/lib/si/stackup";
import type { ImpedanceRow } from "./impedance-rows";
import { SECTION_SIZES } from "./section-drawing";
import type { TrialState } from "./use-trial";

interface Inputs {
  row: ImpedanceRow;
  stackup: Stackup;
  process: ProcessDoc;
  trial: TrialState;
  /** [m] */
  grid: number;
  engines: { live: Engine; background: Engine };
  /** What takes longest is not asked for until it is looked at. */
  seen: { plot: boolean; loss: boolean };
}

/** Everything shown of a trial: its line live, the rest once the hand rests. */
export function useTrialAnswers({ row, stackup, process, trial, grid, engines, seen }: Inputs) {
  const { index, line, target, tolerance } = row;
  const { dragging } = trial;
  const { width, gap } = trial.shape;
  const { below, above, dkBelow, dkAbove, mask } = trial.change;

  const sides = useMemo(() => sidesOf(stackup, index), [stackup, index]);
  const { stackup: changed, refused } = useMemo(
    () => changedStackup(stackup, index, { below, above, dkBelow, dkAbove, mask }),
    [stackup, index, below, above, dkBelow, dkAbove, mask],
  );
  const shape = useMemo(() => ({ width, gap }), [width, gap]);
  const trialJob = useMemo(
    (): TrialJob => ({
      kind: "line-trial",
      stackup: changed,
      index,
      shape,
      accuracy: dragging ? "live" : "standard",
    }),
    [changed, index, shape, dragging],
  );
  const tried = useEngine(engines.live, trialJob);

  const section = dragging ? null : (tried.answer?.section ?? null);
  const fieldJob = useMemo((): FieldJob | null => {
    const window = section && sectionWindow(section, SECTION_SIZES);
    return window && { kind: "line-field", section, window };
  }, [section]);
  const field = useEngine(engines.background, fieldJob);

  // The end of the slider and of the curve moves in steps, so that it does not run away from under one's hand.
  const meetsAt = row.meets?.ok ? row.meets.value.dimension : 0;
  const longest = Math.max(0.5e-3, 2.5 * width, 2.5 * meetsAt, 2 * (row.width ?? 0));
  const stepped = Math.min(SOUGHT.max, Math.ceil(longest / 0.25e-3) * 0.25e-3);
  const widest = useSettled(stepped, !dragging);

  const curveJob = useMemo(
    (): CurveJob => ({ kind: "line-curve", stackup: changed, index, gap, from: SOUGHT.min, to: widest }),
    [changed, index, gap, widest],
  );
  const curve = useEngine(engines.background, curveJob);

  const searchJob = useSettled(
    useMemo(
      (): SearchJob => ({
        kind: "line-search",
        stackup: changed,
        index,
        line,
        ohms: target,
        tolerance,
        grid,
        shape,
      }),
      [changed, index, line, target, tolerance, grid, shape],
    ),
    !dragging,
  );
  const search = useEngine(engines.background, searchJob);

  const spreadJob = useSettled(
    useMemo(
      (): SpreadJob => ({
        kind: "line-spread",
        stackup: changed,
        index,
        shape,
        process,
        ohms: target,
        tolerance,
      }),
      [changed, index, shape, process, target, tolerance],
    ),
    !dragging,
  );
  const spread = useEngine(engines.background, spreadJob);

  const bandJob = useSettled(
    useMemo(
      (): BandJob => ({
        kind: "line-band",
        stackup: changed,
        index,
        gap,
        process,
        from: SOUGHT.min,
        to: widest,
      }),
      [changed, index, gap, process, widest],
    ),
    !dragging,
  );
  const band = useEngine(engines.background, seen.plot ? bandJob : null);
  const lossJob = useSettled(
    useMemo((): LossJob => ({ kind: "line-loss", stackup: changed, index, shape }), [changed, index, shape]),
    !dragging,
  );
  const loss = useEngine(engines.background, seen.loss ? lossJob : null);
  return { sides, refused, widest, tried, field, curve, search, spread, band, loss };
}

/** The value as it was when the hand last rested. */
function useSettled<T>(value: T, settled: boolean): T {
  const [kept, keep] = useState(value);
  if (settled && kept !== value) keep(value);
  return settled ? value : kept;
}

function sidesOf(stackup: Stackup, index: number): TrialSides | null {
  try {
    return trialSides(stackup, index);
  } catch (error) {
    if (error instanceof EngineError) return null;
    throw error;
  }
}

/** A change that cannot be leaves the stackup as it is, and says why. */
function changedStackup(...[stackup, index, change]: Parameters<typeof trialStackup>): {
  stackup: Stackup;
  refused: string | null;
} {
  try {
    return { stackup: trialStackup(stackup, index, change), refused: null };
  } catch (error) {
    if (error instanceof EngineError) return { stackup, refused: error.message };
    throw error;
  }
}
