/**
 * LU factors in place, A = L U with unit lower triangle; row-major with stride `stride`. The leading block's factors are
 * the leading block of the factors. No pivoting: collocation and flux rows dominate their diagonals. Four pivots are
 * eliminated at a time, which halves the traffic with memory.
 */
export function factorise(a: Float64Array, n: number, stride: number): void {
  let k = 0;
  for (; k + 4 <= n; k += 4) {
    const r0 = k * stride;
    const r1 = r0 + stride;
    const r2 = r1 + stride;
    const r3 = r2 + stride;
    for (let p = 0; p < 3; p++) {
      const rowP = (k + p) * stride;
      const inverse = 1 / a[rowP + k + p]!;
      for (let q = p + 1; q < 4; q++) {
        const rowQ = (k + q) * stride;
        const factor = a[rowQ + k + p]! * inverse;
        a[rowQ + k + p] = factor;
        for (let j = k + p + 1; j < n; j++) a[rowQ + j]! -= factor * a[rowP + j]!;
      }
    }
    const d0 = 1 / a[r0 + k]!;
    const d1 = 1 / a[r1 + k + 1]!;
    const d2 = 1 / a[r2 + k + 2]!;
    const d3 = 1 / a[r3 + k + 3]!;
    for (let i = k + 4; i < n; i++) {
      const row = i * stride;
      const f0 = a[row + k]! * d0;
      const f1 = (a[row + k + 1]! - f0 * a[r0 + k + 1]!) * d1;
      const f2 = (a[row + k + 2]! - f0 * a[r0 + k + 2]! - f1 * a[r1 + k + 2]!) * d2;
      const f3 = (a[row + k + 3]! - f0 * a[r0 + k + 3]! - f1 * a[r1 + k + 3]! - f2 * a[r2 + k + 3]!) * d3;
      a[row + k] = f0;
      a[row + k + 1] = f1;
      a[row + k + 2] = f2;
      a[row + k + 3] = f3;
    }
    eliminate(a, n, stride, k);
  }
  for (; k < n; k++) {
    const rowK = k * stride;
    const inverse = 1 / a[rowK + k]!;
    for (let i = k + 1; i < n; i++) {
      const rowI = i * stride;
      const factor = a[rowI + k]! * inverse;
      a[rowI + k] = factor;
      for (let j = k + 1; j < n; j++) a[rowI + j]! -= factor * a[rowK + j]!;
    }
  }
}

/** Subtracts from rows k + 4 … what the four pivot rows k … k + 3 contribute; two rows at a time share their loads. */
function eliminate(a: Float64Array, n: number, stride: number, k: number): void {
  const r0 = k * stride;
  const r1 = r0 + stride;
  const r2 = r1 + stride;
  const r3 = r2 + stride;
  let i = k + 4;
  for (; i + 2 <= n; i += 2) {
    const p = i * stride;
    const q = p + stride;
    const f0 = a[p + k]!;
    const f1 = a[p + k + 1]!;
    const f2 = a[p + k + 2]!;
    const f3 = a[p + k + 3]!;
    const g0 = a[q + k]!;
    const g1 = a[q + k + 1]!;
    const g2 = a[q + k + 2]!;
    const g3 = a[q + k + 3]!;
    for (let j = k + 4; j < n; j++) {
      const u0 = a[r0 + j]!;
      const u1 = a[r1 + j]!;
      const u2 = a[r2 + j]!;
      const u3 = a[r3 + j]!;
      a[p + j] = a[p + j]! - f0 * u0 - f1 * u1 - f2 * u2 - f3 * u3;
      a[q + j] = a[q + j]! - g0 * u0 - g1 * u1 - g2 * u2 - g3 * u3;
    }
  }
  for (; i < n; i++) {
    const p = i * stride;
    for (let m = 0; m < 4; m++) {
      const f = a[p + k + m]!;
      const row = r0 + m * stride;
      for (let j = k + 4; j < n; j++) a[p + j]! -= f * a[row + j]!;
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
