import { readdirSync, readFileSync } from "node:fs";
import type { LineSection, Network, Section } from "@/lib/si";

/** A case of tests/reference/network; its README says what the fields mean. Its units are ps, ohm, pF, nH. */
export interface ReferenceCase {
  id: string;
  linear: boolean;
  circuit: {
    rails: Raw[];
    drivers: Raw[];
    sections: Raw[];
    parts: Raw[];
    receivers: { name: string; node: string; role: string }[];
  };
  settings: {
    t_stop_ps: number;
    thresholds: { vil: number; vih: number; vmeas: number };
    rails: { vdd: number; vss: number };
  };
  waveforms: Record<string, { t_ps: number[]; v: number[] }>;
  metrics: Record<string, { edges?: EdgeMetrics[]; absolute?: Record<string, number> }>;
  bounce_table?: { rows: BounceRow[] };
  arrival_weights?: { per_receiver: Record<string, [number, number][]> };
}

export interface BounceRow {
  t_ps: number;
  place: string;
  incident: Record<string, [number, string]>;
  outgoing: Record<string, [number, string]>;
  v_node_running: [number, string];
}

export type EdgeMetrics = Record<string, number | boolean | null> & {
  edge: "rise" | "fall";
  window_ps: [number, number];
  v_pre_ss: number;
  v_post_ss: number;
  sensitivity_to_0p05pct_shift: Record<string, number>;
  ill_conditioned: string[];
};

type Wave = { t_ps: number[]; v: number[] };
type Weight = { t_ps: number[]; k: number[] };

/** An item as the file has it; which of the fields it has follows from its kind (README of the cases, section 1). */
interface Raw extends Record<Names, string>, Record<Numbers, number>, Record<Tables, [number, number][]> {
  name?: string;
  wave: Wave;
  k_pu: Weight;
  k_pd: Weight;
}
type Names = "kind" | "node" | "a" | "b" | "a1" | "a2" | "b1" | "b2";
type Tables = "pullup" | "pulldown" | "points";
type Numbers =
  | "v"
  | "r_ohm"
  | "vdd"
  | "is_a"
  | "n"
  | "vt_v"
  | "rs_ohm"
  | "pf"
  | "nh"
  | "ohm"
  | "z0_ohm"
  | "td_ps"
  | "z_even_ohm"
  | "z_odd_ohm"
  | "td_even_ps"
  | "td_odd_ps"
  | "l_nh_per_m"
  | "c_pf_per_m"
  | "r_ohm_per_m"
  | "length_m"
  | "skin_A_sqrt_ps";

const folder = new URL("../../reference/network/", import.meta.url);
const PS = 1e-12;

export function referenceCases(group: string): ReferenceCase[] {
  return readdirSync(folder)
    .filter((file) => file.startsWith(group) && file.endsWith(".json"))
    .map((file) => JSON.parse(readFileSync(new URL(file, folder), "utf8")) as ReferenceCase);
}

export function networkOf({ circuit }: ReferenceCase): Network {
  const pwl = (t: number[], value: number[]) => ({ kind: "pwl" as const, time: t.map((x) => x * PS), value });
  const named = (raw: Raw, i: number, kind: string) => raw.name ?? `${kind}${i + 1}`;
  return {
    rails: circuit.rails.map((r) => ({ name: r.name ?? r.node, node: r.node, volts: r.v })),
    drivers: circuit.drivers.map((d, i) => {
      const { t_ps, v } = d.wave;
      if (d.kind === "thevenin")
        return {
          name: named(d, i, "driver"),
          kind: "thevenin",
          node: d.node,
          resistance: d.r_ohm,
          wave: pwl(t_ps, v),
        };
      const weight = ({ t_ps: t, k }: { t_ps: number[]; k: number[] }) => pwl(t, k);
      return {
        name: named(d, i, "driver"),
        kind: "iv",
        node: d.node,
        vdd: d.vdd,
        pullup: d.pullup,
        pulldown: d.pulldown,
        pullupWeight: weight(d.k_pu),
        pulldownWeight: weight(d.k_pd),
      };
    }),
    sections: circuit.sections.map((s, i) => sectionOf(s, named(s, i, "section"))),
    parts: circuit.parts.map((p, i) => {
      const { a, b } = p;
      const name = named(p, i, "part");
      const kind = p.kind;
      if (kind === "D")
        return {
          name,
          kind: "diode",
          a,
          b,
          saturationCurrent: p.is_a,
          emission: p.n,
          thermalVoltage: p.vt_v,
          seriesResistance: p.rs_ohm,
        };
      if (kind === "IV") return { name, kind: "iv", a, b, points: p.points };
      if (kind === "C") return { name, kind, a, b, value: p.pf * PS };
      if (kind === "L") return { name, kind, a, b, value: p.nh * 1e-9 };
      return { name, kind: "R", a, b, value: p.ohm };
    }),
    probes: circuit.receivers.map(({ name, node }) => ({ name, node })),
  };
}

