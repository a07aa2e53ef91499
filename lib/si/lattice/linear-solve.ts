import { NotConvergedError } from "../errors";

/**
 * Solves M X = B in place by elimination with row pivoting; both are overwritten and the solution is left in `b`.
 *
 * @param m     n × n, row after row
 * @param b     n × columns, row after row
 * @throws NotConvergedError where M is singular
 */
export function solveInPlace(m: Float64Array, b: Float64Array, n: number, columns: number): void {
  for (let k = 0; k < n; k++) {
    let best = k;
    let size = Math.abs(m[k * n + k]!);
    for (let i = k + 1; i < n; i++) {
      const candidate = Math.abs(m[i * n + k]!);
      if (candidate > size) {
        size = candidate;
        best = i;
      }
    }
    if (!(size > 0))
      throw new NotConvergedError("The network leaves a node without any defined voltage.", size, k);
    if (best !== k) {
      swapRows(m, best, k, n);
      swapRows(b, best, k, columns);
    }
    const pivot = 1 / m[k * n + k]!;
    for (let i = k + 1; i < n; i++) {
      const factor = m[i * n + k]! * pivot;
      if (factor === 0) continue;
      for (let j = k + 1; j < n; j++) m[i * n + j] = m[i * n + j]! - factor * m[k * n + j]!;
      for (let j = 0; j < columns; j++)
        b[i * columns + j] = b[i * columns + j]! - factor * b[k * columns + j]!;
    }
  }
  for (let k = n - 1; k >= 0; k--) {
    const pivot = 1 / m[k * n + k]!;
    for (let j = 0; j < columns; j++) {
      let sum = b[k * columns + j]!;
      for (let i = k + 1; i < n; i++) sum -= m[k * n + i]! * b[i * columns + j]!;
      b[k * columns + j] = sum * pivot;
    }
  }
}

function swapRows(m: Float64Array, a: number, b: number, width: number) {
  for (let j = 0; j < width; j++) {
    const kept = m[a * width + j]!;
    m[a * width + j] = m[b * width + j]!;
    m[b * width + j] = kept;
  }
}
