/** Inverse of a 1 × 1 or 2 × 2 matrix. */
export function inverse(m: number[][]): number[][] {
  if (m.length === 1) return [[1 / m[0]![0]!]];
  const [a, b, c, d] = [m[0]![0]!, m[0]![1]!, m[1]![0]!, m[1]![1]!];
  const det = a * d - b * c;
  return [
    [d / det, -b / det],
    [-c / det, a / det],
  ];
}
