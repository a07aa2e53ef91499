import { restValue } from "../network/wave";
import type { DiodePart, IvDriver, IvTable, Pwl } from "../network/types";
import type { Ref } from "./circuit";

/** A current-voltage table; `look` leaves the current and its slope in `amperes` and `siemens`. */
export class CurrentTable {
  amperes = 0;
  siemens = 0;
  private readonly volts: Float64Array;
  private readonly current: Float64Array;
  private at = 0;

  constructor(points: IvTable) {
    this.volts = Float64Array.from(points, ([v]) => v);
    this.current = Float64Array.from(points, ([, i]) => i);
  }

  /** End pieces go on beyond the table. Looks first where it looked last. */
  look(v: number): void {
    const { volts, current } = this;
    let i = this.at;
    const last = volts.length - 2;
    while (i > 0 && v < volts[i]!) i--;
    while (i < last && v >= volts[i + 1]!) i++;
    this.at = i;
    this.siemens = (current[i + 1]! - current[i]!) / (volts[i + 1]! - volts[i]!);
    this.amperes = current[i]! + this.siemens * (v - volts[i]!);
  }
}

/** A two-terminal part that is not linear: I(a → b) = Σ weight(t) · table(V(a) − V(b)). */
export interface TableElement {
  name: string;
  a: Ref;
  b: Ref;
  terms: { table: CurrentTable; weight: Pwl | null }[];
}

/** Current out of the node: pulldownWeight · Ipd(v) − pullupWeight · Ipu(vdd − v). */
export function driverElement(driver: IvDriver, node: Ref, ground: Ref): TableElement {
  const mirrored = driver.pullup.map(([v, i]): [number, number] => [driver.vdd - v, -i]).reverse();
  return {
    name: driver.name,
    a: node,
    b: ground,
    terms: [
      { table: new CurrentTable(driver.pulldown), weight: driver.pulldownWeight },
      { table: new CurrentTable(mirrored), weight: driver.pullupWeight },
    ],
  };
}

/** Steps of the junction voltage in emission · thermal voltages: a straight piece then misses the current by 0.03 %. */
const FINE = 0.05;
const LARGEST_CURRENT = 1e3;

/** A diode as a table: the junction's exponential stretched by its series resistance. */
export function diodeTable({
  saturationCurrent,
  emission,
  thermalVoltage,
  seriesResistance,
}: DiodePart): CurrentTable {
  const unit = emission * thermalVoltage;
  const points: [number, number][] = [[-40 * unit, -saturationCurrent]];
  for (let x = -12; ; x += FINE) {
    const amperes = saturationCurrent * Math.expm1(x);
    points.push([x * unit + seriesResistance * amperes, amperes]);
    if (amperes > LARGEST_CURRENT) break;
  }
  return new CurrentTable(points);
}

/** The element's weights before t = 0. */
export function restWeights(element: TableElement): number[] {
  return element.terms.map(({ weight }) => (weight ? restValue(weight) : 1));
}

/** Current and its slope at v, into the element's first term's scratch. */
export function elementCurrent(
  { terms }: TableElement,
  weights: readonly number[],
  v: number,
): { amperes: number; siemens: number } {
  let amperes = 0;
  let siemens = 0;
  for (let k = 0; k < terms.length; k++) {
    const { table } = terms[k]!;
    table.look(v);
    amperes += weights[k]! * table.amperes;
    siemens += weights[k]! * table.siemens;
  }
  return { amperes, siemens };
}
