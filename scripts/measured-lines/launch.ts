import { cascade, type TwoPortChain } from "../../lib/si";

/** An edge connector: 50 Ω line, then a coil in the pin and the capacitance of its pad. */
export interface Launch {
  /** [s] */
  delay: number;
  /** [F] */
  capacitance: number;
  /** [H] */
  inductance: number;
  /** of the 50 Ω line at 1 GHz, growing with √f [dB] */
  loss: number;
}

const REFERENCE = 50;

/** From the connector to the board. */
export function launchChain(launch: Launch, frequencies: Float64Array): TwoPortChain {
  const line = new Float64Array(8 * frequencies.length);
  const coil = new Float64Array(8 * frequencies.length);
  const pad = new Float64Array(8 * frequencies.length);
  frequencies.forEach((f, k) => {
    const omega = 2 * Math.PI * f;
    const a = (launch.loss / 8.685889638) * Math.sqrt(f / 1e9);
    const b = omega * launch.delay;
    const cosh = [Math.cosh(a) * Math.cos(b), Math.sinh(a) * Math.sin(b)];
    const [re, im] = [Math.sinh(a) * Math.cos(b), Math.cosh(a) * Math.sin(b)];
    line.set([...cosh, re * REFERENCE, im * REFERENCE, re / REFERENCE, im / REFERENCE, ...cosh], 8 * k);
    coil.set([1, 0, 0, omega * launch.inductance, 0, 0, 1, 0], 8 * k);
    pad.set([1, 0, 0, 0, 0, omega * launch.capacitance, 1, 0], 8 * k);
  });
  const chain = (values: Float64Array) => ({ frequencies, values });
  return cascade(cascade(chain(line), chain(coil)), chain(pad));
}

/** The same part seen from its other end: A and D change places. */
export function mirrored({ frequencies, values }: TwoPortChain): TwoPortChain {
  const turned = values.slice();
  for (let at = 0; at < turned.length; at += 8) {
    turned.set(values.subarray(at + 6, at + 8), at);
    turned.set(values.subarray(at, at + 2), at + 6);
  }
  return { frequencies, values: turned };
}
