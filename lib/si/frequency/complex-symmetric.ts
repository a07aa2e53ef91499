/**
 * Solves A x = b for complex symmetric A (not Hermitian) by L D Lᵀ without pivoting, in place. The matrices of passive
 * conductors have positive definite real and imaginary parts, for which this is stable.
 *
 * @param re, im  lower triangle of A, row-major, n × n; destroyed
 * @param rhs     right-hand sides; overwritten by the solutions
 */
export function solveComplexSymmetric(
  re: Float64Array,
  im: Float64Array,
  n: number,
  rhs: { re: Float64Array; im: Float64Array }[],
): void {
  const dr = new Float64Array(n);
  const di = new Float64Array(n);
  // row by row: on entry row i holds A; on leaving L below, D on the diagonal. w = L·D of the row in hand
  const wr = new Float64Array(n);
  const wi = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const rowI = i * n;
    for (let j = 0; j < i; j++) {
      const rowJ = j * n;
      let sr = re[rowI + j]!;
      let si = im[rowI + j]!;
      for (let k = 0; k < j; k++) {
        const ar = wr[k]!;
        const ai = wi[k]!;
        const br = re[rowJ + k]!;
        const bi = im[rowJ + k]!;
        sr -= ar * br - ai * bi;
        si -= ar * bi + ai * br;
      }
      wr[j] = sr;
      wi[j] = si;
    }
    let pr = re[rowI + i]!;
    let pi = im[rowI + i]!;
    for (let j = 0; j < i; j++) {
      const lr = wr[j]! * dr[j]! - wi[j]! * di[j]!;
      const li = wr[j]! * di[j]! + wi[j]! * dr[j]!;
      pr -= lr * wr[j]! - li * wi[j]!;
      pi -= lr * wi[j]! + li * wr[j]!;
      re[rowI + j] = lr;
      im[rowI + j] = li;
    }
    const size = pr * pr + pi * pi;
    dr[i] = pr / size;
    di[i] = -pi / size;
  }
  for (const b of rhs) backSolve(re, im, n, dr, di, b);
}

function backSolve(
  re: Float64Array,
  im: Float64Array,
  n: number,
  dr: Float64Array,
  di: Float64Array,
  b: { re: Float64Array; im: Float64Array },
): void {
  for (let i = 0; i < n; i++) {
    let sr = b.re[i]!;
    let si = b.im[i]!;
    for (let k = 0; k < i; k++) {
      sr -= re[i * n + k]! * b.re[k]! - im[i * n + k]! * b.im[k]!;
      si -= re[i * n + k]! * b.im[k]! + im[i * n + k]! * b.re[k]!;
    }
    b.re[i] = sr;
    b.im[i] = si;
  }
  for (let i = n - 1; i >= 0; i--) {
    const sr = b.re[i]! * dr[i]! - b.im[i]! * di[i]!;
    const si = b.re[i]! * di[i]! + b.im[i]! * dr[i]!;
    b.re[i] = sr;
    b.im[i] = si;
  }
  for (let i = n - 1; i >= 0; i--) {
    const xr = b.re[i]!;
    const xi = b.im[i]!;
    for (let k = 0; k < i; k++) {
      b.re[k]! -= re[i * n + k]! * xr - im[i * n + k]! * xi;
      b.im[k]! -= re[i * n + k]! * xi + im[i * n + k]! * xr;
    }
  }
}
