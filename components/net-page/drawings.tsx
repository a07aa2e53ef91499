"use client";

import { useMemo, type ReactNode } from "react";
import { AlongLine } from "@/components/charts/along-line";
import { BounceDiagram } from "@/components/charts/bounce-diagram";
import { ExportMenu } from "@/components/charts/export-menu";
import type { PlaybackControl } from "@/components/charts/use-playback";
import { WaveformChart } from "@/components/charts/waveform-chart";
import { useLengthUnit } from "@/components/shell/length-unit";
import type { PathPicture } from "@/lib/client/engine-jobs";
import { quantityText } from "@/lib/drawings/number-text";
import { alongDrawing, alongRows, bounceDrawing, bounceRows, waveDrawing, waveRows } from "./exports";
import { DrawingPanel } from "./drawing-panel";
import { bounceSpan, emphasisOf, type PictureView, pictureView } from "./picture-view";

interface Props {
  picture: PathPicture | null;
  before: PathPicture | null;
  error: string | null;
  pin: string | null;
  rule: string | null;
  edge: "rise" | "fall";
  /** of the finding, where it is what is shown [s] */
  harmTime: number | null;
  control: PlaybackControl;
  fileName: string;
  /** stand below the waveforms and below the bounces */
  left?: ReactNode;
  right?: ReactNode;
}

const STEP_HEIGHTS = "Heights are those of a step; an edge longer than a trip smooths them.";
const WAVES = 320;
const BOUNCES = 400;
const ALONG = 240;

/** Waveforms, bounces and the voltage along the line, under one cursor. */
export function Drawings({
  picture,
  before,
  error,
  pin,
  rule,
  edge,
  harmTime,
  control,
  fileName,
  left,
  right,
}: Props) {
  const { unit } = useLengthUnit();
  const view = useMemo(() => (picture ? pictureView(picture, pin, before) : null), [picture, pin, before]);
  const emphasis = useMemo(
    () =>
      picture && view && rule
        ? emphasisOf(view, picture.waveforms, { rule, edge, pin, time: harmTime })
        : null,
    [picture, view, rule, edge, pin, harmTime],
  );
  const [from, to] = view?.span ?? [0, 1];
  const span = useMemo((): [number, number] => [from, to], [from, to]);
  const cursor = control.time;
  const [first, last] = view ? bounceSpan(view, cursor) : [0, 1];
  const page = useMemo((): [number, number] => [first, last], [first, last]);
  if (error)
    return (
      <p role="alert" className="border-fail text-fail border p-4 text-sm">
        {error}
      </p>
    );
  return (
    <div className="grid gap-x-6 gap-y-4 xl:grid-cols-[minmax(0,7fr)_minmax(0,6fr)]">
      <div className="flex min-w-0 flex-col gap-4">
        <DrawingPanel
          title="Waveforms"
          height={WAVES}
          actions={view && <Export view={view} kind="waves" {...{ fileName, pin, emphasis, unit, cursor }} />}
        >
          {view ? (
            <WaveformChart
              probes={view.probes}
              limits={view.limits}
              focus={pin ?? undefined}
              span={span}
              height={WAVES}
              cursorTime={cursor}
              onCursor={control.seek}
            />
          ) : null}
        </DrawingPanel>
        {left}
      </div>
      <div className="flex min-w-0 flex-col gap-4">
        <DrawingPanel
          title="Bounces"
          height={BOUNCES}
          note={[view && shownPart(page, span), STEP_HEIGHTS, view?.leftOut].filter(Boolean).join(" ")}
          actions={
            view?.row && <Export view={view} kind="bounces" {...{ fileName, pin, emphasis, unit, cursor }} />
          }
        >
          {view?.row && !view.refused ? (
            <BounceDiagram
              row={view.row}
              rays={view.rays}
              voltages={view.voltages}
              span={page}
              unit={unit}
              height={BOUNCES}
              emphasis={emphasis}
              cursorTime={cursor}
              onCursor={control.seek}
            />
          ) : view ? (
            <p className="text-ink-soft p-2 text-sm">
              {view.refused ?? "No line leads from the driver to this pin."}
            </p>
          ) : null}
        </DrawingPanel>
        <DrawingPanel
          title="Along the line at the cursor"
          height={ALONG}
          actions={
            view?.row && <Export view={view} kind="along" {...{ fileName, pin, emphasis, unit, cursor }} />
          }
        >
          {view?.row && view.waves ? (
            <AlongLine
              row={view.row}
              waves={view.waves}
              span={span}
              unit={unit}
              height={ALONG}
              cursorTime={cursor}
            />
          ) : null}
        </DrawingPanel>
        {right}
      </div>
    </div>
  );
}

function shownPart([from, to]: [number, number], [, end]: [number, number]): string | null {
  if (from === 0 && to >= end) return null;
  const like = { like: end };
  return `Shown: ${quantityText(from, "s", like)} to ${quantityText(to, "s", like)} of ${quantityText(end, "s", like)}; it turns the page with the cursor.`;
}

interface ExportProps {
  view: PictureView;
  kind: "waves" | "bounces" | "along";
  fileName: string;
  pin: string | null;
  emphasis: string | null;
  unit: "mm" | "mil";
  cursor: number;
}

function Export({ view, kind, fileName, ...look }: ExportProps) {
  const name = `${fileName} ${kind === "waves" ? "waveforms" : kind === "bounces" ? "bounces" : "along the line"}`;
  const drawing = kind === "waves" ? waveDrawing : kind === "bounces" ? bounceDrawing : alongDrawing;
  const rows = kind === "waves" ? waveRows : kind === "bounces" ? bounceRows : alongRows;
  return <ExportMenu fileName={name} drawing={() => drawing(view, look)} rows={() => rows(view, look)} />;
}
