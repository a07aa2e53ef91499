import { DomainError } from "@/lib/si/errors";
import { pointsOf, type IbisCorner } from "./corners";
import { isEcl, type IbisModel, type IvTableName } from "./document";
import { cornerTables, pinCurrent, type CornerTables } from "./iv-tables";
import type { IbisFinding } from "./quality";

const keywords: Record<IvTableName, string> = {
  pulldown: "[Pulldown]",
  pullup: "[Pullup]",
  gndClamp: "[GND Clamp]",
  powerClamp: "[POWER Clamp]",
};
/** What a pin's current is made of in each of its states, and the table that decides there. */
const states = [
  { weights: { up: 0, down: 1 }, table: "pulldown", words: "while it drives low" },
  { weights: { up: 1, down: 0 }, table: "pullup", words: "while it drives high" },
  { weights: { up: 0, down: 0 }, table: "gndClamp", words: "while it listens" },
] as const;
/** A fall smaller than this share of the current's range is noise of the one who made the table. */
const NOISE = 1e-3;

/**
 * The whole current of a pin, switch and clamps together, must rise with its voltage; where it falls, the pin has a
 * negative resistance and may oscillate. (A switch's own table may fall where a clamp has been taken off it.)
 */
export function monotonicTables(model: IbisModel): IbisFinding[] {
  return states.flatMap(({ weights, table, words }) => {
    const data = model.tables[table];
    if (!data) return [];
    let worst: { share: number; from: number; to: number; corner: IbisCorner } | null = null;
    for (const corner of ["typical", "slow", "fast"] as const) {
      const tables = tablesOf(model, corner);
      if (!tables) continue;
      const { supply } = tables;
      const own = [tables.pulldown, tables.gndClamp, tables.powerClamp].flatMap(
        (one) => one?.map(([v]) => v) ?? [],
      );
      const above = tables.pullup?.map(([x]) => supply - x) ?? [];
      const knots = [...new Set([...own, ...above])]
        .filter((v) => v >= -supply && v <= 2 * supply)
        .sort((a, b) => a - b);
      const currents = knots.map((v) => -pinCurrent(tables, weights, v));
      const range = Math.max(...currents) - Math.min(...currents);
      for (let i = 1; i < knots.length; i++) {
        const share = ((currents[i - 1] ?? 0) - (currents[i] ?? 0)) / range;
        if (range > 1e-6 && share > NOISE && share > (worst?.share ?? 0))
          worst = { share, from: knots[i - 1] ?? 0, to: knots[i] ?? 0, corner };
      }
    }
    if (!worst) return [];
    return [
      {
        check: "falling table" as const,
        severity: "warning" as const,
        model: model.name,
        line: data.line,
        reason: `The pin's current ${words} falls by ${percent(worst.share)} of its range between ${short(worst.from)} V and ${short(worst.to)} V (${worst.corner}). A pin with negative resistance may oscillate in simulation; ask for a mended ${keywords[table]}.`,
      },
    ];
  });
}

function short(volts: number): string {
  return String(Number(volts.toFixed(4)));
}

/** Tables should reach as far as reflections do: one supply beyond either rail. */
export function tableRange(model: IbisModel): IbisFinding[] {
  const supply = model.voltageRange?.typ ?? null;
  if (supply === null || supply <= 0 || isEcl(model.type)) return [];
  const found: IbisFinding[] = [];
  for (const name of ["pulldown", "pullup"] as const) {
    const data = model.tables[name];
    if (!data) continue;
    const points = pointsOf(data.rows, "typ");
    const low = points[0]?.[0] ?? 0;
    const high = points.at(-1)?.[0] ?? 0;
    if (low <= -0.98 * supply && high >= 1.98 * supply) continue;
    found.push({
      check: "short table",
      severity: low <= 0 && high >= 0.98 * supply ? "notice" : "warning",
      model: model.name,
      line: data.line,
      reason: `${keywords[name]} runs from ${low} V to ${high} V; reflections reach from ${-supply} V to ${2 * supply} V. Beyond its ends it is drawn on straight.`,
    });
  }
  return found;
}

/** Null where the supply is missing, which has a finding of its own. */
export function tablesOf(model: IbisModel, corner: IbisCorner): CornerTables | null {
  try {
    return cornerTables(model, corner);
  } catch (error) {
    if (error instanceof DomainError) return null;
    throw error;
  }
}

export function percent(share: number): string {
  const value = 100 * share;
  if (!(value <= 1000)) return "more than 1000 %";
  return `${value >= 10 ? value.toFixed(0) : value.toFixed(1)} %`;
}
