import { arctangent } from "./arctangent";
import { gaussRule } from "./gauss";
import { mappedX, mappedY, type Mesh } from "./mesh";
import { logImag, panelLogarithm } from "./panel-integral";

/** Points between which flux is counted: consecutive ends of cells on one straight line. */
const endX = new Float64Array(9);
const endY = new Float64Array(9);
const mapX = new Float64Array(9);
const mapY = new Float64Array(9);
const nearEnd = new Uint8Array(9);
const imag = new Float64Array(9 * 8);

/**
 * Flux to the right through the `cells` cells between consecutive points, of unit charge at every node (2π in all around a
 * charge), into rows of `even` from `at` on, `stride` apart; mirror images in x = 0 as in potentialRow. Charge on the
 * cells' own line sends none through them.
 *
 * @param segment  the segment the cells lie on, −1 for none
 */
export function fluxRows(
  mesh: Mesh,
  xs: Float64Array,
  ys: Float64Array,
  cells: number,
  segment: number,
  mirrored: boolean,
  even: Float64Array,
  odd: Float64Array | null,
  at: number,
  stride: number,
): void {
  for (let i = 0; i < cells; i++) {
    even.fill(0, at + i * stride, at + i * stride + mesh.nodes);
    odd?.fill(0, at + i * stride, at + i * stride + mesh.nodes);
  }
  oneSide(mesh, xs, ys, cells, segment, 1, 1, 1, even, odd, at, stride);
  if (mirrored) oneSide(mesh, xs, ys, cells, -1, -1, -1, 1, even, odd, at, stride);
}

/** The charges seen from the cells (side 1) or from the cells' mirror images (side −1). */
function oneSide(
  mesh: Mesh,
  xs: Float64Array,
  ys: Float64Array,
  cells: number,
  segment: number,
  side: number,
  evenSign: number,
  oddSign: number,
  even: Float64Array,
  odd: Float64Array | null,
  at: number,
  stride: number,
): void {
  const { panels, first, upper } = mesh;
  for (let e = 0; e <= cells; e++) {
    endX[e] = side * xs[e]!;
    endY[e] = ys[e]!;
    mapX[e] = mappedX(upper, endX[e]!, endY[e]!);
    mapY[e] = mappedY(upper, endX[e]!, endY[e]!);
  }
  const level = endY[0] === endY[cells];
  for (let k = 0; k < panels; k++) {
    const own = mesh.segment[k] === segment || (level && mesh.vy[k] === 0 && mesh.ay[k] === endY[0]);
    for (let j = first[k]!; j < first[k + 1]!; j++) {
      const sx = mesh.mapX[j]!;
      const sy = mesh.mapY[j]!;
      let x1 = mapX[0]! - sx;
      let y1 = mapY[0]! - sy;
      let z1 = mapY[0]! + sy;
      for (let i = 0; i < cells; i++) {
        const x2 = mapX[i + 1]! - sx;
        const y2 = mapY[i + 1]! - sy;
        const z2 = mapY[i + 1]! + sy;
        const dotI = x1 * x2 + z1 * z2;
        const crossI = x1 * z2 - x2 * z1;
        let flux: number;
        if (own) flux = -arctangent(crossI, dotI);
        else {
          const dot = x1 * x2 + y1 * y2;
          const cross = x1 * y2 - x2 * y1;
          // each angle is below π, their sum need not be
          flux =
            dot > 0 && dotI > 0
              ? arctangent(cross * dotI - dot * crossI, dot * dotI + cross * crossI)
              : arctangent(cross, dot) - arctangent(crossI, dotI);
        }
        const place = at + i * stride + j;
        even[place]! += evenSign * flux;
        if (odd) odd[place]! += oddSign * flux;
        x1 = x2;
        y1 = y2;
        z1 = z2;
      }
    }
  }
  integrateNear(mesh, cells, segment, evenSign, oddSign, even, odd, at, stride);
  for (let e = 0; e <= cells; e++) endY[e] = -endY[e]!;
  integrateNear(mesh, cells, -1, evenSign, oddSign, even, odd, at, stride);
  if (upper === 0) return;
  for (let e = 0; e <= cells; e++) endY[e] = 2 * upper + endY[e]!;
  integrateNear(mesh, cells, -1, evenSign, oddSign, even, odd, at, stride);
}

/** Replaces the point values of near panels by their integrals. */
function integrateNear(
  mesh: Mesh,
  cells: number,
  segment: number,
  evenSign: number,
  oddSign: number,
  even: Float64Array,
  odd: Float64Array | null,
  at: number,
  stride: number,
): void {
  const { panels, first, centreX, centreY, reach } = mesh;
  const mx = (endX[0]! + endX[cells]!) / 2;
  const my = (endY[0]! + endY[cells]!) / 2;
  const extent = Math.sqrt(
    (endX[cells]! - mx) * (endX[cells]! - mx) + (endY[cells]! - my) * (endY[cells]! - my),
  );
  const level = endY[0] === endY[cells];
  for (let k = 0; k < panels; k++) {
    const limit = reach[k]! + extent;
    const ox = mx - centreX[k]!;
    const oy = my - centreY[k]!;
    if (!mesh.isNear(ox * ox + oy * oy, limit * limit)) continue;
    if (mesh.segment[k] === segment || (level && mesh.vy[k] === 0 && mesh.ay[k] === endY[0])) continue;
    const start = first[k]!;
    const n = first[k + 1]! - start;
    const { w } = gaussRule(n);
    const close = reach[k]! * reach[k]!;
    for (let e = 0; e <= cells; e++) {
      const px = endX[e]! - centreX[k]!;
      const py = endY[e]! - centreY[k]!;
      nearEnd[e] = mesh.isNear(px * px + py * py, close) ? 1 : 0;
    }
    for (let e = 0; e <= cells; e++) {
      // a far end serves only to close a cell with a near one
      if (!nearEnd[e] && !(e > 0 && nearEnd[e - 1]) && !(e < cells && nearEnd[e + 1])) continue;
      panelLogarithm(mesh, k, endX[e]!, endY[e]!, nearEnd[e] === 0);
      for (let j = 0; j < n; j++) imag[e * 8 + j] = logImag[j]!;
    }
    for (let i = 0; i < cells; i++) {
      if (!nearEnd[i] && !nearEnd[i + 1]) continue;
      let mean = 0;
      for (let j = 0; j < n; j++) mean += w[j]! * (imag[i * 8 + 8 + j]! - imag[i * 8 + j]!);
      const turns = 2 * Math.PI * Math.round(mean / (4 * Math.PI));
      for (let j = 0; j < n; j++) {
        const sx = mesh.x[start + j]!;
        const sy = mesh.y[start + j]!;
        const x1 = endX[i]! - sx;
        const x2 = endX[i + 1]! - sx;
        const y1 = endY[i]! - sy;
        const y2 = endY[i + 1]! - sy;
        const point = arctangent(x1 * y2 - x2 * y1, x1 * x2 + y1 * y2);
        const change = imag[i * 8 + 8 + j]! - imag[i * 8 + j]! - turns - point;
        const place = at + i * stride + start + j;
        even[place]! += evenSign * change;
        if (odd) odd[place]! += oddSign * change;
      }
    }
  }
}
