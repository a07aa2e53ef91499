"use client";

import { Redo2, RotateCcw, Undo2 } from "lucide-react";
import { useId, useState } from "react";
import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { QuantityField } from "@/components/ui/quantity-field";
import { SOUGHT } from "@/lib/client/engine-sought";
import type { LengthUnit } from "@/lib/client/preferences";
import type { TrialSides } from "@/lib/resolve/trial-stackup";
import { toSi } from "@/lib/si/units";
import { lengthDigits } from "./grids";
import { Slide } from "./slide";
import { NO_TRIAL, type TrialAddress } from "./trial-address";
import type { TrialState } from "./use-trial";

interface Props {
  trial: TrialState;
  /** as the stackup has them; null where they cannot be told */
  sides: TrialSides | null;
  unit: LengthUnit;
  /** [m] */
  grid: number;
  /** the end of the width's slider [m] */
  widest: number;
}

/** Width, gap, heights, Dk and mask to try, each by slider and as a number. */
export function TrialControls({ trial, sides, unit, grid, widest }: Props) {
  const { shape, change } = trial;
  const fine = unit === "mm" ? 1e-6 : 2.54e-6;
  const length = (label: string, key: keyof TrialAddress, now: number, range: Range) => (
    <LengthSlide key={key} label={label} value={now} {...range} unit={unit} trial={trial} param={key} />
  );
  const around = (own: number, least: number): Range => ({
    min: Math.max(least, 0.3 * own),
    max: Math.max(2.5 * own, least + fine),
    step: fine,
  });
  return (
    <section aria-label="What is tried" className="mt-3">
      <div className="flex flex-col gap-0.5">
        {length("Foot width", "width", shape.width, { min: SOUGHT.min, max: widest, step: grid })}
        {shape.gap === null
          ? null
          : length("Gap", "gap", shape.gap, { min: SOUGHT.min, max: 1e-3, step: grid })}
        {(["below", "above"] as const).map((place) => {
          const side = sides?.[place];
          if (!side) return null;
          const [height, dk] =
            place === "below" ? (["below", "dkBelow"] as const) : (["above", "dkAbove"] as const);
          return (
            <div key={place} className="contents">
              {length(
                `Height ${place}`,
                height,
                change[height] ?? side.height,
                around(side.height, side.fixed + 1e-5),
              )}
              <DkSlide
                label={`Dk ${place}`}
                value={change[dk] ?? side.dk}
                own={side.dk}
                trial={trial}
                param={dk}
              />
            </div>
          );
        })}
        {sides?.mask
          ? length("Mask over copper", "mask", change.mask ?? sides.mask.overTrace, {
              min: 5e-6,
              max: 60e-6,
              step: fine,
            })
          : null}
      </div>
      <div className="mt-2 flex flex-wrap items-center gap-1">
        <Button variant="quiet" disabled={!trial.undo} onClick={() => trial.undo?.()}>
          <Undo2 size={14} aria-hidden="true" />
          Undo trial
        </Button>
        <Button variant="quiet" disabled={!trial.redo} onClick={() => trial.redo?.()}>
          <Redo2 size={14} aria-hidden="true" />
          Redo trial
        </Button>
        <Button variant="quiet" disabled={!trial.isTried} onClick={() => trial.put(NO_TRIAL)}>
          <RotateCcw size={14} aria-hidden="true" />
          Reset
        </Button>
      </div>
    </section>
  );
}

interface Range {
  min: number;
  max: number;
  step: number;
}

interface LengthProps extends Range {
  label: string;
  value: number;
  unit: LengthUnit;
  trial: TrialState;
  param: keyof TrialAddress;
}

function LengthSlide({ label, value, min, max, step, unit, trial, param }: LengthProps) {
  const id = useId();
  const digits = lengthDigits(value, unit);
  return (
    <Slide
      id={id}
      label={label}
      value={value}
      min={min}
      max={max}
      step={step}
      words={`${digits} ${unit}`}
      onDrag={(metres) => trial.drag({ [param]: metres })}
      onSettle={() => trial.settle()}
    >
      <QuantityField
        label={`${label}, as a number`}
        labelHidden
        dimension="length"
        unit={unit}
        alignRight
        value={{ value: digits, unit }}
        onChange={(quantity) => {
          const metres = quantity ? toSi(quantity, "length") : 0;
          if (metres > 0) trial.put({ [param]: metres });
        }}
      />
    </Slide>
  );
}

const LEAST_DK = 1;
const MOST_DK = 100;

function DkSlide({
  label,
  value,
  own,
  trial,
  param,
}: {
  label: string;
  value: number;
  own: number;
  trial: TrialState;
  param: "dkBelow" | "dkAbove";
}) {
  const id = useId();
  const digits = String(Number(value.toFixed(3)));
  const [text, setText] = useState<string | null>(null);
  const [error, setError] = useState<string | null>(null);
  function read(): void {
    if (text === null) return;
    const dk = Number(text.trim().replace(",", "."));
    if (!(dk >= LEAST_DK && dk <= MOST_DK)) return setError(`A Dk is ${LEAST_DK} (air) to ${MOST_DK}.`);
    setText(null);
    setError(null);
    if (text !== digits) trial.put({ [param]: dk });
  }
  return (
    <Slide
      id={id}
      label={label}
      value={value}
      min={Math.max(LEAST_DK, Math.min(2, own - 0.5))}
      max={Math.max(6, own + 0.5)}
      step={0.01}
      words={digits}
      onDrag={(dk) => trial.drag({ [param]: dk })}
      onSettle={() => trial.settle()}
    >
      <Input
        label={`${label}, as a number`}
        labelHidden
        inputMode="decimal"
        autoComplete="off"
        className="text-right"
        error={error}
        value={text ?? digits}
        data-typing={text !== null && text !== digits ? "" : undefined}
        onFocus={(event) => event.currentTarget.select()}
        onChange={(event) => setText(event.target.value)}
        onBlur={read}
        onKeyDown={(event) => {
          if (event.key === "Enter") read();
          if (event.key === "Escape" && text !== null) {
            event.preventDefault();
            setText(null);
            setError(null);
          }
        }}
      />
    </Slide>
  );
}
