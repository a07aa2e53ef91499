/** The inner loops for clusters of one node. State is read into locals once a block; nothing is allocated. */

export type Worker = (from: number, to: number) => void;

/** v(n+1) = p v(n) + q0 J(n) + q1 J(n+1); q0 = 0 where the node has no capacitance. */
export interface NodeUpdate {
  p: number;
  q0: number;
  q1: number;
}

/** A port's wave: sample n arrives as `samples[n + offset]`; what leaves goes to `out[n + pad]`. J gets weight · arrival. */
export interface PortWave {
  weight: number;
  samples: Float64Array;
  offset: number;
  out: Float64Array;
}

/** A node at which one line ends. */
export function endWorker(
  { p, q0, q1 }: NodeUpdate,
  { weight, samples, offset, out }: PortWave,
  drive: Float64Array,
  pad: number,
  record: Float64Array,
): Worker {
  let v = 0;
  let before = 0;
  return (from, to) => {
    let volts = v;
    let last = before;
    for (let n = from; n < to; n++) {
      const a = samples[n + offset]!;
      const now = drive[n]! + weight * a;
      // From rest: a node with capacitance starts at nothing, one without follows at once.
      volts = n === 0 ? (q0 === 0 ? q1 * now : 0) : p * volts + q0 * last + q1 * now;
      last = now;
      record[n] = volts;
      out[n + pad] = volts - a;
    }
    v = volts;
    before = last;
  };
}

/** A node between two lines. */
export function throughWorker(
  { p, q0, q1 }: NodeUpdate,
  first: PortWave,
  second: PortWave,
  drive: Float64Array,
  pad: number,
  record: Float64Array,
): Worker {
  const { weight: weightA, samples: samplesA, offset: offsetA, out: outA } = first;
  const { weight: weightB, samples: samplesB, offset: offsetB, out: outB } = second;
  let v = 0;
  let before = 0;
  return (from, to) => {
    let volts = v;
    let last = before;
    for (let n = from; n < to; n++) {
      const a = samplesA[n + offsetA]!;
      const b = samplesB[n + offsetB]!;
      const now = drive[n]! + weightA * a + weightB * b;
      volts = n === 0 ? (q0 === 0 ? q1 * now : 0) : p * volts + q0 * last + q1 * now;
      last = now;
      record[n] = volts;
      outA[n + pad] = volts - a;
      outB[n + pad] = volts - b;
    }
    v = volts;
    before = last;
  };
}

/** A node with no line or with three and more. */
export function junctionWorker(
  { p, q0, q1 }: NodeUpdate,
  ports: readonly PortWave[],
  drive: Float64Array,
  pad: number,
  record: Float64Array,
): Worker {
  let v = 0;
  let before = 0;
  return (from, to) => {
    for (let n = from; n < to; n++) record[n] = drive[n]!;
    for (const { weight, samples, offset } of ports)
      for (let n = from; n < to; n++) record[n] = record[n]! + weight * samples[n + offset]!;
    let volts = v;
    let last = before;
    for (let n = from; n < to; n++) {
      const now = record[n]!;
      volts = n === 0 ? (q0 === 0 ? q1 * now : 0) : p * volts + q0 * last + q1 * now;
      last = now;
      record[n] = volts;
    }
    v = volts;
    before = last;
    for (const { samples, offset, out } of ports)
      for (let n = from; n < to; n++) out[n + pad] = record[n]! - samples[n + offset]!;
  };
}
