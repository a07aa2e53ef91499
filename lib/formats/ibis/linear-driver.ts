import { DomainError } from "@/lib/si/errors";
import { columnPoints, slopeAt, type IbisCorner } from "./corners";
import { isEcl, type IbisModel } from "./document";
import { fixtureVolts, REST, waveformCorner } from "./edge-weights";
import { cornerTables, restVolts } from "./iv-tables";

/** A table driver as a source behind a resistor. */
export interface LinearDriver {
  /** [V] */
  supply: number;
  /** [Ω] */
  resistance: number;
  /** 10–90 % of the open-circuit ramp [s] */
  riseTime: number;
}

/** The line a driver is made equivalent for [Ω]. */
const LINE = 50;
/** A linear ramp's 10–90 % time over its 20–80 % time. */
const WIDER = 0.8 / 0.6;

/**
 * The straight source nearest to a table driver at one corner: its resistance from where the tables rest on a 50 Ω line
 * (from rail to rail, mean of both levels), its edge from the waveforms' 20–80 % time, else the ramp's (mean of both
 * edges).
 *
 * @throws DomainError where a table, the supply or the speed is missing
 */
export function linearDriver(model: IbisModel, corner: IbisCorner): LinearDriver {
  if (isEcl(model.type))
    throw new DomainError(
      `Model ${model.name} is of type ${model.type}: it does not swing from rail to rail, so no plain driver stands for it. Enter one by hand.`,
      "type",
    );
  const tables = cornerTables(model, corner);
  const { supply } = tables;
  const high = tables.pullup && restVolts(tables, REST.rise.after, { ohms: LINE, volts: 0 });
  const low = tables.pulldown && restVolts(tables, REST.fall.after, { ohms: LINE, volts: supply });
  const resistances = [
    ...(high ? [(LINE * (supply - high)) / high] : []),
    ...(low !== null && low < supply ? [(LINE * low) / (supply - low)] : []),
  ].filter((ohms) => Number.isFinite(ohms) && ohms >= 0);
  const times = (["rise", "fall"] as const).flatMap((edge) => edgeTime(model, corner, edge) ?? []);
  if (resistances.length === 0 || times.length === 0)
    throw new DomainError(
      `Model ${model.name} has no ${resistances.length === 0 ? "table that drives a line" : "ramp and no waveform"}, so no plain driver stands for it. Enter one by hand.`,
      "tables",
    );
  return { supply, resistance: mean(resistances), riseTime: WIDER * mean(times) };
}

/** 20–80 % time at the pin [s], of the waveform that swings most, else of the ramp. */
function edgeTime(model: IbisModel, corner: IbisCorner, edge: "rise" | "fall"): number | null {
  const own = waveformCorner(model, corner, edge);
  let best: { swing: number; time: number } | null = null;
  for (const waveform of model.waveforms) {
    if (waveform.edge !== edge || !Number.isFinite(fixtureVolts(waveform, own))) continue;
    const points = columnPoints(waveform.rows, own);
    const first = points[0]?.[1];
    const last = points.at(-1)?.[1];
    if (first === undefined || last === undefined || first === last) continue;
    const share = points.map(([t, v]) => [t, (v - first) / (last - first)] as const);
    const time = crossing(share, 0.8) - crossing(share, 0.2);
    const swing = Math.abs(last - first);
    if (time > 0 && swing > (best?.swing ?? 0)) best = { swing, time };
  }
  if (best) return best.time;
  const slope = model.ramp && slopeAt(model.ramp[edge], corner);
  return slope ? slope.seconds : null;
}

function crossing(points: readonly (readonly [time: number, share: number])[], level: number): number {
  const i = points.findIndex(([, share]) => share >= level);
  const [t1, y1] = points[i] ?? [0, 0];
  const [t0, y0] = points[i - 1] ?? [t1, y1];
  return y1 === y0 ? t1 : t0 + ((t1 - t0) * (level - y0)) / (y1 - y0);
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
