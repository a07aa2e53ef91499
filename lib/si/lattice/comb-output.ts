import type { Corner } from "../network/wave";
import { workspace } from "./workspace";

/** One source's comb: what each channel rises by at each moment, per 1 V of source step. */
export interface CombRun {
  /** [s], ascending */
  times: Float64Array;
  /** by channel; null: never moves */
  rises: (Float64Array | null)[];
  corners: Corner[];
}

export interface Waveforms {
  time: Float64Array;
  /** by channel */
  values: Float64Array[];
}

/**
 * V(t) = rest + Σ c · (s(t − t_k) − s(0−)), drawn exactly: every corner of every arrival is a sample, every jump two.
 *
 * @param together  moments closer than this are one [s]
 */
export function drawComb(
  runs: readonly CombRun[],
  rest: Float64Array,
  until: number,
  together: number,
): Waveforms {
  const channels = rest.length;
  const streams = runs.flatMap((run) => run.corners.map((corner) => ({ run, corner, at: 0 })));
  let most = 2;
  for (const { run } of streams) most += 2 * run.times.length;
  const time = workspace.take(most);
  const values = Array.from(rest, () => workspace.take(most));
  const level = rest.slice();
  const slope = new Float64Array(channels);
  const jump = new Float64Array(channels);
  let count = 0;
  const emit = (t: number) => {
    time[count] = t;
    for (let c = 0; c < channels; c++) values[c]![count] = level[c]!;
    count++;
  };
  emit(0);
  let now = 0;
  const advance = (t: number) => {
    for (let c = 0; c < channels; c++) level[c] = level[c]! + slope[c]! * (t - now);
    now = t;
  };
  for (;;) {
    let next = Infinity;
    for (let k = 0; k < streams.length; k++) {
      const { run, corner, at } = streams[k]!;
      if (at < run.times.length && run.times[at]! + corner.time < next) next = run.times[at]! + corner.time;
    }
    if (next > until) break;
    advance(next);
    let jumps = false;
    jump.fill(0);
    for (const stream of streams) {
      const { run, corner } = stream;
      while (stream.at < run.times.length && run.times[stream.at]! + corner.time - next <= together) {
        for (let c = 0; c < channels; c++) {
          const rises = run.rises[c];
          if (!rises) continue;
          const rise = rises[stream.at]!;
          slope[c] = slope[c]! + rise * corner.slope;
          jump[c] = jump[c]! + rise * corner.jump;
        }
        if (corner.jump !== 0) jumps = true;
        stream.at++;
      }
    }
    if (next > 0) emit(next);
    if (!jumps) continue;
    for (let c = 0; c < channels; c++) level[c] = level[c]! + jump[c]!;
    emit(next);
  }
  if (time[count - 1]! < until) {
    advance(until);
    emit(until);
  }
  return { time: time.slice(0, count), values: values.map((value) => value.slice(0, count)) };
}
