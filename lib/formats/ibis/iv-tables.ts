import type { IvTable } from "@/lib/si/network";
import { columnPoints, referenceVolts, type IbisCorner } from "./corners";
import { isEcl, type IbisModel } from "./document";

/**
 * A model's tables in the engine's sign, at one corner:
 *
 *     I out of the pin = kU(t) · pullup(supply − v) − kD(t) · pulldown(v) − clamps(v)
 *
 * The file counts amperes into the part, the pulldown's and ground clamp's volts up from their reference, the pullup's
 * and power clamp's down from theirs (an ECL pulldown's too, for it pulls from the upper reference).
 */
export interface CornerTables {
  /** reference of the pullup, or the voltage range [V] */
  supply: number;
  /** of supply − v; null where the model has none */
  pullup: IvTable | null;
  /** of v */
  pulldown: IvTable | null;
  /** of v, into the part to ground */
  gndClamp: IvTable | null;
  powerClamp: IvTable | null;
}

/** @throws DomainError where the supply is not in the file */
export function cornerTables(model: IbisModel, corner: IbisCorner): CornerTables {
  const points = (name: keyof IbisModel["tables"]) => {
    const data = model.tables[name];
    const found = data ? columnPoints(data.rows, corner) : [];
    return found.length > 1 ? found : null;
  };
  const supply = referenceVolts(model, "pullup", corner);
  const down = (from: number, table: [number, number][] | null): IvTable | null =>
    table && ascending(table.map(([x, i]) => [from - x, i]));
  const up = (from: number, table: [number, number][] | null): IvTable | null =>
    table && ascending(table.map(([x, i]) => [from + x, i]));
  const pulldownFrom = referenceVolts(model, "pulldown", corner);
  return {
    supply,
    pullup: points("pullup")?.map(([x, i]) => [x, -i]) ?? null,
    pulldown: isEcl(model.type)
      ? down(model.references.pulldown ? pulldownFrom : supply, points("pulldown"))
      : up(pulldownFrom, points("pulldown")),
    gndClamp: up(referenceVolts(model, "gndClamp", corner), points("gndClamp")),
    powerClamp: down(referenceVolts(model, "powerClamp", corner), points("powerClamp")),
  };
}

function ascending(points: IvTable): IvTable {
  const sorted = points.toSorted(([a], [b]) => a - b);
  // Shifting by a reference may round two volts to one.
  return sorted.filter(([v], i) => i === 0 || v > (sorted[i - 1]?.[0] ?? -Infinity));
}

/** Straight between points, end pieces extended, as the engine reads a table. 0 where there is none. */
export function currentAt(table: IvTable | null, v: number): number {
  if (!table || table.length < 2) return 0;
  let low = 0;
  let high = table.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((table[middle]?.[0] ?? 0) <= v) low = middle;
    else high = middle;
  }
  const [v0, i0] = table[low] ?? [0, 0];
  const [v1, i1] = table[high] ?? [1, 0];
  return i0 + ((i1 - i0) * (v - v0)) / (v1 - v0);
}

/** Current the pin gives to the outside at v [A], with the two switches at their weights. */
export function pinCurrent(tables: CornerTables, weights: { up: number; down: number }, v: number): number {
  return (
    weights.up * currentAt(tables.pullup, tables.supply - v) -
    weights.down * currentAt(tables.pulldown, v) -
    clampCurrent(tables, v)
  );
}

export function clampCurrent({ gndClamp, powerClamp }: CornerTables, v: number): number {
  return currentAt(gndClamp, v) + currentAt(powerClamp, v);
}

/**
 * Where the pin rests against `ohms` to `volts` [V], by bisection on pin current = (v − volts)/ohms.
 * @returns null where the tables cross the load line nowhere within 100 V
 */
export function restVolts(
  tables: CornerTables,
  weights: { up: number; down: number },
  load: { ohms: number; volts: number },
): number | null {
  const excess = (v: number) => (v - load.volts) / load.ohms - pinCurrent(tables, weights, v);
  let low = Math.min(load.volts, 0, tables.supply) - 0.01;
  let high = Math.max(load.volts, 0, tables.supply) + 0.01;
  while (excess(low) > 0 && low > -100) low -= 1;
  while (excess(high) < 0 && high < 100) high += 1;
  if (!(excess(low) <= 0 && excess(high) >= 0)) return null;
  for (let n = 0; n < 100 && high - low > 1e-12; n++) {
    const middle = (low + high) / 2;
    if (excess(middle) > 0) high = middle;
    else low = middle;
  }
  return (low + high) / 2;
}
