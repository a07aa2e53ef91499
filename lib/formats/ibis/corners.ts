import { DomainError } from "@/lib/si/errors";
import type { IbisModel, IvTableName, Slope, TableRow, Triple } from "./document";

export type IbisCorner = "slow" | "typical" | "fast";
export type Column = "typ" | "min" | "max";

/**
 * Which column a corner reads. The standard pairs columns by process for whatever the silicon decides, and by size for
 * what is a plain number:
 *
 * | quantity                                            | slow | typical | fast | why                              |
 * | --------------------------------------------------- | ---- | ------- | ---- | -------------------------------- |
 * | I-V tables, ramp, waveforms, V_fixture              | min  | typ     | max  | min is the weak, slow process    |
 * | voltage range, references, [Model Spec]             | min  | typ     | max  | supply belongs to the process    |
 * | temperature range                                   | min  | typ     | max  | min is where the part is weakest |
 * | C_comp, R_pkg, L_pkg, C_pkg, terminators' C         | max  | typ     | min  | by size; more of it is slower    |
 *
 * Where a column is NA the typical value stands in, for the whole table, never row by row. What an edge is made of
 * (tables, supply, waveforms) goes to typical together: a typical waveform says nothing about a slow table.
 */
const PROCESS: Record<IbisCorner, Column> = { slow: "min", typical: "typ", fast: "max" };
const LOAD: Record<IbisCorner, Column> = { slow: "max", typical: "typ", fast: "min" };

export function processColumn(corner: IbisCorner): Column {
  return PROCESS[corner];
}

/** A quantity of the silicon or its supply. */
export function byProcess(triple: Triple | null | undefined, corner: IbisCorner): number | null {
  return triple ? (triple[PROCESS[corner]] ?? triple.typ) : null;
}

/** A quantity that slows the edge the more there is of it. */
export function byLoad(triple: Triple | null | undefined, corner: IbisCorner): number | null {
  return triple ? (triple[LOAD[corner]] ?? triple.typ) : null;
}

export function slopeAt(
  slopes: { typ: Slope | null; min: Slope | null; max: Slope | null },
  corner: IbisCorner,
): Slope | null {
  return slopes[PROCESS[corner]] ?? slopes.typ;
}

/** Points of one column; rows that are NA in it drop out. Fewer than two: the typical column. */
export function columnPoints(rows: readonly TableRow[], corner: IbisCorner): [x: number, y: number][] {
  const own = pointsOf(rows, PROCESS[corner]);
  return own.length > 1 ? own : pointsOf(rows, "typ");
}

export function pointsOf(rows: readonly TableRow[], column: Column): [x: number, y: number][] {
  const points: [number, number][] = [];
  for (const row of rows) {
    const y = row[column];
    if (y !== null) points.push([row.x, y]);
  }
  return points;
}

/** C_comp of a corner [F], or the sum of its four parts where those are given. @returns null where neither is */
export function dieCapacitance(model: IbisModel, corner: IbisCorner): number | null {
  if (model.splitCapacitance.length > 0)
    return model.splitCapacitance.reduce((sum, part) => sum + (byLoad(part, corner) ?? 0), 0);
  return byLoad(model.capacitance, corner);
}

/**
 * Voltage a table counts from [V]: its reference, else the voltage range above and 0 V below.
 * @throws DomainError where the upper one is nowhere in the file
 */
export function referenceVolts(model: IbisModel, table: IvTableName, corner: IbisCorner): number {
  const own = byProcess(model.references[table], corner);
  if (own !== null) return own;
  if (table === "pulldown" || table === "gndClamp") return 0;
  const supply = byProcess(model.voltageRange, corner) ?? byProcess(model.references.pullup, corner);
  if (supply !== null) return supply;
  throw new DomainError(
    `Model ${model.name} has no voltage range and no reference for its ${table === "pullup" ? "pullup" : "power clamp"}. Add [Voltage Range] to the file.`,
    "voltageRange",
  );
}

/** The corner whose own tables a driver's edge can be worked out with: `corner`, or typical where a column is NA. */
export function tablesCorner(model: IbisModel, corner: IbisCorner): IbisCorner {
  const { pullup, pulldown } = model.tables;
  return [pullup, pulldown].every((data) => !data || hasCorner(data.rows, corner)) ? corner : "typical";
}

export function hasCorner(rows: readonly TableRow[], corner: IbisCorner): boolean {
  return pointsOf(rows, PROCESS[corner]).length > 1;
}
