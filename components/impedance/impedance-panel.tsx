"use client";

import { type KeyboardEvent, useEffect, useId } from "react";
import { Button } from "@/components/ui/button";
import { SidePanel } from "@/components/ui/side-panel";
import type { Engine } from "@/lib/client/engine";
import type { ProcessDoc } from "@/lib/schemas/process";
import type { ResolvedLimit } from "@/lib/si/path/types";
import type { Stackup } from "@/lib/si/stackup";
import { FormsTable } from "./forms-table";
import { lengthDigits } from "./grids";
import type { ImpedanceRow } from "./impedance-rows";
import { ohms } from "./row-words";
import { SectionDrawing } from "./section-drawing";
import { TrialControls } from "./trial-controls";
import { TrialHead } from "./trial-head";
import { TrialNumbers } from "./trial-numbers";
import { LossPlot, WidthPlot } from "./trial-plots";
import { TrialSpread } from "./trial-spread";
import type { ImpedanceState } from "./use-impedance-state";
import { leastOf } from "./use-rows";
import { useInView } from "./use-in-view";
import { useTrial } from "./use-trial";
import { useTrialAnswers } from "./use-trial-answers";

interface Props {
  row: ImpedanceRow;
  stackup: Stackup;
  process: ProcessDoc;
  /** of the class, by rule id */
  limits: Readonly<Record<string, ResolvedLimit>>;
  state: ImpedanceState;
  /** [m] */
  grid: number;
  engines: { live: Engine; background: Engine };
  onClose: () => void;
  /** Writes the width into the class; null for those who do not edit. */
  onUse: ((width: number, gap: number | null) => void) | null;
  busy: boolean;
}

/** One class on one layer: its section to scale, what can be tried of it live, its spread and its plots. */
export function ImpedancePanel(props: Props) {
  const { row, stackup, process, limits, state, grid, engines, onClose, onUse, busy } = props;
  const { unit } = state;
  const { netClass, layer, line } = row;
  const trial = useTrial(row, state);
  const [plotRef, plotSeen] = useInView<HTMLElement>();
  const [lossRef, lossSeen] = useInView<HTMLElement>();
  const answers = useTrialAnswers({
    row,
    stackup,
    process,
    trial,
    grid,
    engines,
    seen: { plot: plotSeen, loss: lossSeen },
  });
  const { tried, field, search, spread, curve, band, loss, sides, refused, widest } = answers;
  const { width, gap } = trial.shape;
  const meets = search.answer?.meets ?? null;
  const same = width === row.width && (gap === null || (gap === row.gap && !row.gapAssumed));
  const around = Object.entries(trial.change).some(
    ([key, value]) => value !== null && key !== "width" && key !== "gap",
  );
  const note = useId();
  // On a narrow screen it takes the table's place, which may have been scrolled far down.
  useEffect(() => {
    if (typeof matchMedia === "function" && !matchMedia("(min-width: 64rem)").matches)
      window.scrollTo({ top: 0 });
  }, []);

  return (
    <div className="contents" onKeyDown={(event) => trialKeys(event, trial.undo, trial.redo)}>
      <SidePanel
        wide
        title={`${netClass.name} on ${layer.name}`}
        onClose={onClose}
        footer={
          onUse ? (
            <>
              {around ? (
                <p id={note} className="text-ink-soft w-full text-xs">
                  Heights, Dk and mask are only tried here: the stackup page holds them. The class takes width
                  {gap === null ? "" : " and gap"}.
                </p>
              ) : null}
              <Button
                disabled={!meets?.ok}
                onClick={() => meets?.ok && trial.put({ width: meets.value.dimension })}
              >
                Set the width that meets
              </Button>
              <Button
                variant="primary"
                busy={busy}
                disabled={same || !tried.answer?.facts.ok}
                aria-describedby={around ? note : undefined}
                onClick={() => onUse(width, gap)}
              >
                {same ? "The class has this width" : "Use in class"}
              </Button>
            </>
          ) : undefined
        }
      >
        <TrialHead
          row={row}
          shape={trial.shape}
          trial={tried.answer}
          spread={spread.answer}
          limits={limits}
          error={tried.error ?? refused}
        />
        <SectionDrawing
          trial={tried.answer}
          field={field.answer?.ok ? field.answer.value : null}
          unit={unit}
          title={`Cross-section of ${netClass.name} on ${layer.name}`}
          fileName={`${netClass.name} on ${layer.name} section`}
        />
        <TrialControls trial={trial} sides={sides} unit={unit} grid={grid} widest={widest} />
        <p className="mt-2 min-h-10 text-sm">
          {meets === null ? (
            "…"
          ) : meets.ok ? (
            <>
              {lengthDigits(meets.value.dimension, unit)} {unit}{" "}
              {line === "differential" ? "at this gap " : ""}
              meets the target on the grid ({ohms(meets.value.impedance)} Ω).
            </>
          ) : (
            meets.reason
          )}{" "}
          {search.answer?.gapMeets?.ok ? (
            <>
              So does a gap of {lengthDigits(search.answer.gapMeets.value.dimension, unit)} {unit} at this
              width ({ohms(search.answer.gapMeets.value.impedance)} Ω).
            </>
          ) : null}{" "}
          {search.answer?.band ? (
            <span className="text-ink-soft">
              From {lengthDigits(search.answer.band.narrow, unit)} to{" "}
              {lengthDigits(search.answer.band.wide, unit)} {unit} the nominal lies within ±{row.tolerance} %.
            </span>
          ) : null}
        </p>
        <TrialNumbers trial={tried.answer} unit={unit} />
        <TrialSpread row={row} spread={spread.answer} error={spread.error} />
        <WidthPlot
          ref={plotRef}
          row={row}
          unit={unit}
          grid={grid}
          chosen={width}
          points={curve.answer}
          band={band.answer}
          least={leastOf(stackup, row.index, process)}
        />
        <LossPlot ref={lossRef} row={row} unit={unit} loss={loss.answer} error={loss.error} />
        {tried.answer && tried.answer.assumptions.length > 0 ? (
          <p className="text-ink-soft mt-3 text-xs">
            Taken for what is not given: {tried.answer.assumptions.join("; ")}.
          </p>
        ) : null}
        <FormsTable
          forms={tried.answer?.forms ?? []}
          kind={line}
          field={tried.answer?.facts.ok ? tried.answer.facts.value.impedance : null}
        />
      </SidePanel>
    </div>
  );
}

/** Ctrl+Z and Ctrl+Shift+Z are the trials' own while the panel has the focus and there is something to go back to. */
function trialKeys(event: KeyboardEvent, undo: (() => void) | null, redo: (() => void) | null): void {
  if (event.key.toLowerCase() !== "z" || !(event.ctrlKey || event.metaKey) || event.altKey) return;
  if ((event.target as HTMLElement).closest("[data-typing]")) return;
  const act = event.shiftKey ? redo : undo;
  if (!act) return;
  event.preventDefault();
  event.stopPropagation();
  act();
}