function sectionOf(s: Raw, name: string): Section {
  const kind = s.kind;
  if (kind === "coupled_pair") {
    const mode = (z: number, td: number) => ({ impedance: z, delay: td * PS });
    return {
      name,
      kind: "pair",
      a1: s.a1,
      a2: s.a2,
      b1: s.b1,
      b2: s.b2,
      even: mode(s.z_even_ohm, s.td_even_ps),
      odd: mode(s.z_odd_ohm, s.td_odd_ps),
    };
  }
  if (kind === "rlc_line")
    return {
      name,
      kind: "rlc",
      a: s.a,
      b: s.b,
      l: s.l_nh_per_m * 1e-9,
      c: s.c_pf_per_m * PS,
      r: s.r_ohm_per_m,
      length: s.length_m,
    };
  const line: LineSection = {
    name,
    kind: "line",
    a: s.a,
    b: s.b,
    impedance: s.z0_ohm,
    delay: s.td_ps * PS,
  };
  if (kind === "skin_line") line.skin = s.skin_A_sqrt_ps * Math.sqrt(PS);
  return line;
}

/** Largest difference between two waveforms joined by straight lines, looked at on both sets of samples, away from jumps. */
export function largestMiss(
  time: Float64Array,
  voltage: Float64Array,
  reference: { t_ps: number[]; v: number[] },
): number {
  const refTime = Float64Array.from(reference.t_ps, (t) => t * PS);
  const refVolts = Float64Array.from(reference.v);
  const jumps: number[] = [];
  for (let i = 1; i < refTime.length; i++) if (refTime[i] === refTime[i - 1]) jumps.push(refTime[i]!);
  const until = Math.min(refTime[refTime.length - 1]!, time[time.length - 1]!);
  let miss = 0;
  let jump = 0;
  const all = Float64Array.from([...refTime, ...time]).sort();
  const own = reader(time, voltage);
  const theirs = reader(refTime, refVolts);
  for (const t of all) {
    if (t > until) break;
    while (jump < jumps.length && jumps[jump]! < t - PS * 1e-3) jump++;
    if (jump < jumps.length && Math.abs(jumps[jump]! - t) <= PS * 1e-3) continue;
    miss = Math.max(miss, Math.abs(own(t) - theirs(t)));
  }
  return miss;
}

/** Straight-line reading at times that ascend from call to call. */
function reader(time: Float64Array, value: Float64Array): (t: number) => number {
  let i = 0;
  return (t) => {
    while (i + 1 < time.length && time[i + 1]! <= t) i++;
    const next = Math.min(i + 1, time.length - 1);
    const span = time[next]! - time[i]!;
    return span > 0 ? value[i]! + ((value[next]! - value[i]!) * (t - time[i]!)) / span : value[i]!;
  };
}

/** Peak to peak of all sources [V]. */
export function sourceSwing({ circuit }: ReferenceCase): number {
  return circuit.drivers.reduce((sum, d) => sum + Math.max(...d.wave.v) - Math.min(...d.wave.v), 0);
}
