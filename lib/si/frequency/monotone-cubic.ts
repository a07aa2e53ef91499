/**
 * Cubic through points that never overshoots them.
 * @param x  ascending     @returns the curve; its end pieces extended outside
 * @see F. N. Fritsch, J. Butland, SIAM J. Sci. Stat. Comput. 5, 1984, p. 300
 */
export function monotoneCubic(x: Float64Array, y: Float64Array): (at: number) => number {
  const n = x.length;
  if (n === 1) return () => y[0]!;
  const width = (i: number) => x[i + 1]! - x[i]!;
  const secant = (i: number) => (y[i + 1]! - y[i]!) / width(i);
  const slope = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    if (i === 0 || i === n - 1) slope[i] = secant(Math.min(i, n - 2));
    else {
      const [a, b] = [secant(i - 1), secant(i)];
      const w1 = width(i - 1) + 2 * width(i);
      const w2 = 2 * width(i - 1) + width(i);
      slope[i] = a * b <= 0 ? 0 : (w1 + w2) / (w1 / b + w2 / a);
    }
  }
  return (at) => {
    let i = 0;
    while (i < n - 2 && at > x[i + 1]!) i++;
    const h = width(i);
    const t = (at - x[i]!) / h;
    const s = 1 - t;
    return (
      y[i]! * (1 + 2 * t) * s * s +
      slope[i]! * h * t * s * s +
      y[i + 1]! * t * t * (3 - 2 * t) -
      slope[i + 1]! * h * t * t * s
    );
  };
}
