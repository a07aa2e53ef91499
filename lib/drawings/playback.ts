/** The one cursor that all drawings of a net share, and whether it runs. Pure; the clock is the caller's. */
export interface Playback {
  /** the time that can be shown [s] */
  start: number;
  end: number;
  /** of the cursor [s] */
  time: number;
  playing: boolean;
  /** times the usual speed */
  rate: number;
}

/** At the usual speed the whole span passes in this many seconds. */
export const WHOLE_SPAN_SECONDS = 12;
export const RATES = [0.25, 0.5, 1, 2] as const;
/** What one step moves, as a share of the span; also what "play" does where motion is unwanted. */
const STEP_SHARE = 1 / 60;

export type PlaybackAct =
  | { kind: "play" }
  | { kind: "pause" }
  | { kind: "seek"; time: number }
  | { kind: "step"; steps: number }
  | { kind: "rate"; rate: number }
  | { kind: "tick"; elapsed: number /* real seconds since the last */ }
  | { kind: "span"; start: number; end: number };

export function startPlayback(start: number, end: number, time = start): Playback {
  const sound = Number.isFinite(start) && Number.isFinite(end) && end >= start;
  const [a, b] = sound ? [start, end] : [0, 0];
  return { start: a, end: b, time: within(time, a, b), playing: false, rate: 1 };
}

/** The next state. It stops at the end; playing again from there begins anew. */
export function playbackAfter(now: Playback, act: PlaybackAct): Playback {
  const whole = now.end - now.start;
  switch (act.kind) {
    case "play":
      return whole > 0 ? { ...now, playing: true, time: now.time >= now.end ? now.start : now.time } : now;
    case "pause":
      return { ...now, playing: false };
    case "seek":
      return { ...now, playing: false, time: within(act.time, now.start, now.end) };
    case "step":
      return {
        ...now,
        playing: false,
        time: within(now.time + act.steps * whole * STEP_SHARE, now.start, now.end),
      };
    case "rate":
      return act.rate > 0 ? { ...now, rate: act.rate } : now;
    case "tick": {
      if (!now.playing || !(act.elapsed > 0)) return now;
      const time = now.time + (act.elapsed * now.rate * whole) / WHOLE_SPAN_SECONDS;
      return time >= now.end ? { ...now, time: now.end, playing: false } : { ...now, time };
    }
    case "span": {
      const next = startPlayback(act.start, act.end, now.time);
      return {
        ...next,
        rate: now.rate,
        playing: now.playing && next.end > next.start && next.time < next.end,
      };
    }
  }
}

function within(time: number, start: number, end: number): number {
  return Number.isFinite(time) ? Math.min(Math.max(time, start), end) : start;
}
