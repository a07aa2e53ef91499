"use client";

import { useMemo } from "react";
import type { SectionLayer } from "@/lib/drawings/stackup-layer";
import { stackupSection, type StackupSectionOptions } from "@/lib/drawings/stackup-section.geometry";
import { DrawingSvg } from "./drawing-svg";
import { Sized } from "./sized";

type Props = Omit<StackupSectionOptions, "width"> & {
  /** top to bottom */
  layers: readonly SectionLayer[];
  width?: number;
  /** the layer under the pointer, to light its row in a table */
  onPoint?: (layerId: string | null) => void;
  onPick?: (layerId: string) => void;
};

/** Cross-section of the whole board, to scale. */
export function StackupSection({ width, ...props }: Props) {
  return width ? (
    <AtWidth {...props} width={width} />
  ) : (
    <Sized least={480}>{(w) => <AtWidth {...props} width={w} />}</Sized>
  );
}

function AtWidth({
  layers,
  width,
  boardHeight,
  unit,
  leastHeight,
  highlight,
  title,
  onPoint,
  onPick,
}: Props & { width: number }) {
  const drawing = useMemo(
    () => stackupSection(layers, { width, boardHeight, unit, leastHeight, highlight, title }),
    [layers, width, boardHeight, unit, leastHeight, highlight, title],
  );
  return <DrawingSvg drawing={drawing} onPoint={onPoint} onPick={onPick} />;
}
