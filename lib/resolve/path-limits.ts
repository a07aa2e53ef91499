import type { PathProbe } from "@/lib/si/path/network";
import type { ResolvedPath } from "@/lib/si/path/types";
import { edgeRules } from "@/lib/si/rules/catalogue";
import { newReading, readEdge } from "@/lib/si/rules/read-edge";
import type { EdgeRule } from "@/lib/si/rules/rule";
import type { Corner } from "@/lib/si/rules/types";

/** A rule's limit as a line over time on the voltage of one receiver. */
export interface PathLimit {
  id: string;
  /** the rule's id; null: a threshold or rail that is only shown */
  rule: string | null;
  label: string;
  volts: number;
  /** "max": the voltage may not pass above it; "min": not below */
  side: "max" | "min";
  /** when it holds [s]; always, if left out */
  from?: number;
  to?: number;
  /** receiving pins it judges */
  probes: string[];
  reference?: boolean;
}

export interface SeenWave {
  corner: Corner;
  edge: "rise" | "fall";
  time: Float64Array;
  /** at the receiver's pin [V] */
  voltage: Float64Array;
  until: number;
  ramp: number;
  windowIsBit: boolean;
}

const SETTLE_BAND = 0.1;

/** The lines that the enabled rules draw for one receiver and edge, with its rail and thresholds for reference. */
export function pathLimits(path: ResolvedPath, probe: PathProbe, wave: SeenWave): PathLimit[] {
  const { receiver } = probe;
  const { corner, edge, until } = wave;
  const { low, high } = probe.levels[corner.driver];
  const rising = edge === "rise";
  const pin = probe.pin.pin;
  const lines: PathLimit[] = [];
  const draw = (
    rule: string | null,
    label: string,
    volts: number,
    side: "max" | "min",
    over: Partial<PathLimit> = {},
  ) =>
    lines.push({ id: `${rule ?? label} ${side} ${pin}`, rule, label, volts, side, probes: [pin], ...over });
  const limitOf = (id: string) => ruleLimit(path, probe, edge, id);

  const above = limitOf("above-rail");
  if (above !== null) draw("above-rail", "Above rail", receiver.vdd + above, "max");
  const below = limitOf("below-rail");
  if (below !== null) draw("below-rail", "Below rail", -below, "min");
  const over = limitOf("overshoot");
  if (over !== null) {
    const beyond = (over / 100) * (high - low);
    draw("overshoot", "Overshoot", rising ? high + beyond : low - beyond, rising ? "max" : "min");
  }

  const times = crossings(probe, wave);
  const dip = limitOf("ringback");
  const threshold = rising ? receiver.vih : receiver.vil;
  const name = rising ? "VIH" : "VIL";
  if (dip !== null && threshold !== null) {
    const volts = rising ? threshold + dip / 1e3 : threshold - dip / 1e3;
    const label = dip === 0 ? `Ringback, ${name}` : `Ringback, ${name} with margin`;
    draw("ringback", label, volts, rising ? "min" : "max", { from: times.read(volts) });
  } else if (threshold !== null) draw(null, name, threshold, rising ? "min" : "max", { reference: true });
  const near = rising ? receiver.vil : receiver.vih;
  if (near !== null) draw(null, rising ? "VIL" : "VIH", near, rising ? "max" : "min", { reference: true });

  const settling = limitOf("settling");
  if (settling !== null && path.bitTime !== null) {
    const from = times.first + (settling / 100) * path.bitTime;
    const band = SETTLE_BAND * (high - low);
    const level = rising ? high : low;
    if (from < until) {
      draw("settling", "Settled by then", level + band, "max", { from });
      draw("settling", "Settled by then", level - band, "min", { from });
    }
  }
  if (rising) draw(null, "Supply", receiver.vdd, "max", { reference: true });
  return lines;
}

/** The limit of a rule that judges this receiver and edge, in the rule's unit; null where none does. */
function ruleLimit(path: ResolvedPath, probe: PathProbe, edge: "rise" | "fall", id: string): number | null {
  const rule = edgeRules.find((entry) => entry.definition.id === id);
  if (!rule || !judges(rule, path, probe, edge)) return null;
  return rule.limit(path, probe.receiver, edge).limit;
}

function judges(rule: EdgeRule, path: ResolvedPath, probe: PathProbe, edge: "rise" | "fall"): boolean {
  const enabled = path.limits[rule.definition.id]?.enabled ?? rule.definition.enabledByDefault;
  return (
    enabled &&
    rule.edges.includes(edge) &&
    rule.applies(path, probe.receiver, edge) &&
    rule.lacks(path, probe.receiver) === null
  );
}

/** When the receiver first sees the edge, and from when it counts as read at a level [s]. */
function crossings(probe: PathProbe, { corner, edge, time, voltage, until, ramp }: SeenWave) {
  const { receiver, delay } = probe;
  const { low, high } = probe.levels[corner.driver];
  const rising = edge === "rise";
  const seenAs = (volts: number) => (rising ? volts : low + high - volts);
  const wave = rising ? voltage : voltage.map((volts) => low + high - volts);
  const meas = receiver.vmeas ?? receiver.vdd / 2;
  const ac = rising ? (receiver.vihAc ?? receiver.vih) : (receiver.vilAc ?? receiver.vil);
  const near = rising ? receiver.vil : receiver.vih;
  const arrival = delay + ramp;
  const first = (level: number): number => {
    const reading = newReading();
    readEdge(time, wave, until, { low, high, near: level, meas: seenAs(meas), far: Infinity }, reading);
    return Number.isNaN(reading.nearCrossing) ? arrival : reading.nearCrossing;
  };
  return {
    first: first(seenAs(near ?? meas)),
    /** A margin that the wave has not reached when it is read is judged from where it reaches it. */
    read: (level: number) => Math.max(first(seenAs(ac ?? meas)), first(seenAs(level))),
  };
}
