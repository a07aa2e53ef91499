import { DomainError } from "../errors";

/**
 * Scattering parameters of an N-port over frequency, power waves against real reference impedances.
 *
 * `values` holds re, im of S[row][column] at (((k · ports + row) · ports) + column) · 2 for frequency k; S[row][column] is
 * the wave out of `row` for a wave into `column`.
 */
export interface PortData {
  ports: number;
  /** [Hz], rising */
  frequencies: Float64Array;
  /** of each port [Ω], > 0 */
  references: Float64Array;
  values: Float64Array;
}

/** Where S[row][column] at frequency k begins in `values`. */
export function portIndex(ports: number, k: number, row: number, column: number): number {
  return ((k * ports + row) * ports + column) * 2;
}

/** Re and im of one entry over frequency; copies. */
export function portEntry(
  data: PortData,
  row: number,
  column: number,
): { re: Float64Array; im: Float64Array } {
  const n = data.frequencies.length;
  const re = new Float64Array(n);
  const im = new Float64Array(n);
  for (let k = 0; k < n; k++) {
    const at = portIndex(data.ports, k, row, column);
    re[k] = data.values[at]!;
    im[k] = data.values[at + 1]!;
  }
  return { re, im };
}

/** @throws DomainError where the two are no two-ports on the same frequencies */
export function requireAlike(a: TwoPortChain, b: TwoPortChain): void {
  const same =
    a.frequencies.length === b.frequencies.length &&
    a.frequencies.every((f, k) => Math.abs(f - b.frequencies[k]!) <= 1e-9 * f);
  if (!same)
    throw new DomainError(
      "The two parts are given at different frequencies, so they cannot be joined. Use the same ones for both.",
      "frequencies",
    );
}

/** Chain (ABCD) matrices over frequency: V1 = A V2 + B I2, I1 = C V2 + D I2, I2 out of port 2. */
export interface TwoPortChain {
  /** [Hz] */
  frequencies: Float64Array;
  /** re, im of A, B [Ω], C [S], D at k · 8 */
  values: Float64Array;
}
