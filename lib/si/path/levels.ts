import { DomainError } from "../errors";
import type { NodeMap } from "./node-map";

export interface DcResistor {
  a: string;
  b: string;
  ohms: number;
}

/**
 * DC node voltages of resistors and ideal voltages: lines and inductors conduct (join them in `nodes`), capacitors do
 * not. Conductance matrix, Gaussian elimination with partial pivoting; a path has a handful of nodes.
 *
 * @param resistors  [Ω], > 0
 * @param fixed      node → volts; ground is "0" at 0 V
 * @param wanted     nodes whose voltage is asked for
 * @returns [V] in the order of `wanted`
 * @throws DomainError where a wanted node has no DC path to any fixed voltage
 */
export function dcLevels(
  resistors: readonly DcResistor[],
  fixed: ReadonlyMap<string, number>,
  nodes: NodeMap,
  wanted: readonly string[],
): number[] {
  const volts = new Map<string, number>([[nodes.find("0"), 0]]);
  for (const [node, value] of fixed) volts.set(nodes.find(node), value);
  const index = new Map<string, number>();
  const column = (node: string) => {
    if (volts.has(node)) return -1;
    let at = index.get(node);
    if (at === undefined) index.set(node, (at = index.size));
    return at;
  };
  for (const { a, b } of resistors) {
    column(nodes.find(a));
    column(nodes.find(b));
  }
  const size = index.size;
  const rows = Array.from({ length: size }, () => new Float64Array(size + 1));
  for (const { a, b, ohms } of resistors) {
    const siemens = 1 / ohms;
    stamp(rows, column(nodes.find(a)), column(nodes.find(b)), siemens, volts.get(nodes.find(b)) ?? 0);
    stamp(rows, column(nodes.find(b)), column(nodes.find(a)), siemens, volts.get(nodes.find(a)) ?? 0);
  }
  const solved = solve(rows);
  return wanted.map((node) => {
    const key = nodes.find(node);
    const known = volts.get(key) ?? solved[index.get(key) ?? -1];
    if (known === undefined || !Number.isFinite(known))
      throw new DomainError(`${node} has no DC path to a driver or a rail.`, "parts");
    return known;
  });
}

function stamp(rows: Float64Array[], at: number, other: number, siemens: number, otherVolts: number) {
  const row = rows[at];
  if (!row) return;
  row[at] = (row[at] ?? 0) + siemens;
  if (other >= 0) row[other] = (row[other] ?? 0) - siemens;
  else row[row.length - 1] = (row[row.length - 1] ?? 0) + siemens * otherVolts;
}

/** NaN where the matrix leaves a node floating. */
function solve(rows: Float64Array[]): number[] {
  const size = rows.length;
  const result = new Array<number>(size).fill(NaN);
  for (let k = 0; k < size; k++) {
    let best = k;
    for (let i = k + 1; i < size; i++)
      if (Math.abs(rows[i]?.[k] ?? 0) > Math.abs(rows[best]?.[k] ?? 0)) best = i;
    const pivotRow = rows[best];
    const swapped = rows[k];
    if (!pivotRow || !swapped) continue;
    rows[best] = swapped;
    rows[k] = pivotRow;
    const pivot = pivotRow[k] ?? 0;
    if (Math.abs(pivot) < 1e-15) continue;
    for (let i = k + 1; i < size; i++) {
      const row = rows[i];
      const factor = (row?.[k] ?? 0) / pivot;
      if (!row || factor === 0) continue;
      for (let j = k; j <= size; j++) row[j] = (row[j] ?? 0) - factor * (pivotRow[j] ?? 0);
    }
  }
  for (let k = size - 1; k >= 0; k--) {
    const row = rows[k];
    const pivot = row?.[k] ?? 0;
    if (!row || Math.abs(pivot) < 1e-15) continue;
    let sum = row[size] ?? 0;
    for (let j = k + 1; j < size; j++) sum -= (row[j] ?? 0) * (result[j] ?? 0);
    result[k] = sum / pivot;
  }
  return result;
}
