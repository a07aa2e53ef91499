"use client";

import { useMemo } from "react";
import type { Topology } from "@/lib/drawings/topology-graph";
import { topologyStrip, type TopologyStripOptions } from "@/lib/drawings/topology-strip.geometry";
import { DrawingSvg } from "./drawing-svg";
import { Sized } from "./sized";

type Props = Omit<TopologyStripOptions, "width"> & {
  topology: Topology;
  width?: number;
  /** an edge's id or a pin's name */
  onPoint?: (id: string | null) => void;
  onPick?: (id: string) => void;
};

/** The path from its driver: sections by delay, parts, branches, terminations, receivers with verdicts. */
export function TopologyStrip({ width, ...props }: Props) {
  return width ? (
    <AtWidth {...props} width={width} />
  ) : (
    <Sized least={480}>{(w) => <AtWidth {...props} width={w} />}</Sized>
  );
}

function AtWidth({ topology, width, title, highlight, onPoint, onPick }: Props & { width: number }) {
  const drawing = useMemo(
    () => topologyStrip(topology, { width, title, highlight }),
    [topology, width, title, highlight],
  );
  return <DrawingSvg drawing={drawing} onPoint={onPoint} onPick={onPick} />;
}
