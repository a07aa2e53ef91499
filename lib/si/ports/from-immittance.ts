import { DomainError } from "../errors";
import { portIndex, type PortData } from "./port-data";

/**
 * Scattering parameters from impedance or admittance matrices, all in the layout of PortData.
 *
 *     S = (z − 1)(z + 1)⁻¹ with z = R^−½ Z R^−½;   S = (1 − y)(1 + y)⁻¹ with y = R^½ Y R^½
 *
 * @param values  Z [Ω] or Y [S]
 * @returns exact to rounding
 * @throws DomainError where the matrix to invert is singular
 */
export function scatteringFromImmittance(
  kind: "Z" | "Y",
  { ports, frequencies, references, values }: PortData,
): PortData {
  const out = new Float64Array(values.length);
  const n = ports;
  for (let k = 0; k < frequencies.length; k++) {
    // Sᵀ from (m + 1)ᵀ Sᵀ = ±(m − 1)ᵀ: rows of the transposed system, solved at once.
    const width = 2 * n;
    const re = new Float64Array(n * width);
    const im = new Float64Array(n * width);
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) {
        const at = portIndex(n, k, j, i);
        const scale = Math.sqrt(references[i]! * references[j]!) ** (kind === "Z" ? -1 : 1);
        const [a, b] = [values[at]! * scale, values[at + 1]! * scale];
        const one = i === j ? 1 : 0;
        const sign = kind === "Z" ? 1 : -1;
        re[i * width + j] = a + one;
        im[i * width + j] = b;
        re[i * width + n + j] = sign * (a - one);
        im[i * width + n + j] = sign * b;
      }
    solve(re, im, n, width, frequencies[k]!);
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) {
        const at = portIndex(n, k, j, i);
        out[at] = re[i * width + n + j]!;
        out[at + 1] = im[i * width + n + j]!;
      }
  }
  return { ports, frequencies, references, values: out };
}

/** Gauss–Jordan with row pivots, in place; the right half becomes the solution. */
function solve(re: Float64Array, im: Float64Array, n: number, width: number, frequency: number): void {
  for (let p = 0; p < n; p++) {
    let best = p;
    const size = (row: number) => re[row * width + p]! ** 2 + im[row * width + p]! ** 2;
    for (let row = p + 1; row < n; row++) if (size(row) > size(best)) best = row;
    const pivot = size(best);
    if (!(pivot > 0) || !Number.isFinite(pivot))
      throw new DomainError(
        `The matrix at ${frequency} Hz has no scattering parameters; a port would give power without end.`,
        "values",
      );
    for (let c = 0; c < width; c++) {
      const [a, b] = [best * width + c, p * width + c];
      [re[a], re[b]] = [re[b]!, re[a]!];
      [im[a], im[b]] = [im[b]!, im[a]!];
    }
    const [pr, pi] = [re[p * width + p]! / pivot, -im[p * width + p]! / pivot];
    for (let c = p; c < width; c++) {
      const [a, b] = [re[p * width + c]!, im[p * width + c]!];
      re[p * width + c] = a * pr - b * pi;
      im[p * width + c] = a * pi + b * pr;
    }
    for (let row = 0; row < n; row++) {
      const [fr, fi] = [re[row * width + p]!, im[row * width + p]!];
      if (row === p || (fr === 0 && fi === 0)) continue;
      for (let c = p; c < width; c++) {
        const [a, b] = [re[p * width + c]!, im[p * width + c]!];
        re[row * width + c] = re[row * width + c]! - (fr * a - fi * b);
        im[row * width + c] = im[row * width + c]! - (fr * b + fi * a);
      }
    }
  }
}
