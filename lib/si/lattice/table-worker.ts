import { NotConvergedError } from "../errors";
import type { Cluster } from "./clusters";
import { elementCurrent, restWeights, type TableElement } from "./current-table";
import { solveInPlace } from "./linear-solve";

/** Voltages at rest, by which deviations become totals. */
export interface RestVolts {
  nodes: ArrayLike<number>;
  fixed: ArrayLike<number>;
}

/** Each term's weight at each step; null: 1 throughout. */
export type ElementWeights = Map<TableElement, (Float64Array | null)[]>;

/** What parts with tables need beyond deviations. */
export interface TableContext {
  rest: RestVolts;
  weights: ElementWeights;
}

const MOST_ROUNDS = 100;
const CLOSE = 1e-11;

/**
 * The parts with tables in one cluster. Their currents answer to the voltages they change: v = v0 − R i(v), with R the
 * cluster's answer within the step; Newton's method from the last step's voltages.
 */
export class TableGroup {
  /** currents as deviations from rest, after `settle` */
  readonly currents: Float64Array;
  private readonly count: number;
  private readonly volts: Float64Array;
  private readonly open: Float64Array;
  private readonly slopes: Float64Array;
  private readonly matrix: Float64Array;
  private readonly miss: Float64Array;
  private readonly restCurrents: number[];
  private readonly weightsNow: number[][];
  private readonly weights: (Float64Array | null)[][];

  constructor(
    private readonly cluster: Cluster,
    /** by step kind: what currents into the rows do to the elements' voltages */
    private readonly resistance: Float64Array,
    rest: RestVolts,
    weights: ElementWeights,
  ) {
    const { tables } = cluster;
    const count = (this.count = tables.length);
    const level = (ref: number) => (ref >= 0 ? rest.nodes[ref]! : rest.fixed[-1 - ref]!);
    this.currents = new Float64Array(count);
    this.volts = Float64Array.from(tables, ({ element }) => level(element.a) - level(element.b));
    this.restVolts = this.volts.slice();
    this.open = new Float64Array(count);
    this.slopes = new Float64Array(count);
    this.matrix = new Float64Array(count * count);
    this.miss = new Float64Array(count);
    this.weightsNow = tables.map(({ element }) => restWeights(element));
    this.restCurrents = tables.map(
      ({ element }, k) => elementCurrent(element, this.weightsNow[k]!, this.volts[k]!).amperes,
    );
    this.weights = tables.map(({ element }) => weights.get(element) ?? element.terms.map(() => null));
  }

  private readonly restVolts: Float64Array;

  /** Finds the currents at step n; `z` holds the cluster's unknowns as they are without them. */
  settle(n: number, z: Float64Array, fixedShift: (ref: number) => number): void {
    const { count, cluster, open, volts, restVolts } = this;
    for (let k = 0; k < count; k++) {
      const { element, a, b } = cluster.tables[k]!;
      open[k] =
        restVolts[k]! + (a >= 0 ? z[a]! : fixedShift(element.a)) - (b >= 0 ? z[b]! : fixedShift(element.b));
      const weights = this.weights[k]!;
      for (let j = 0; j < weights.length; j++) {
        const series = weights[j];
        if (series) this.weightsNow[k]![j] = series[n]!;
      }
    }
    if (count === 1) {
      volts[0] = this.solveOne(open[0]!, volts[0]!);
      return;
    }
    this.solveAll();
  }

  /** v + R i(v) = v0 grows with v: Newton, kept inside a bracket. */
  private solveOne(open: number, start: number): number {
    const { element } = this.cluster.tables[0]!;
    const r = this.resistance[0]!;
    const rest = this.restCurrents[0]!;
    const weights = this.weightsNow[0]!;
    let v = start;
    let low = -Infinity;
    let high = Infinity;
    for (let round = 0; round < MOST_ROUNDS; round++) {
      const { amperes, siemens } = elementCurrent(element, weights, v);
      const miss = v + r * (amperes - rest) - open;
      this.currents[0] = amperes - rest;
      if (miss > 0) high = v;
      else low = v;
      let next = v - miss / (1 + r * siemens);
      if (!(next > low && next < high))
        next = Number.isFinite(low) && Number.isFinite(high) ? (low + high) / 2 : next;
      const moved = Math.abs(next - v);
      if (moved < CLOSE || high - low < CLOSE) {
        this.currents[0] = amperes - rest + siemens * (next - v);
        return next;
      }
      v = next;
    }
    throw new NotConvergedError(
      `${element.name} found no voltage that fits its table.`,
      high - low,
      MOST_ROUNDS,
    );
  }

  private solveAll(): void {
    const { count, cluster, resistance, open, volts, currents, slopes, matrix, miss } = this;
    let moved = Infinity;
    for (let round = 0; round < MOST_ROUNDS; round++) {
      for (let k = 0; k < count; k++) {
        const { amperes, siemens } = elementCurrent(
          cluster.tables[k]!.element,
          this.weightsNow[k]!,
          volts[k]!,
        );
        currents[k] = amperes - this.restCurrents[k]!;
        slopes[k] = siemens;
      }
      for (let k = 0; k < count; k++) {
        let sum = open[k]! - volts[k]!;
        for (let j = 0; j < count; j++) {
          sum -= resistance[k * count + j]! * currents[j]!;
          matrix[k * count + j] = (k === j ? 1 : 0) + resistance[k * count + j]! * slopes[j]!;
        }
        miss[k] = sum;
      }
      solveInPlace(matrix, miss, count, 1);
      moved = 0;
      const share = round < 15 ? 1 : 0.5;
      for (let k = 0; k < count; k++) {
        volts[k] = volts[k]! + share * miss[k]!;
        currents[k] = currents[k]! + slopes[k]! * share * miss[k]!;
        moved = Math.max(moved, Math.abs(miss[k]!));
      }
      if (moved < CLOSE) return;
    }
    throw new NotConvergedError(
      `${cluster.tables.map(({ element }) => element.name).join(", ")} found no voltages that fit their tables.`,
      moved,
      MOST_ROUNDS,
    );
  }
}

/** R = Aᵀ Q A: the elements' voltages per ampere into their nodes. */
export function elementResistance({ tables, size }: Cluster, q: Float64Array): Float64Array {
  const count = tables.length;
  const r = new Float64Array(count * count);
  const at = (row: number, column: number) => (row < 0 || column < 0 ? 0 : q[row * size + column]!);
  tables.forEach((one, k) =>
    tables.forEach(
      (other, j) =>
        (r[k * count + j] =
          at(one.a, other.a) - at(one.a, other.b) - at(one.b, other.a) + at(one.b, other.b)),
    ),
  );
  return r;
}
