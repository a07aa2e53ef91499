/**
 * Levenberg–Marquardt with forward differences; for a handful of unknowns.
 *
 * @param steps  a typical change of each unknown, which also is the unit in which it is damped
 * @returns the unknowns of the least sum of squares found
 * @see D. W. Marquardt, "An algorithm for least-squares estimation of nonlinear parameters", J. SIAM 11, 1963, p. 431
 */
export function leastSquares(
  residuals: (unknowns: readonly number[]) => Float64Array,
  start: readonly number[],
  steps: readonly number[],
  turns = 30,
): number[] {
  let at = [...start];
  let here = residuals(at);
  let sum = squares(here);
  let damping = 1e-3;
  for (let turn = 0; turn < turns; turn++) {
    const slopes = at.map((value, i) => {
      const moved = residuals(at.map((old, j) => (i === j ? value + 1e-3 * steps[i]! : old)));
      return moved.map((value, k) => (value - here[k]!) / 1e-3);
    });
    const normal = slopes.map((a) => slopes.map((b) => dot(a, b)));
    const right = slopes.map((a) => -dot(a, here));
    const change = solve(
      normal.map((row, i) => row.map((value, j) => (i === j ? value * (1 + damping) : value))),
      right,
    );
    const next = at.map((value, i) => value + change[i]! * steps[i]!);
    const there = residuals(next);
    const better = squares(there);
    if (better < sum) {
      const gained = (sum - better) / sum;
      [at, here, sum] = [next, there, better];
      damping /= 5;
      if (gained < 1e-9) break;
    } else damping *= 8;
  }
  return at;
}

function dot(a: Float64Array, b: Float64Array): number {
  return a.reduce((sum, value, i) => sum + value * b[i]!, 0);
}

function squares(values: Float64Array): number {
  return dot(values, values);
}

function solve(matrix: number[][], right: number[]): number[] {
  const n = right.length;
  const rows = matrix.map((row, i) => [...row, right[i]!]);
  for (let p = 0; p < n; p++) {
    const best = rows
      .slice(p)
      .reduce((b, row, i) => (Math.abs(row[p]!) > Math.abs(rows[b]![p]!) ? p + i : b), p);
    [rows[p], rows[best]] = [rows[best]!, rows[p]!];
    for (let i = 0; i < n; i++) {
      if (i === p) continue;
      const factor = rows[i]![p]! / rows[p]![p]!;
      for (let c = p; c <= n; c++) rows[i]![c]! -= factor * rows[p]![c]!;
    }
  }
  return rows.map((row, i) => row[n]! / row[i]!);
}
