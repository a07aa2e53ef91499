import type { FilamentRow } from "./filaments";

/**
 * Fourth antiderivative of ln r: ∂⁴F/∂x²∂y² = ln √(x² + y²), but for the constant 25/12 added below.
 *
 *     F = ½[(x²y²/4 − x⁴/24 − y⁴/24) ln(x² + y²) + x³y/3 · atan(y/x) + x y³/3 · atan(x/y)]
 */
function antiderivative(x: number, y: number): number {
  const xx = x * x;
  const yy = y * y;
  const square = xx + yy;
  if (square === 0) return 0;
  const angle = Math.atan2(Math.abs(y), Math.abs(x));
  const product = Math.abs(x * y);
  return (
    ((xx * yy) / 4 - (xx * xx + yy * yy) / 24) * Math.log(square) * 0.5 +
    (product / 6) * (xx * angle + yy * (Math.PI / 2 - angle))
  );
}

const CONSTANT = -25 / 12;
/** Beyond this many times the larger side, cells act as their centres with a quadrupole term. */
const FAR = 4;
let table = new Float64Array(256);

/**
 * Mean of ln r between every cell of row a and every cell of row b, in closed form (Maxwell's geometric mean distance).
 *
 * @param mirror  b reflected at x = 0
 * @param add     receives (cell of a, cell of b, mean of ln r [ln m]); relative accuracy of a whole matrix some 1e-6
 * @see E. B. Rosa, F. W. Grover, "Formulas and tables for the calculation of mutual and self-inductance", Bull. Bureau
 *   of Standards 8, 1912, for the notion; the antiderivative is checked against quadrature in the tests
 */
export function meanLogDistances(
  a: FilamentRow,
  b: FilamentRow,
  mirror: boolean,
  add: (i: number, j: number, mean: number) => void,
): void {
  const na = a.edges.length;
  const nb = b.edges.length;
  if (table.length < na * nb) table = new Float64Array(na * nb);
  const sign = mirror ? -1 : 1;
  const heightA = a.y1 - a.y0;
  const heightB = b.y1 - b.y0;
  const dy = (a.y0 + a.y1 - b.y0 - b.y1) / 2;
  // mirrored, b's edges run downward; both differences keep their sign together
  for (let i = 0; i < na; i++) {
    for (let j = 0; j < nb; j++) {
      const x = a.edges[i]! - sign * b.edges[j]!;
      table[i * nb + j] =
        antiderivative(x, a.y1 - b.y0) +
        antiderivative(x, a.y0 - b.y1) -
        antiderivative(x, a.y1 - b.y1) -
        antiderivative(x, a.y0 - b.y0);
    }
  }
  for (let i = 0; i + 1 < na; i++) {
    const widthA = a.edges[i + 1]! - a.edges[i]!;
    const centreA = (a.edges[i + 1]! + a.edges[i]!) / 2;
    for (let j = 0; j + 1 < nb; j++) {
      const widthB = b.edges[j + 1]! - b.edges[j]!;
      const dx = centreA - (sign * (b.edges[j + 1]! + b.edges[j]!)) / 2;
      const square = dx * dx + dy * dy;
      const largest = Math.max(widthA, widthB, heightA, heightB);
      if (square > FAR * FAR * largest * largest) {
        const spread = (widthA * widthA - heightA * heightA + widthB * widthB - heightB * heightB) / 12;
        add(i, j, 0.5 * Math.log(square) - (0.5 * spread * (dx * dx - dy * dy)) / (square * square));
        continue;
      }
      const corner = i * nb + j;
      const mixed = table[corner + 1]! + table[corner + nb]! - table[corner + nb + 1]! - table[corner]!;
      add(i, j, (sign * mixed) / (widthA * heightA * widthB * heightB) + CONSTANT);
    }
  }
}
