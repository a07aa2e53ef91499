import { describe, expect, it } from "vitest";
import { measureEdge, measureExcursion, simulate, type EdgeMeasures } from "@/lib/si";
import { networkOf, referenceCases, type EdgeMetrics } from "../network/reference-case";

/** Source: tests/reference/network, README §3; ill-conditioned metrics are not scored, as it asks. */
const read: Record<string, (m: EdgeMeasures) => number | boolean | null> = {
  overshoot_V: (m) => m.overshoot,
  undershoot_V: (m) => m.undershoot,
  overshoot_area_Vns: (m) => m.overshootArea * 1e9,
  t_peak_ps: (m) => scaled(m.peakTime, 1e12),
  t_cross_first_ps: (m) => scaled(m.firstCrossing, 1e12),
  t_cross_last_ps: (m) => scaled(m.lastCrossing, 1e12),
  t_vil_first_ps: (m) => scaled(m.vilCrossing, 1e12),
  t_vih_first_ps: (m) => scaled(m.vihCrossing, 1e12),
  t_far_threshold_last_ps: (m) => scaled(m.farThresholdLast, 1e12),
  settle_5pct_ps: (m) => scaled(m.settling, 1e12),
  slew_20_80_V_per_ns: (m) => scaled(m.slew2080, 1e-9),
  slew_thresholds_V_per_ns: (m) => scaled(m.slewThresholds, 1e-9),
  ringback_level_V: (m) => m.ringback.level,
  ringback_margin_V: (m) => m.ringback.margin,
  ringback_present: (m) => m.ringback.present,
  nonmonotonic_V: (m) => m.nonMonotonic,
  monotonic: (m) => m.monotonic,
  ring_freq_GHz: (m) => scaled(m.ringFrequency, 1e-9),
};

function scaled(value: number | null, factor: number): number | null {
  return value === null ? null : value * factor;
}

/** 0.2 % of the swing, 1 ps or 0.1 % of a time, a slew as 1 ps at each end makes it; never tighter than the case's own sensitivity. */
function tolerance(metric: string, wanted: number, swing: number, edge: EdgeMetrics): number {
  const own = 3 * (edge.sensitivity_to_0p05pct_shift[metric] ?? 0);
  if (metric.endsWith("_ps")) return Math.max(own, 1, 1e-3 * Math.abs(wanted));
  if (metric.includes("slew")) return Math.max(own, (2 * wanted * wanted) / (0.3 * swing * 1000));
  if (metric.endsWith("_V")) return Math.max(own, 2e-3 * swing);
  return Math.max(own, 2e-3 * Math.abs(wanted));
}

/** Is the published waveform there within 0.2 % of the swing of its peak? */
function isAsHigh({ t_ps, v }: { t_ps: number[]; v: number[] }, at: number, edge: EdgeMetrics): boolean {
  const sign = edge.edge === "rise" ? 1 : -1;
  const i = Math.max(
    1,
    t_ps.findIndex((t) => t >= at),
  );
  const share = (at - t_ps[i - 1]!) / (t_ps[i]! - t_ps[i - 1]! || 1);
  const there = v[i - 1]! + share * (v[i]! - v[i - 1]!);
  const peak = sign * edge.v_post_ss + (edge.overshoot_V as number);
  return sign * there > peak - 2e-3 * Math.abs(edge.v_post_ss - edge.v_pre_ss);
}

const cases = [...referenceCases("A"), ...referenceCases("B")];

function faults(
  entry: (typeof cases)[number],
  time: Float64Array,
  voltages: Record<string, Float64Array>,
): string[] {
  const found: string[] = [];
  for (const [name, { edges = [], absolute }] of Object.entries(entry.metrics)) {
    const voltage = voltages[name]!;
    for (const edge of edges) {
      const low = Math.min(edge.v_pre_ss, edge.v_post_ss);
      const high = Math.max(edge.v_pre_ss, edge.v_post_ss);
      if (!(high > low)) continue;
      const [from, to] = edge.window_ps;
      const measured = measureEdge(time, voltage, {
        edge: edge.edge,
        from: from * 1e-12,
        to: to * 1e-12,
        low,
        high,
        ...entry.settings.thresholds,
      });
      for (const [metric, of] of Object.entries(read)) {
        if (edge.ill_conditioned.includes(metric) || !(metric in edge)) continue;
        const wanted = edge[metric] as number | boolean | null;
        const got = of(measured);
        // Of two peaks of one height either may be the highest.
        if (
          metric === "t_peak_ps" &&
          typeof got === "number" &&
          isAsHigh(entry.waveforms[name]!, from + got, edge)
        )
          continue;
        const ok =
          typeof wanted === "number" && typeof got === "number"
            ? Math.abs(wanted - got) <= tolerance(metric, wanted, high - low, edge)
            : wanted === got;
        if (!ok) found.push(`${name} ${edge.edge} ${metric}: ${String(got)} instead of ${String(wanted)}`);
      }
    }
    if (!absolute) continue;
    const { vdd, vss } = entry.settings.rails;
    const beyond = measureExcursion(time, voltage, { high: vdd, low: vss });
    const near = (metric: string, got: number, allowed: number) => {
      const wanted = absolute[metric] ?? 0;
      if (Math.abs(got - wanted) > allowed) found.push(`${name} ${metric}: ${got} instead of ${wanted}`);
    };
    near("peak_above_vdd_V", beyond.above, 2e-3 * vdd);
    near("peak_below_vss_V", beyond.below, 2e-3 * vdd);
    near("area_above_vdd_Vns", beyond.aboveArea * 1e9, 2e-3 * vdd * (entry.settings.t_stop_ps / 1000));
    near("area_below_vss_Vns", beyond.belowArea * 1e9, 2e-3 * vdd * (entry.settings.t_stop_ps / 1000));
  }
  return found;
}

describe("metrics of the simulated waveform: levels to 0.2 % of the swing, times to 1 ps or 0.1 %", () => {
  it.each(cases.map((entry) => [entry.id, entry] as const))("%s", (_, entry) => {
    const { time, voltage } = simulate(networkOf(entry), { until: entry.settings.t_stop_ps * 1e-12 });
    expect(faults(entry, time, voltage)).toEqual([]);
  });
});

describe("metrics of the published waveform itself", () => {
  it.each(cases.map((entry) => [entry.id, entry] as const))("%s", (_, entry) => {
    // All receivers of a case share no time axis here, so each is measured alone.
    const found = Object.entries(entry.waveforms).flatMap(([name, waveform]) => {
      const alone = { ...entry, metrics: { [name]: entry.metrics[name] ?? {} } };
      const found = faults(
        alone,
        Float64Array.from(waveform.t_ps, (t) => t * 1e-12),
        { [name]: Float64Array.from(waveform.v) },
      );
      // The published points are thinned out, which moves the top of a round peak between them.
      return entry.id.startsWith("A") ? found : found.filter((fault) => !fault.includes("t_peak_ps"));
    });
    expect(found).toEqual([]);
  });
});
