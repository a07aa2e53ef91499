import { DomainError } from "../errors";
import type { PortData } from "./port-data";

/**
 * Transfer (T) parameters of a two-port: [b1, a1] = T [a2, b2].
 *
 *     T = 1/S21 · [[S12 S21 − S11 S22, S11], [−S22, 1]]
 *
 * @returns re, im of T11, T12, T21, T22 at k · 8; a chain of parts is the product of their T
 * @throws DomainError where it is no two-port, or nothing passes (S21 = 0)
 * @see Frickey 1994 as in `chainFromScattering`, with this order of waves
 */
export function transferFromScattering(data: PortData): Float64Array {
  if (data.ports !== 2)
    throw new DomainError(`A transfer matrix needs two ports; the data have ${data.ports}.`, "ports");
  const s = data.values;
  const t = new Float64Array(s.length);
  for (let at = 0; at < s.length; at += 8) {
    const [ar, ai, br, bi] = [s[at]!, s[at + 1]!, s[at + 2]!, s[at + 3]!];
    const [cr, ci, dr, di] = [s[at + 4]!, s[at + 5]!, s[at + 6]!, s[at + 7]!];
    const size = cr * cr + ci * ci;
    if (!(size > 0)) throw new DomainError("Nothing passes from port 1 to port 2.", `values[${at / 8}]`);
    const put = (offset: number, re: number, im: number) => {
      t[at + offset] = (re * cr + im * ci) / size;
      t[at + offset + 1] = (im * cr - re * ci) / size;
    };
    put(0, br * cr - bi * ci - ar * dr + ai * di, br * ci + bi * cr - ar * di - ai * dr);
    put(2, ar, ai);
    put(4, -dr, -di);
    put(6, 1, 0);
  }
  return t;
}

/** The way back. @param references of the two ports [Ω]. @throws DomainError where T22 = 0 */
export function scatteringFromTransfer(
  t: Float64Array,
  frequencies: Float64Array,
  references: Float64Array,
): PortData {
  const values = new Float64Array(t.length);
  for (let at = 0; at < t.length; at += 8) {
    const [ar, ai, br, bi] = [t[at]!, t[at + 1]!, t[at + 2]!, t[at + 3]!];
    const [cr, ci, dr, di] = [t[at + 4]!, t[at + 5]!, t[at + 6]!, t[at + 7]!];
    const size = dr * dr + di * di;
    if (!(size > 0)) throw new DomainError("A transfer matrix lets nothing pass.", `values[${at / 8}]`);
    const put = (offset: number, re: number, im: number) => {
      values[at + offset] = (re * dr + im * di) / size;
      values[at + offset + 1] = (im * dr - re * di) / size;
    };
    put(0, br, bi);
    put(2, ar * dr - ai * di - br * cr + bi * ci, ar * di + ai * dr - br * ci - bi * cr);
    put(4, 1, 0);
    put(6, -cr, -ci);
  }
  return { ports: 2, frequencies, references, values };
}
