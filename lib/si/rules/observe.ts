import { DomainError } from "../errors";
import type { PathProbe } from "../path/network";
import { newReading, readEdge, type EdgeLevels, type EdgeReading } from "./read-edge";
import type { Edge, Observation } from "./rule";

const reading: EdgeReading = newReading();
const levels: EdgeLevels = { low: 0, high: 0, near: 0, meas: 0, far: 0 };

interface Wave {
  time: Float64Array;
  voltage: Float64Array;
  until: number;
  /** 0–100 % of the source, from t = 0 to its supply [s] */
  ramp: number;
}

/**
 * Fills `seen` with what a probe shows after a rising edge, or, read on its mirror, after the falling one. Its path,
 * driver, corner and window are already set.
 */
export function observe(seen: Observation, probe: PathProbe, edge: Edge, wave: Wave): void {
  const { receiver } = probe;
  const { low, high } = probe.levels[seen.corner.driver];
  if (!(high - low > 0))
    throw new DomainError(
      `${probe.pin.pin} has no swing: its level is ${high.toFixed(2)} V whether the driver is high or low.`,
      "parts",
    );
  // Levels of the simulated wave: without the bias behind a coupling capacitor.
  const shift = probe.offset;
  const mirror = low + high;
  const seenAs = (volts: number) => (edge === "rise" ? volts : mirror - volts) - shift;
  const meas = receiver.vmeas ?? receiver.vdd / 2;
  const dc = edge === "rise" ? receiver.vih : receiver.vil;
  const ac = edge === "rise" ? (receiver.vihAc ?? receiver.vih) : (receiver.vilAc ?? receiver.vil);
  const near = edge === "rise" ? receiver.vil : receiver.vih;
  levels.low = low - shift;
  levels.high = high - shift;
  levels.near = seenAs(near ?? meas);
  levels.meas = seenAs(meas);
  levels.far = ac === null ? Infinity : seenAs(ac);
  readEdge(wave.time, wave.voltage, wave.until, levels, reading);

  seen.edge = edge;
  seen.receiverPin = probe.pin;
  seen.receiver = receiver;
  seen.low = low;
  seen.high = high;
  const rising = edge === "rise";
  seen.max = rising ? reading.max + shift : mirror - (reading.min + shift);
  seen.min = rising ? reading.min + shift : mirror - (reading.max + shift);
  seen.maxTime = rising ? reading.maxTime : reading.minTime;
  seen.minTime = rising ? reading.minTime : reading.maxTime;
  seen.firstThreshold = orNull(reading.nearCrossing);
  seen.measCrossing = orNull(reading.measCrossing);
  seen.settled = orNull(reading.settled);
  seen.ringbackMargin = dc === null || Number.isNaN(reading.dipLevel) ? null : reading.dipLevel - seenAs(dc);
  seen.ringbackTime = orNull(reading.dipTime);
  const share = Math.min(1, Math.max(0, meas / seen.driver.vdd));
  seen.sourceCrossing = wave.ramp * (rising ? share : 1 - share);
}

function orNull(value: number): number | null {
  return Number.isNaN(value) ? null : value;
}
