/**
 * LU factors in place, A = L U with unit lower triangle, rows `from` ≤ i < `to` against all rows above; the leading block
 * must already be factored. Row-major with stride `stride`. No pivoting: collocation and flux rows dominate their diagonals.
 */
export function factorise(a: Float64Array, n: number, stride: number): void {
  for (let k = 0; k < n; k++) {
    const rowK = k * stride;
    const inverse = 1 / a[rowK + k]!;
    for (let i = k + 1; i < n; i++) {
      const rowI = i * stride;
      const factor = a[rowI + k]! * inverse;
      a[rowI + k] = factor;
      if (factor === 0) continue;
      for (let j = k + 1; j < n; j++) a[rowI + j]! -= factor * a[rowK + j]!;
    }
  }
}

/** Solves with the factors of the leading n × n block, in place. */
export function backsolve(a: Float64Array, n: number, stride: number, b: Float64Array): void {
  for (let i = 0; i < n; i++) {
    let sum = b[i]!;
    const row = i * stride;
    for (let j = 0; j < i; j++) sum -= a[row + j]! * b[j]!;
    b[i] = sum;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = b[i]!;
    const row = i * stride;
    for (let j = i + 1; j < n; j++) sum -= a[row + j]! * b[j]!;
    b[i] = sum / a[row + i]!;
  }
}
