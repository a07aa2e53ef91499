"use client";

import { useMemo } from "react";
import { bounceCursor, bounceDiagram, type BounceOptions } from "@/lib/drawings/bounce-diagram.geometry";
import type { BounceRay, NodeVoltage } from "@/lib/drawings/bounce-rays";
import type { LineRow } from "@/lib/drawings/line-row";
import { CursorPad } from "./cursor-pad";
import { DrawingSvg } from "./drawing-svg";
import { Sized } from "./sized";

type Props = Omit<BounceOptions, "width"> & {
  row: LineRow;
  rays: readonly BounceRay[];
  voltages: readonly NodeVoltage[];
  width?: number;
  cursorTime?: number | null;
  onCursor?: (time: number) => void;
  onPickRay?: (rayId: string) => void;
};

/** Place across, time down: every wave a ray, the harmful one emphasized. */
export function BounceDiagram({ width, ...props }: Props) {
  return width ? (
    <AtWidth {...props} width={width} />
  ) : (
    <Sized least={420}>{(w) => <AtWidth {...props} width={w} />}</Sized>
  );
}

function AtWidth({
  row,
  rays,
  voltages,
  width,
  height,
  title,
  span,
  unit,
  emphasis,
  cursorTime = null,
  onCursor,
  onPickRay,
}: Props & { width: number }) {
  const [from, to] = span;
  const drawing = useMemo(
    () => bounceDiagram(row, rays, voltages, { width, height, title, span: [from, to], unit, emphasis }),
    [row, rays, voltages, width, height, title, from, to, unit, emphasis],
  );
  return (
    <div className="relative" style={{ width: drawing.width }}>
      <DrawingSvg drawing={drawing} overlay={bounceCursor(drawing, row, cursorTime)} onPick={onPickRay} />
      {onCursor && !drawing.empty ? (
        <CursorPad
          box={drawing.box}
          span={drawing.span}
          time={cursorTime}
          timeAt={(_, y) => drawing.timeAt(y)}
          onCursor={onCursor}
          reading=""
          upright
        />
      ) : null}
    </div>
  );
}
