"use client";

import { useMemo } from "react";
import {
  impedanceWidth,
  type ImpedanceWidthOptions,
  type WidthPoint,
} from "@/lib/drawings/impedance-width.geometry";
import { DrawingSvg } from "./drawing-svg";
import { Sized } from "./sized";

type Props = Omit<ImpedanceWidthOptions, "width"> & { points: readonly WidthPoint[]; width?: number };

/** Impedance against foot width with the target's tolerance. */
export function ImpedanceWidth({ width, ...props }: Props) {
  return width ? (
    <AtWidth {...props} width={width} />
  ) : (
    <Sized>{(w) => <AtWidth {...props} width={w} />}</Sized>
  );
}

function AtWidth(props: Props & { width: number }) {
  const { points, width, height, title, unit, target, chosen, grid, least } = props;
  const drawing = useMemo(
    () => impedanceWidth(points, { width, height, title, unit, target, chosen, grid, least }),
    [points, width, height, title, unit, target, chosen, grid, least],
  );
  return <DrawingSvg drawing={drawing} />;
}
