import { clampCurrent, currentAt, type CornerTables } from "./iv-tables";
import type { SmoothWave } from "./smooth-wave";

/** A given waveform at the pin and the fixture it was taken in. */
export interface FixtureWave {
  wave: SmoothWave;
  /** [Ω], [V], [F] */
  resistance: number;
  volts: number;
  capacitance: number;
}

/** How far the pullup and the pulldown are switched on, over time from the edge's start. */
export interface SwitchWeights {
  /** [s] */
  time: number[];
  up: number[];
  down: number[];
}

/** A share of each equation's own size that pulls a weight towards the one before, where the equations say little. */
const RIDGE = 1e-9;

/**
 * Switching weights from waveforms. At each time the current into fixture, die capacitance and clamps is what the two
 * switched tables give together:
 *
 *     kU·pullup(supply − vₙ) − kD·pulldown(vₙ) = (vₙ − Vfₙ)/Rfₙ + (C + Cfₙ) dvₙ/dt + clamps(vₙ),   n = 1, 2
 *
 * Two waveforms in different fixtures: two equations, two unknowns. One: kD = 1 − kU is the second. A model that only
 * pulls one way: its one weight.
 *
 * @param times  [s], at which weights are wanted
 * @see P. F. Tehrani, Y. Chen, J. Fang, "Extraction of transient behavioral model of digital I/O buffers from IBIS",
 *   Proc. 46th Electronic Components and Technology Conference, 1996, p. 1009
 */
export function switchWeights(
  tables: CornerTables,
  capacitance: number,
  waves: readonly FixtureWave[],
  times: readonly number[],
  rest: { up: number; down: number },
): SwitchWeights {
  const found: SwitchWeights = { time: [...times], up: [], down: [] };
  let { up, down } = rest;
  const isOneWay = !tables.pullup || !tables.pulldown;
  for (const time of times) {
    // Normal equations of least squares, with a weak pull to the weights before.
    let [uu, ud, dd, ub, db] = [0, 0, 0, 0, 0];
    for (const fixture of waves) {
      const { volts, slope } = fixture.wave.at(time);
      const demand =
        (volts - fixture.volts) / fixture.resistance +
        (capacitance + fixture.capacitance) * slope +
        clampCurrent(tables, volts);
      const a = currentAt(tables.pullup, tables.supply - volts);
      const b = -currentAt(tables.pulldown, volts);
      uu += a * a;
      ud += a * b;
      dd += b * b;
      ub += a * demand;
      db += b * demand;
    }
    if (isOneWay) {
      if (tables.pullup) up = (ub + RIDGE * uu * up) / (uu * (1 + RIDGE) || 1);
      else down = (db + RIDGE * dd * down) / (dd * (1 + RIDGE) || 1);
    } else if (waves.length === 1) {
      // kD = 1 − kU: a·kU + b·(1 − kU) = demand, in squares
      const size = uu - 2 * ud + dd;
      if (size > 0) up = (ub - ud - db + dd + RIDGE * size * up) / (size * (1 + RIDGE));
      down = 1 - up;
    } else {
      const ridge = RIDGE * (uu + dd) || 1e-30;
      const [p, q] = [uu + ridge, dd + ridge];
      const [f, g] = [ub + ridge * up, db + ridge * down];
      const det = p * q - ud * ud;
      if (det > 0) [up, down] = [(q * f - ud * g) / det, (p * g - ud * f) / det];
    }
    found.up.push(up);
    found.down.push(down);
  }
  return found;
}
