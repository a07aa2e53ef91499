"use client";

import { Pause, Play, StepBack, StepForward } from "lucide-react";
import { Button } from "@/components/ui/button";
import { quantityText } from "@/lib/drawings/number-text";
import { RATES } from "@/lib/drawings/playback";
import type { PlaybackControl } from "./use-playback";

const TICKS = 1000;

/** Plays, steps and scrubs the cursor that the drawings share. */
export function PlaybackBar({ control }: { control: PlaybackControl }) {
  const { start, end, time, playing, rate, still } = control;
  const whole = end - start;
  const share = whole > 0 ? (time - start) / whole : 0;
  const reading = quantityText(time, "s", { like: Math.max(Math.abs(end), Math.abs(start)) });
  return (
    <div
      role="group"
      aria-label="Playback"
      className="flex flex-wrap items-center gap-2 text-sm print:hidden"
    >
      <Button
        variant="quiet"
        size="icon"
        aria-label="Step back"
        onClick={() => control.step(-1)}
        disabled={whole <= 0}
      >
        <StepBack size={16} aria-hidden />
      </Button>
      {still ? null : (
        <Button
          size="icon"
          aria-label={playing ? "Pause" : "Play"}
          onClick={control.toggle}
          disabled={whole <= 0}
        >
          {playing ? <Pause size={16} aria-hidden /> : <Play size={16} aria-hidden />}
        </Button>
      )}
      <Button
        variant="quiet"
        size="icon"
        aria-label="Step on"
        onClick={() => control.step(1)}
        disabled={whole <= 0}
      >
        <StepForward size={16} aria-hidden />
      </Button>
      <input
        type="range"
        className="accent-copper h-8 min-w-24 grow"
        aria-label="Time of the cursor"
        aria-valuetext={reading}
        min={0}
        max={TICKS}
        value={Math.round(share * TICKS)}
        disabled={whole <= 0}
        onChange={(event) => control.seek(start + (Number(event.target.value) / TICKS) * whole)}
      />
      <output className="min-w-20 text-right tabular-nums">{reading}</output>
      {still ? null : (
        <label className="text-ink-soft flex items-center gap-1.5">
          Speed
          <select
            className="border-field-line bg-sheet text-ink h-8 rounded border px-2"
            value={rate}
            onChange={(event) => control.setRate(Number(event.target.value))}
          >
            {RATES.map((r) => (
              <option key={r} value={r}>
                {r}×
              </option>
            ))}
          </select>
        </label>
      )}
    </div>
  );
}
