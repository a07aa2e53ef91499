"use client";

import { useEffect, useMemo, useRef } from "react";
import { type PlaybackControl, usePlayback } from "@/components/charts/use-playback";
import type { PathPicture } from "@/lib/client/engine-jobs";
import { isAtFinding, type View } from "./net-state";
import { harmTime } from "./picture-view";

/** Rounded so far that an address stays short and a step is still told from the next [ps]. */
const ADDRESS_DIGITS = 10;

/**
 * The one cursor of the page. It goes to where a finding happens as soon as that finding's picture is there, unless
 * the address says where it stands; where it stays, the address says so.
 */
export function useCursor(
  picture: PathPicture | null,
  view: View,
  asked: number | null,
  look: (at: { t: number | null }) => void,
): { control: PlaybackControl; harmTime: number | null } {
  const { finding, edge, pin } = view;
  const at = isAtFinding(view) ? (finding?.time ?? null) : null;
  const end = picture?.waveforms.until ?? 0;
  const control = usePlayback(0, end);
  const { seek, time, playing } = control;

  const goal = useMemo(() => {
    if (!picture || !finding) return null;
    return harmTime(picture.waveforms, { rule: finding.rule, edge, pin, time: at });
  }, [picture, finding, edge, pin, at]);

  // Once for each finding or view of it; what the person does after that stands.
  const placed = useRef<string | null>(null);
  const place = [finding?.rule, view.corner, edge, view.driver, pin].join(" ");
  useEffect(() => {
    if (!picture || end === 0 || placed.current === place) return;
    const first = placed.current === null;
    placed.current = place;
    const to = first && asked !== null ? asked * 1e-12 : goal;
    if (to !== null) seek(to);
  }, [picture, end, place, goal, asked, seek]);

  const written = useRef<number | null>(asked);
  useEffect(() => {
    if (playing || placed.current === null || end === 0) return;
    const picoseconds = Math.round(time * 1e12 * ADDRESS_DIGITS) / ADDRESS_DIGITS;
    const isGoal = goal === null ? time === 0 : Math.abs(time - goal) < 1e-15;
    const next = isGoal ? null : picoseconds;
    if (written.current === next) return;
    written.current = next;
    look({ t: next });
  }, [time, playing, end, goal, look]);

  return { control, harmTime: at };
}
