import type { Mesh } from "./mesh";
import { logReal, panelLogarithm, selfLogarithm } from "./panel-integral";

/**
 * Potential at a point of unit charge at every node, plane images included: ln(r_image/r), the line charge being 2πε0.
 * With `mirrored` the field of the mirror images in x = 0 joins: `even` receives direct + mirror, `odd` direct − mirror;
 * without, `even` receives direct alone.
 *
 * @param self  node that the point is, or −1
 */
export function potentialRow(
  mesh: Mesh,
  x: number,
  y: number,
  mapped: { x: number; y: number; mirrorX: number; mirrorY: number },
  self: number,
  mirrored: boolean,
  even: Float64Array,
  odd: Float64Array | null,
  at: number,
): void {
  const { nodes, mapX, mapY, upper } = mesh;
  const { x: tx, y: ty, mirrorX: ux, mirrorY: uy } = mapped;
  // at the node itself ln r stands for ln 1 until its panel is integrated
  const own = upper === 0 ? 1 : (Math.PI / upper) * (Math.PI / upper) * (tx * tx + ty * ty);
  for (let j = 0; j < nodes; j++) {
    const sx = mapX[j]!;
    const sy = mapY[j]!;
    const dx = tx - sx;
    const dy = ty - sy;
    const ey = ty + sy;
    const r = j === self ? own : dx * dx + dy * dy;
    const direct = (dx * dx + ey * ey) / r;
    if (!mirrored) {
      even[at + j] = 0.5 * Math.log(direct);
      continue;
    }
    const mx = ux - sx;
    const my = uy - sy;
    const ny = uy + sy;
    const mirror = (mx * mx + ny * ny) / (mx * mx + my * my);
    if (odd) {
      const a = 0.5 * Math.log(direct);
      const b = 0.5 * Math.log(mirror);
      even[at + j] = a + b;
      odd[at + j] = a - b;
    } else even[at + j] = 0.5 * Math.log(direct * mirror);
  }
  integrateNear(mesh, x, y, self, -1, 1, even, odd, at);
  integrateNear(mesh, x, -y, -1, 1, 1, even, odd, at);
  if (upper > 0) integrateNear(mesh, x, 2 * upper - y, -1, 1, 1, even, odd, at);
  if (!mirrored) return;
  integrateNear(mesh, -x, y, -1, -1, -1, even, odd, at);
  integrateNear(mesh, -x, -y, -1, 1, -1, even, odd, at);
  if (upper > 0) integrateNear(mesh, -x, 2 * upper - y, -1, 1, -1, even, odd, at);
}

/** Replaces the point values ln r of near panels by their integrals, with the sign of the image and in the odd mode. */
function integrateNear(
  mesh: Mesh,
  x: number,
  y: number,
  self: number,
  charge: number,
  oddSign: number,
  even: Float64Array,
  odd: Float64Array | null,
  at: number,
): void {
  const { panels, first, centreX, centreY, reach } = mesh;
  for (let k = 0; k < panels; k++) {
    const ox = x - centreX[k]!;
    const oy = y - centreY[k]!;
    const limit = reach[k]!;
    if (!mesh.isNear(ox * ox + oy * oy, limit * limit)) continue;
    const start = first[k]!;
    const n = first[k + 1]! - start;
    let table: Float64Array = logReal;
    let offset = 0;
    let shift = 0;
    if (self >= start && self < start + n) {
      table = selfLogarithm(mesh.power[k]!, n);
      offset = (self - start) * n;
      shift = mesh.logLength[k]!;
    } else panelLogarithm(mesh, k, x, y);
    for (let j = 0; j < n; j++) {
      const dx = x - mesh.x[start + j]!;
      const dy = y - mesh.y[start + j]!;
      const point = start + j === self ? 0 : 0.5 * Math.log(dx * dx + dy * dy);
      const change = charge * (table[offset + j]! + shift - point);
      even[at + start + j]! += change;
      if (odd) odd[at + start + j]! += oddSign * change;
    }
  }
}
