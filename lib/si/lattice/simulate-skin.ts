import type { Channel } from "./channels";
import { combClusters } from "./comb";
import type { Waveforms } from "./comb-output";
import { movingSources, type Prepared } from "./prepared";
import { skinArrivals, type SkinArrival } from "./skin-arrivals";
import { erfc, skinRamp } from "./skin-fit";
import type { Accuracy } from "./step-size";

/** Arrivals of all corners together that are drawn one by one; beyond, the grid is quicker. */
const MOST = 160;
const FLOOR = 1e-7;
/** Share of the swing by which a chord may miss the curve. */
const CHORD: Record<Accuracy, number> = { live: 1e-3, standard: 2e-4, reference: 5e-5 };

/** What one corner of one source adds to each channel. */
interface Term {
  time: number;
  skin: number;
  jump: number;
  slope: number;
  share: number[];
}

/**
 * Waveforms of a resistive network with skin loss: the sum of every arrival's own erfc, which a grid would have to
 * follow from a jump's sharpness to its long tail. Exact at the samples.
 *
 * @returns null where a source is a sine or the arrivals are too many
 */
export function simulateSkin({
  circuit,
  clusters,
  channels,
  rest,
  until,
  accuracy,
}: Prepared): { waveforms: Waveforms; steps: number } | null {
  const sources = movingSources(circuit);
  const ready = combClusters(clusters);
  const terms: Term[] = [];
  let swing = 0;
  let left = MOST;
  for (const { fixed, corners } of sources) {
    if (!corners) return null;
    const arrivals = skinArrivals(circuit, ready, fixed, {
      until,
      floor: FLOOR,
      most: Math.floor(left / corners.length),
    });
    if (!arrivals) return null;
    left -= arrivals.length * corners.length;
    let level = 0;
    let slope = 0;
    let since = 0;
    for (const corner of corners) {
      level += slope * (corner.time - since) + corner.jump;
      slope += corner.slope;
      since = corner.time;
      swing = Math.max(swing, Math.abs(level));
      for (const arrival of arrivals)
        terms.push({
          time: arrival.time + corner.time,
          skin: arrival.skin,
          jump: corner.jump,
          slope: corner.slope,
          share: channels.map((channel) => shareOf(channel, arrival)),
        });
      terms.push({
        time: corner.time,
        skin: 0,
        jump: corner.jump,
        slope: corner.slope,
        share: channels.map((channel) => (channel.kind === "fixed" && channel.fixed === fixed ? 1 : 0)),
      });
    }
  }
  const late = terms.filter(({ time, share }) => time <= until && share.some((one) => one !== 0));
  late.sort((a, b) => a.time - b.time);
  return { waveforms: sum(late, rest, until, CHORD[accuracy] * swing), steps: late.length };
}

function shareOf(channel: Channel, { cluster: { cluster }, rise, incident, outgoing }: SkinArrival): number {
  if (channel.kind === "fixed") return 0;
  if (channel.kind === "node") {
    const at = cluster.nodes.indexOf(channel.node);
    return at < 0 ? 0 : rise[at]!;
  }
  const port = cluster.ports.findIndex(({ end }) => end === channel.end);
  return port < 0 ? 0 : (channel.kind === "incident" ? incident : outgoing)[port]!;
}

function sum(terms: readonly Term[], rest: Float64Array, until: number, chord: number): Waveforms {
  const { time, isBefore } = sampleTimes(terms, until, chord);
  const values = Array.from(rest, (level) => new Float64Array(time.length).fill(level));
  for (const { time: start, skin, jump, slope, share } of terms) {
    let from = time.length;
    while (from > 0 && time[from - 1]! >= start) from--;
    for (let i = from; i < time.length; i++) {
      const since = time[i]! - start;
      // A jump that nothing has rounded off is not there yet in the sample before it.
      if (since === 0 && isBefore[i]) continue;
      const risen =
        jump === 0 ? 0 : skin === 0 ? jump : since === 0 ? 0 : jump * erfc(skin / (2 * Math.sqrt(since)));
      const all = risen + (slope === 0 ? 0 : slope * (skin === 0 ? since : skinRamp(skin, since)));
      for (let c = 0; c < share.length; c++)
        if (share[c] !== 0) values[c]![i] = values[c]![i]! + share[c]! * all;
    }
  }
  return { time, values };
}

/** After each arrival closely, then ever wider, as the curve of each straightens. */
function sampleTimes(
  terms: readonly Term[],
  until: number,
  chord: number,
): { time: Float64Array; isBefore: boolean[] } {
  const moments: { time: number; isBefore: boolean }[] = [
    { time: 0, isBefore: false },
    { time: until, isBefore: false },
  ];
  for (const { time: start, skin, jump, slope, share } of terms) {
    if (skin === 0 && jump !== 0) moments.push({ time: start, isBefore: true });
    moments.push({ time: start, isBefore: false });
    if (skin === 0) continue;
    const unit = skin * skin;
    const most = Math.max(...share.map(Math.abs));
    let since = FIRST * unit;
    while (start + since < until) {
      moments.push({ time: start + since, isBefore: false });
      const tau = since / unit;
      // How much the answer to a step and to a ramp bends over a time of `since`.
      const bend =
        most *
        (Math.abs(jump) * Math.min(0.6, 0.25 / Math.sqrt(tau)) +
          Math.abs(slope) * since * Math.min(0.25, 0.28 / Math.sqrt(tau)));
      since *= 1 + Math.min(0.5, Math.sqrt((8 * chord) / bend));
    }
  }
  moments.sort((a, b) => a.time - b.time || (a.isBefore === b.isBefore ? 0 : a.isBefore ? -1 : 1));
  const kept = moments.filter(
    (moment, i) =>
      i === 0 || moment.time > moments[i - 1]!.time || moment.isBefore !== moments[i - 1]!.isBefore,
  );
  return {
    time: Float64Array.from(kept, (moment) => moment.time),
    isBefore: kept.map((moment) => moment.isBefore),
  };
}

/** Before this share of skin² a step's answer is below 1e-6. */
const FIRST = 0.02;
