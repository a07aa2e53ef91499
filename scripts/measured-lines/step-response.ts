import { portEntry, type PortData } from "../../lib/si";

/** Standard deviation of the Gaussian edge [s]; its 10–90 % time is 2.563 times that. */
export const EDGE = 58.5e-12;

/**
 * A port's answer to a unit step with a Gaussian edge, from scattering parameters on a grid from f₁ in steps of f₁: the
 * sum over the odd harmonics of a square wave of period 1/f₁, which has long settled when it turns back.
 *
 *     v(t) = S(0)/2 + Σ 2/(πn) · exp(−(ωσ)²/2) · |S| sin(ωt + arg S),   n = 1, 3, 5 …
 *
 * S(0) is taken from the first frequency.
 */
export function stepResponse(
  data: PortData,
  row: number,
  column: number,
  times: readonly number[],
): Float64Array {
  const { re, im } = portEntry(data, row, column);
  const { frequencies } = data;
  const answer = new Float64Array(times.length).fill(re[0]! / 2);
  for (let k = 0; k < frequencies.length; k += 2) {
    const omega = 2 * Math.PI * frequencies[k]!;
    const share = (2 / (Math.PI * (k + 1))) * Math.exp(-((omega * EDGE) ** 2) / 2);
    if (share < 1e-9) break;
    times.forEach((t, i) => {
      answer[i]! += share * (re[k]! * Math.sin(omega * t) + im[k]! * Math.cos(omega * t));
    });
  }
  return answer;
}
