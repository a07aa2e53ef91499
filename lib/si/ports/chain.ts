import { DomainError } from "../errors";
import { requireAlike, type PortData, type TwoPortChain } from "./port-data";

type Four = [
  aRe: number,
  aIm: number,
  bRe: number,
  bIm: number,
  cRe: number,
  cIm: number,
  dRe: number,
  dIm: number,
];

/**
 * Chain matrix of a two-port from its scattering parameters.
 *
 *     A = √(R1/R2) ((1 + S11)(1 − S22) + S12 S21)/2S21,   B = √(R1R2) ((1 + S11)(1 + S22) − S12 S21)/2S21
 *     C = ((1 − S11)(1 − S22) − S12 S21)/(2S21 √(R1R2)),  D = √(R2/R1) ((1 − S11)(1 + S22) + S12 S21)/2S21
 *
 * @returns exact to rounding
 * @throws DomainError where it is no two-port, or nothing passes (S21 = 0)
 * @see D. A. Frickey, "Conversions between S, Z, Y, h, ABCD, and T parameters which are valid for complex source and
 *   load impedances", IEEE Trans. MTT 42, 1994, p. 205, table I (real references)
 */
export function chainFromScattering(data: PortData): TwoPortChain {
  if (data.ports !== 2)
    throw new DomainError(`A chain matrix needs two ports; the data have ${data.ports}.`, "ports");
  const n = data.frequencies.length;
  const values = new Float64Array(8 * n);
  const [r1, r2] = [data.references[0]!, data.references[1]!];
  const ratio = Math.sqrt(r1 / r2);
  const mean = Math.sqrt(r1 * r2);
  for (let k = 0; k < n; k++) {
    const s = data.values.subarray(8 * k, 8 * k + 8);
    const [s11r, s11i, s12r, s12i, s21r, s21i, s22r, s22i] = s as unknown as Four;
    const size = s21r * s21r + s21i * s21i;
    if (!(size > 0))
      throw new DomainError(
        `Nothing passes from port 1 to port 2 at ${data.frequencies[k]} Hz.`,
        `values[${k}]`,
      );
    const crossR = s12r * s21r - s12i * s21i;
    const crossI = s12r * s21i + s12i * s21r;
    const productR = s11r * s22r - s11i * s22i;
    const productI = s11r * s22i + s11i * s22r;
    // 1 ± S11 ± S22 ± (S11 S22 − S12 S21), each over 2 S21
    const over = (re: number, im: number, factor: number, at: number) => {
      values[8 * k + at] = (factor * (re * s21r + im * s21i)) / (2 * size);
      values[8 * k + at + 1] = (factor * (im * s21r - re * s21i)) / (2 * size);
    };
    over(1 + s11r - s22r - productR + crossR, s11i - s22i - productI + crossI, ratio, 0);
    over(1 + s11r + s22r + productR - crossR, s11i + s22i + productI - crossI, mean, 2);
    over(1 - s11r - s22r + productR - crossR, -s11i - s22i + productI - crossI, 1 / mean, 4);
    over(1 - s11r + s22r - productR + crossR, -s11i + s22i - productI + crossI, 1 / ratio, 6);
  }
  return { frequencies: data.frequencies, values };
}

/**
 * The way back, against references of choice [Ω].
 * @throws DomainError for references that are not above zero
 */
export function scatteringFromChain(chain: TwoPortChain, r1: number, r2: number): PortData {
  if (!(r1 > 0 && r2 > 0)) throw new DomainError("Reference impedances must be above zero.", "references");
  const n = chain.frequencies.length;
  const values = new Float64Array(8 * n);
  const mean = Math.sqrt(r1 * r2);
  for (let k = 0; k < n; k++) {
    const [aR, aI, bR, bI, cR, cI, dR, dI] = chain.values.subarray(8 * k, 8 * k + 8) as unknown as Four;
    // over the common denominator A R2 + B + C R1 R2 + D R1
    const [p, q] = [aR * r2, aI * r2];
    const [u, v] = [cR * r1 * r2, cI * r1 * r2];
    const [x, y] = [dR * r1, dI * r1];
    const re = p + bR + u + x;
    const im = q + bI + v + y;
    const size = re * re + im * im;
    const put = (at: number, a: number, b: number) => {
      values[8 * k + at] = (a * re + b * im) / size;
      values[8 * k + at + 1] = (b * re - a * im) / size;
    };
    put(0, p + bR - u - x, q + bI - v - y);
    put(
      2,
      2 * mean * (aR * dR - aI * dI - bR * cR + bI * cI),
      2 * mean * (aR * dI + aI * dR - bR * cI - bI * cR),
    );
    put(4, 2 * mean, 0);
    put(6, -p + bR - u + x, -q + bI - v + y);
  }
  return { ports: 2, frequencies: chain.frequencies, references: Float64Array.of(r1, r2), values };
}

/** Two two-ports one after the other: the product of their chain matrices. @throws DomainError for other frequencies */
export function cascade(first: TwoPortChain, second: TwoPortChain): TwoPortChain {
  requireAlike(first, second);
  const values = new Float64Array(first.values.length);
  for (let at = 0; at < values.length; at += 8) multiply(first.values, second.values, values, at);
  return { frequencies: first.frequencies, values };
}

/** Inverse of each chain matrix. @throws DomainError where one has none */
export function invertChain({ frequencies, values: m }: TwoPortChain): TwoPortChain {
  const values = new Float64Array(m.length);
  for (let at = 0; at < m.length; at += 8) {
    const [aR, aI, bR, bI, cR, cI, dR, dI] = m.subarray(at, at + 8) as unknown as Four;
    const re = aR * dR - aI * dI - bR * cR + bI * cI;
    const im = aR * dI + aI * dR - bR * cI - bI * cR;
    const size = re * re + im * im;
    if (!(size > 0)) throw new DomainError("A chain matrix has no inverse here.", `values[${at / 8}]`);
    const put = (offset: number, x: number, y: number) => {
      values[at + offset] = (x * re + y * im) / size;
      values[at + offset + 1] = (y * re - x * im) / size;
    };
    put(0, dR, dI);
    put(2, -bR, -bI);
    put(4, -cR, -cI);
    put(6, aR, aI);
  }
  return { frequencies, values };
}

/** What lies between two known parts: M = left⁻¹ · whole · right⁻¹. @throws DomainError as the others */
export function deEmbed(left: TwoPortChain, whole: TwoPortChain, right: TwoPortChain): TwoPortChain {
  return cascade(cascade(invertChain(left), whole), invertChain(right));
}

function multiply(a: Float64Array, b: Float64Array, out: Float64Array, at: number): void {
  for (let row = 0; row < 2; row++)
    for (let column = 0; column < 2; column++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < 2; k++) {
        const p = at + 4 * row + 2 * k;
        const q = at + 4 * k + 2 * column;
        re += a[p]! * b[q]! - a[p + 1]! * b[q + 1]!;
        im += a[p]! * b[q + 1]! + a[p + 1]! * b[q]!;
      }
      out[at + 4 * row + 2 * column] = re;
      out[at + 4 * row + 2 * column + 1] = im;
    }
}
