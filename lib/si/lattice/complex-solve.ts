/** Row after row, real and imaginary parts apart. */
export interface ComplexArray {
  re: Float64Array;
  im: Float64Array;
}

/**
 * Solves M x = b in place by elimination with row pivoting; both are overwritten and the solution is left in `b`.
 *
 * @returns false where M is singular to rounding
 */
export function solveComplexInPlace(m: ComplexArray, b: ComplexArray, n: number): boolean {
  const { re, im } = m;
  for (let k = 0; k < n; k++) {
    let best = k;
    let size = 0;
    for (let i = k; i < n; i++) {
      const candidate = Math.abs(re[i * n + k]!) + Math.abs(im[i * n + k]!);
      if (candidate > size) {
        size = candidate;
        best = i;
      }
    }
    if (!(size > 1e-300)) return false;
    if (best !== k)
      for (const part of [re, im, b.re, b.im]) {
        const width = part === re || part === im ? n : 1;
        for (let j = 0; j < width; j++) {
          const kept = part[best * width + j]!;
          part[best * width + j] = part[k * width + j]!;
          part[k * width + j] = kept;
        }
      }
    const pr = re[k * n + k]!;
    const pi = im[k * n + k]!;
    const square = pr * pr + pi * pi;
    for (let i = k + 1; i < n; i++) {
      const ar = re[i * n + k]!;
      const ai = im[i * n + k]!;
      if (ar === 0 && ai === 0) continue;
      const fr = (ar * pr + ai * pi) / square;
      const fi = (ai * pr - ar * pi) / square;
      for (let j = k + 1; j < n; j++) {
        const ur = re[k * n + j]!;
        const ui = im[k * n + j]!;
        re[i * n + j] = re[i * n + j]! - (fr * ur - fi * ui);
        im[i * n + j] = im[i * n + j]! - (fr * ui + fi * ur);
      }
      b.re[i] = b.re[i]! - (fr * b.re[k]! - fi * b.im[k]!);
      b.im[i] = b.im[i]! - (fr * b.im[k]! + fi * b.re[k]!);
    }
  }
  for (let k = n - 1; k >= 0; k--) {
    let sr = b.re[k]!;
    let si = b.im[k]!;
    for (let j = k + 1; j < n; j++) {
      const ur = re[k * n + j]!;
      const ui = im[k * n + j]!;
      sr -= ur * b.re[j]! - ui * b.im[j]!;
      si -= ur * b.im[j]! + ui * b.re[j]!;
    }
    const pr = re[k * n + k]!;
    const pi = im[k * n + k]!;
    const square = pr * pr + pi * pi;
    b.re[k] = (sr * pr + si * pi) / square;
    b.im[k] = (si * pr - sr * pi) / square;
  }
  return true;
}
