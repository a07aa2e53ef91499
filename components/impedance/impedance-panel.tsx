"use client";

import { useMemo, useState } from "react";
import { ImpedanceWidth } from "@/components/charts/impedance-width";
import { TraceSection } from "@/components/charts/trace-section";
import { Button } from "@/components/ui/button";
import { SidePanel } from "@/components/ui/side-panel";
import { VerdictMark } from "@/components/ui/verdict-mark";
import type { LengthUnit } from "@/lib/client/preferences";
import type { ResolvedLimit } from "@/lib/si/path/types";
import type { Stackup } from "@/lib/si/stackup";
import { FormsTable } from "./forms-table";
import { lengthDigits } from "./grids";
import { type ImpedanceRow, verdictOf } from "./impedance-rows";
import { LengthSlider } from "./length-slider";
import { ohms, signedPercent } from "./row-words";
import { gapFor, SOUGHT, widthFor } from "./solve-line";
import { trialOf, widthCurve } from "./trial";

interface Props {
  row: ImpedanceRow;
  stackup: Stackup;
  limit: ResolvedLimit | undefined;
  unit: LengthUnit;
  /** [m] */
  grid: number;
  onClose: () => void;
  /** Writes the width into the class; null for those who do not edit. */
  onUse: ((width: number, gap: number | null) => void) | null;
  busy: boolean;
}

/** A width to begin with where neither class nor target gives one [m]; common practice, no source. */
const USUAL_WIDTH = 0.15e-3;

/** One class on one layer: its section to scale, width and gap to try live, the curve, every formula. */
export function ImpedancePanel({ row, stackup, limit, unit, grid, onClose, onUse, busy }: Props) {
  const meeting = row.width0.ok ? row.width0.value.dimension : null;
  const [width, setWidth] = useState(row.width ?? meeting ?? USUAL_WIDTH);
  const [gap, setGap] = useState(row.gap);
  const { index, target, tolerance, netClass, layer } = row;
  const { kind } = netClass;

  const trial = useMemo(() => trialOf(stackup, index, { width, gap }), [stackup, index, width, gap]);
  const search = useMemo(
    () => ({ stackup, index, kind, ohms: target, grid }),
    [stackup, index, kind, target, grid],
  );
  const meets = useMemo(() => widthFor(search, gap), [search, gap]);
  const gapMeets = useMemo(() => (gap === null ? null : gapFor(search, width)), [search, gap, width]);
  const band = useMemo(() => {
    const at = (share: number) => widthFor({ ...search, ohms: target * (1 + share / 100) }, gap);
    return { narrow: at(tolerance), wide: at(-tolerance) };
  }, [search, target, tolerance, gap]);

  const longest = Math.max(
    0.5e-3,
    2.5 * width,
    2.5 * (meets.ok ? meets.value.dimension : 0),
    2 * (row.width ?? 0),
  );
  // In steps, so that the curve's ends do not run away from the slider under one's hand.
  const end = Math.min(SOUGHT.max, Math.ceil(longest / 0.25e-3) * 0.25e-3);
  const points = useMemo(
    () => widthCurve(stackup, index, gap, { from: SOUGHT.min, to: end }, width),
    [stackup, index, gap, end, width],
  );

  const impedance = trial.facts.ok ? trial.facts.value.impedance : null;
  const verdict = verdictOf(netClass, layer, { target, impedance, width, gap, limit });
  const same = width === row.width && ((gap === row.gap && !row.gapAssumed) || gap === null);

  return (
    <SidePanel
      wide
      title={`${netClass.name} on ${layer.name}`}
      onClose={onClose}
      footer={
        onUse ? (
          <>
            <Button disabled={!meets.ok} onClick={() => meets.ok && setWidth(meets.value.dimension)}>
              Set the width that meets
            </Button>
            <Button
              variant="primary"
              busy={busy}
              disabled={same || !trial.facts.ok}
              onClick={() => onUse(width, gap)}
            >
              {same ? "The class has this width" : "Use in class"}
            </Button>
          </>
        ) : undefined
      }
    >
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1" aria-live="polite">
        <p>
          <span className="text-xl font-semibold">{ohms(impedance)}</span>
          <span className="text-ink-soft">
            {"\u2009Ω"}
            {kind === "differential" ? " differential" : ""}
          </span>
        </p>
        <p className="flex items-baseline gap-3 text-sm">
          {impedance === null ? null : (
            <span>
              {signedPercent((100 * (impedance - target)) / target)}
              <span className="text-ink-soft">
                {"\u2009%"} from {Number(target.toFixed(2))}
                {"\u2009Ω"}
              </span>
            </span>
          )}
          <VerdictMark verdict={verdict} />
        </p>
      </div>
      {trial.facts.ok ? (
        <p className="text-ink-soft mt-0.5 text-xs">
          {trial.facts.value.title}, {trial.facts.value.inRange ? "within" : "outside"} its range.{" "}
          {(trial.facts.value.delay * 1e9).toFixed(2)}
          {"\u2009ps/mm"}
          {kind === "differential" ? " (odd mode)" : ""}, effective Dk{" "}
          {trial.facts.value.effectivePermittivity.toFixed(2)}.
        </p>
      ) : (
        <p role="alert" className="text-fail mt-1 text-sm">
          {trial.facts.reason}
        </p>
      )}

      <div className="mt-3 flex flex-col gap-2">
        <LengthSlider
          label="Foot width"
          value={width}
          min={SOUGHT.min}
          max={end}
          step={grid}
          unit={unit}
          onChange={setWidth}
        />
        {gap === null ? null : (
          <LengthSlider
            label="Gap"
            value={gap}
            min={SOUGHT.min}
            max={1e-3}
            step={grid}
            unit={unit}
            onChange={setGap}
          />
        )}
      </div>
      <p className="mt-2 text-sm">
        {meets.ok ? (
          <>
            {lengthDigits(meets.value.dimension, unit)} {unit} {kind === "differential" ? "at this gap " : ""}
            meets the target on the grid ({ohms(meets.value.impedance)} Ω).
          </>
        ) : (
          meets.reason
        )}{" "}
        {gapMeets?.ok ? (
          <>
            So does a gap of {lengthDigits(gapMeets.value.dimension, unit)} {unit} at this width (
            {ohms(gapMeets.value.impedance)} Ω).
          </>
        ) : null}{" "}
        {band.narrow.ok && band.wide.ok ? (
          <span className="text-ink-soft">
            From {lengthDigits(band.narrow.value.dimension, unit)} to{" "}
            {lengthDigits(band.wide.value.dimension, unit)} {unit} the nominal lies within ±{tolerance} %.
          </span>
        ) : null}
      </p>

      {trial.section ? (
        <div className="mt-4">
          <TraceSection
            shape={trial.section}
            unit={unit}
            height={300}
            title={`Cross-section of ${netClass.name} on ${layer.name}`}
          />
        </div>
      ) : null}
      <div className="mt-4">
        <ImpedanceWidth
          points={points}
          unit={unit}
          height={220}
          target={{ ohms: target, tolerance: tolerance / 100 }}
          chosen={width}
        />
      </div>
      {trial.assumptions.length > 0 ? (
        <p className="text-ink-soft mt-3 text-xs">
          Taken for what is not given: {trial.assumptions.join("; ")}.
        </p>
      ) : null}
      <FormsTable forms={trial.forms} kind={kind} />
    </SidePanel>
  );
}
