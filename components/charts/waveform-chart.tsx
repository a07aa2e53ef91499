"use client";

import { useMemo } from "react";
import { quantityText, voltsText } from "@/lib/drawings/number-text";
import { voltsAt } from "@/lib/drawings/wave-samples";
import {
  type LimitLine,
  waveformChart,
  waveformCursor,
  type WaveformOptions,
  type WaveProbe,
} from "@/lib/drawings/waveform-chart.geometry";
import { CursorPad } from "./cursor-pad";
import { DrawingSvg } from "./drawing-svg";
import { Sized } from "./sized";

type Props = Omit<WaveformOptions, "width"> & {
  probes: readonly WaveProbe[];
  limits?: readonly LimitLine[];
  width?: number;
  /** [s]; null: no cursor */
  cursorTime?: number | null;
  onCursor?: (time: number) => void;
};

const NO_LIMITS: readonly LimitLine[] = [];

/** Waveforms with limits, violations, a cursor and what is read at it. */
export function WaveformChart({ width, ...props }: Props) {
  return width ? (
    <AtWidth {...props} width={width} />
  ) : (
    <Sized>{(w) => <AtWidth {...props} width={w} />}</Sized>
  );
}

function AtWidth({
  probes,
  limits = NO_LIMITS,
  width,
  height,
  title,
  focus,
  span,
  volts,
  cursorTime = null,
  onCursor,
}: Props & { width: number }) {
  const [from, to] = span ?? [];
  const [low, high] = volts ?? [];
  const drawing = useMemo(
    () =>
      waveformChart(probes, limits, {
        width,
        height,
        title,
        focus,
        span: from === undefined || to === undefined ? undefined : [from, to],
        volts: low === undefined || high === undefined ? undefined : [low, high],
      }),
    [probes, limits, width, height, title, focus, from, to, low, high],
  );
  const readings = probes.map((p) => ({
    id: p.id,
    label: p.label,
    volts: cursorTime === null ? null : voltsAt(p, cursorTime),
  }));
  const reading = readings
    .map((r) => `${r.label} ${r.volts === null ? "no data" : voltsText(r.volts)}`)
    .join(", ");
  return (
    <div className="relative" style={{ width: drawing.width }}>
      <DrawingSvg drawing={drawing} overlay={waveformCursor(drawing, probes, cursorTime)} />
      {onCursor && !drawing.empty ? (
        <CursorPad
          box={drawing.box}
          span={drawing.span}
          time={cursorTime}
          timeAt={drawing.timeAt}
          onCursor={onCursor}
          reading={reading}
        />
      ) : null}
      {/* Its row is kept when there is no cursor, so that nothing jumps. */}
      <dl className="flex min-h-5 flex-wrap gap-x-5 pl-[62px] text-xs" aria-hidden>
        {cursorTime === null || drawing.empty ? null : (
          <>
            <Reading label="Cursor" value={quantityText(cursorTime, "s", { like: drawing.span[1] })} strong />
            {readings.map((r) => (
              <Reading key={r.id} label={r.label} value={r.volts === null ? "no data" : voltsText(r.volts)} />
            ))}
          </>
        )}
      </dl>
    </div>
  );
}

function Reading({ label, value, strong = false }: { label: string; value: string; strong?: boolean }) {
  return (
    <div className="flex gap-1.5 whitespace-nowrap">
      <dt className="text-ink-soft">{label}</dt>
      <dd className={strong ? "min-w-16 font-semibold" : "min-w-14"}>{value}</dd>
    </div>
  );
}
