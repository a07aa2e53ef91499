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
  drive: Float64Array | null,
  pad: number,
  record: Float64Array,
): Worker {
  const state = new Float64Array(2);
  return (from, to) => {
    let volts = state[0]!;
    let last = state[1]!;
    let n = from;
    if (n === 0) {
      const a = samples[offset]!;
      last = (drive ? drive[0]! : 0) + weight * a;
      volts = atStart(q0, q1, last);
      record[0] = volts;
      out[pad] = volts - a;
      n = 1;
    }
    if (drive)
      for (; n < to; n++) {
        const a = samples[n + offset]!;
        const now = drive[n]! + weight * a;
        volts = p * volts + (q0 * last + q1 * now);
        last = now;
        record[n] = volts;
        out[n + pad] = volts - a;
      }
    else
      for (; n < to; n++) {
        const a = samples[n + offset]!;
        const now = weight * a;
        volts = p * volts + (q0 * last + q1 * now);
        last = now;
        record[n] = volts;
        out[n + pad] = volts - a;
      }
    state[0] = volts;
    state[1] = last;
  };
}

/** A node between two lines that no source moves. */
export function throughWorker(
  { p, q0, q1 }: NodeUpdate,
  first: PortWave,
  second: PortWave,
  pad: number,
  record: Float64Array,
): Worker {
  const { weight: weightA, samples: samplesA, offset: offsetA, out: outA } = first;
  const { weight: weightB, samples: samplesB, offset: offsetB, out: outB } = second;
  const state = new Float64Array(2);
  return (from, to) => {
    let volts = state[0]!;
    let last = state[1]!;
    let n = from;
    if (n === 0) {
      const a = samplesA[offsetA]!;
      const b = samplesB[offsetB]!;
      last = weightA * a + weightB * b;
      volts = atStart(q0, q1, last);
      record[0] = volts;
      outA[pad] = volts - a;
      outB[pad] = volts - b;
      n = 1;
    }
    for (; n < to; n++) {
      const a = samplesA[n + offsetA]!;
      const b = samplesB[n + offsetB]!;
      const now = weightA * a + weightB * b;
      volts = p * volts + (q0 * last + q1 * now);
      last = now;
      record[n] = volts;
      outA[n + pad] = volts - a;
      outB[n + pad] = volts - b;
    }
    state[0] = volts;
    state[1] = last;
  };
}

/** From rest: a node with capacitance starts at nothing, one without follows at once. */
function atStart(q0: number, q1: number, current: number): number {
  return q0 === 0 ? q1 * current : 0;
}

/** A node with no line or with three and more. */
export function junctionWorker(
  { p, q0, q1 }: NodeUpdate,
  ports: readonly PortWave[],
  drive: Float64Array | null,
  pad: number,
  record: Float64Array,
): Worker {
  const state = new Float64Array(2);
  return (from, to) => {
    if (drive) for (let n = from; n < to; n++) record[n] = drive[n]!;
    else record.fill(0, from, to);
    for (const { weight, samples, offset } of ports)
      for (let n = from; n < to; n++) record[n] = record[n]! + weight * samples[n + offset]!;
    let volts = state[0]!;
    let last = state[1]!;
    for (let n = from; n < to; n++) {
      const now = record[n]!;
      volts = n === 0 ? atStart(q0, q1, now) : p * volts + (q0 * last + q1 * now);
      last = now;
      record[n] = volts;
    }
    state[0] = volts;
    state[1] = last;
    for (const { samples, offset, out } of ports)
      for (let n = from; n < to; n++) out[n + pad] = record[n]! - samples[n + offset]!;
  };
}
