"use client";

import type { KeyboardEvent, PointerEvent } from "react";
import { quantityText } from "@/lib/drawings/number-text";

interface Props {
  /** of the plot, within its drawing [px] */
  box: { left: number; top: number; right: number; bottom: number };
  span: readonly [number, number];
  time: number | null;
  /** time at a place of the drawing [px] */
  timeAt: (x: number, y: number) => number;
  onCursor: (time: number) => void;
  /** what is read at the cursor */
  reading: string;
  upright?: boolean;
}

/**
 * The cursor of a drawing: a slider over its plot, for pointer and keys. Arrows move a hundredth of the span,
 * with Shift a thousandth; Page keys a tenth; Home and End to its ends.
 */
export function CursorPad({ box, span, time, timeAt, onCursor, reading, upright = false }: Props) {
  const now = time ?? span[0];
  const whole = span[1] - span[0];
  const to = (t: number): void => onCursor(Math.min(Math.max(t, span[0]), span[1]));

  const byKey = (event: KeyboardEvent): void => {
    const step = event.shiftKey ? whole / 1000 : whole / 100;
    const moves: Record<string, number> = {
      ArrowRight: now + step,
      ArrowLeft: now - step,
      ArrowDown: upright ? now + step : now - step,
      ArrowUp: upright ? now - step : now + step,
      PageUp: now - whole / 10,
      PageDown: now + whole / 10,
      Home: span[0],
      End: span[1],
    };
    const move = moves[event.key];
    if (move === undefined) return;
    event.preventDefault();
    to(move);
  };

  const byPointer = (event: PointerEvent<HTMLDivElement>): void => {
    if (event.type === "pointerdown") event.currentTarget.setPointerCapture(event.pointerId);
    else if (event.buttons === 0) return;
    const frame = event.currentTarget.getBoundingClientRect();
    to(timeAt(event.clientX - frame.left + box.left, event.clientY - frame.top + box.top));
  };

  return (
    <div
      role="slider"
      tabIndex={0}
      aria-label="Time of the cursor"
      aria-orientation={upright ? "vertical" : "horizontal"}
      aria-valuemin={span[0] * 1e12}
      aria-valuemax={span[1] * 1e12}
      aria-valuenow={Math.round(now * 1e15) / 1e3}
      aria-valuetext={time === null ? "not set" : `${quantityText(now, "s", { like: span[1] })}. ${reading}`}
      className="absolute cursor-crosshair touch-none print:hidden"
      style={{ left: box.left, top: box.top, width: box.right - box.left, height: box.bottom - box.top }}
      onKeyDown={byKey}
      onPointerDown={byPointer}
      onPointerMove={byPointer}
    />
  );
}
