import { DomainError, NotConvergedError } from "../errors";
import type { Circuit, Port, Ref } from "./circuit";
import { elementCurrent, restWeights } from "./current-table";
import { solveInPlace } from "./linear-solve";

/** Lines and inductors are given this share of an ohm per ohm, so that loops of them share a current. */
const NEARLY_NOTHING = 1e-12;
const ABSURD_CURRENT = 1e6;
const MOST_ROUNDS = 200;

export interface DcState {
  /** of the free nodes [V] */
  volts: Float64Array;
  /** from end a into each wave line [A] */
  current: Float64Array;
}

/**
 * DC steady state: lines and inductors conduct, capacitors do not. A group of nodes with no DC path to a fixed voltage
 * rests at 0 V.
 *
 * @param levels  of the fixed nodes [V]
 * @throws DomainError where ideal voltages that differ are joined with no resistance between
 */
export function dcState(circuit: Circuit, levels: ArrayLike<number>): DcState {
  if (circuit.elements.length === 0) return linearState(circuit, levels, []);
  const weights = circuit.elements.map(restWeights);
  const across = ({ a, b }: { a: Ref; b: Ref }, volts: Float64Array) =>
    levelOf(a, volts, levels) - levelOf(b, volts, levels);
  let guess = circuit.elements.map((element) => across(element, new Float64Array(circuit.nodeCount)));
  let moved = Infinity;
  for (let round = 1; round <= MOST_ROUNDS; round++) {
    const companions = circuit.elements.map((element, k) => {
      const { amperes, siemens } = elementCurrent(element, weights[k]!, guess[k]!);
      return { a: element.a, b: element.b, siemens, amperes: amperes - siemens * guess[k]! };
    });
    const state = linearState(circuit, levels, companions);
    const next = circuit.elements.map((element) => across(element, state.volts));
    moved = Math.max(...next.map((v, k) => Math.abs(v - guess[k]!)));
    if (moved < 1e-12) return state;
    // Tables may make full steps go round in circles; shorter ones do not.
    const share = round < 12 ? 1 : 0.5;
    guess = guess.map((v, k) => v + share * (next[k]! - v));
    if (moved < 1e-9 && round > 40) return state;
  }
  throw new NotConvergedError(
    "The state of rest before t = 0 was not found; look at the I-V tables around the driver's rest.",
    moved,
    MOST_ROUNDS,
  );
}

interface Companion {
  a: Ref;
  b: Ref;
  siemens: number;
  amperes: number;
}

function levelOf(ref: Ref, volts: Float64Array, levels: ArrayLike<number>): number {
  return ref >= 0 ? volts[ref]! : (levels[-1 - ref] ?? 0);
}

function linearState(circuit: Circuit, levels: ArrayLike<number>, companions: readonly Companion[]): DcState {
  const nodes = circuit.nodeCount;
  const coils = circuit.branches.filter((branch) => branch.kind === "L");
  const size = nodes + circuit.lines.length + coils.length;
  const m = new Float64Array(size * size);
  const rhs = new Float64Array(size);
  const addTo = (row: number, ref: Ref, factor: number) => {
    if (ref >= 0) m[row * size + ref] = m[row * size + ref]! + factor;
    else rhs[row] = rhs[row]! - factor * (levels[-1 - ref] ?? 0);
  };
  for (const { kind, a, b, value } of circuit.branches) {
    if (kind !== "R") continue;
    for (const [from, to] of [
      [a, b],
      [b, a],
    ] as const) {
      if (from < 0) continue;
      addTo(from, from, 1 / value);
      addTo(from, to, -1 / value);
    }
  }
  for (const { a, b, siemens, amperes } of companions)
    for (const [from, to, sign] of [
      [a, b, 1],
      [b, a, -1],
    ] as const) {
      if (from < 0) continue;
      addTo(from, from, siemens);
      addTo(from, to, -siemens);
      rhs[from] = rhs[from]! - sign * amperes;
    }
  let row = nodes;
  const leave = (ref: Ref, factor: number) => {
    if (ref >= 0) m[ref * size + row] = m[ref * size + row]! + factor;
  };
  for (const { a, b, impedance } of circuit.lines) {
    portVolts(a, 1, (ref, factor) => addTo(row, ref, factor));
    portVolts(b, -1, (ref, factor) => addTo(row, ref, factor));
    m[row * size + row] = -NEARLY_NOTHING * impedance;
    for (const [port, sign] of [
      [a, 1],
      [b, -1],
    ] as const) {
      leave(port.node, sign);
      if (port.second !== null) leave(port.second, sign * port.sign);
    }
    row++;
  }
  for (const { a, b } of coils) {
    addTo(row, a, 1);
    addTo(row, b, -1);
    m[row * size + row] = -NEARLY_NOTHING;
    leave(a, 1);
    leave(b, -1);
    row++;
  }
  for (const node of floatingNodes(circuit)) m[node * size + node] = m[node * size + node]! + 1;
  solveInPlace(m, rhs, size, 1);
  for (let i = nodes; i < size; i++)
    if (Math.abs(rhs[i]!) > ABSURD_CURRENT)
      throw new DomainError(
        "Before t = 0 two different voltages are joined with no resistance between; the network has no state of rest.",
        "drivers",
      );
  return { volts: rhs.slice(0, nodes), current: rhs.slice(nodes, nodes + circuit.lines.length) };
}

/** Calls back with each node's share in the voltage of a port. */
export function portVolts(port: Port, factor: number, each: (ref: Ref, factor: number) => void): void {
  if (port.second === null) return each(port.node, factor);
  each(port.node, factor / 2);
  each(port.second, (factor * port.sign) / 2);
}

/** One node of each group that has no DC path to a fixed voltage. */
function floatingNodes(circuit: Circuit): number[] {
  const parent = new Int32Array(circuit.nodeCount + 1).map((_, i) => i);
  const held = circuit.nodeCount;
  const find = (at: number): number => {
    let top = at;
    while (parent[top] !== top) top = parent[top]!;
    return top;
  };
  const join = (a: Ref, b: Ref) => {
    parent[find(a < 0 ? held : a)] = find(b < 0 ? held : b);
  };
  for (const branch of circuit.branches) if (branch.kind !== "C") join(branch.a, branch.b);
  for (const { a, b } of circuit.elements) join(a, b);
  for (const { a, b } of circuit.lines) {
    join(a.node, b.node);
    if (a.second !== null && b.second !== null) join(a.second, b.second);
  }
  const seen = new Set([find(held)]);
  const floating: number[] = [];
  for (let node = 0; node < circuit.nodeCount; node++) {
    const root = find(node);
    if (seen.has(root)) continue;
    seen.add(root);
    floating.push(node);
  }
  return floating;
}
