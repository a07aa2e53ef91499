import { gaussRule } from "./gauss";
import { mapX, mapY, type Mesh } from "./mesh";
import { logImag, logReal, panelLogarithm, selfLogarithm } from "./panel-integral";

/**
 * Adds sign × the potential at (x, y) of unit charges at every node to `out`, plane images included:
 * ln(r_image/r), the line charge being 2πε0.
 *
 * @param self  node that (x, y) is, or −1
 */
export function addPotential(
  mesh: Mesh,
  near: number,
  x: number,
  y: number,
  self: number,
  sign: number,
  out: Float64Array,
  at: number,
): void {
  const { nodes, mx, my, upper } = mesh;
  const tx = mapX(upper, x, y);
  const ty = mapY(upper, x, y);
  for (let j = 0; j < nodes; j++) {
    const dx = tx - mx[j]!;
    const dy = ty - my[j]!;
    const ey = ty + my[j]!;
    let r = dx * dx + dy * dy;
    if (j === self) {
      const slope = upper === 0 ? 1 : (Math.PI / upper) ** 2 * (tx * tx + ty * ty);
      r = slope;
    }
    out[at + j]! += sign * 0.5 * Math.log((dx * dx + ey * ey) / r);
  }
  correctPotential(mesh, near, x, y, self, sign, -1, out, at);
  correctPotential(mesh, near, x, -y, -1, sign, 1, out, at);
  if (upper > 0) correctPotential(mesh, near, x, 2 * upper - y, -1, sign, 1, out, at);
}

/** Replaces the point values ln r of near panels by their integrals. */
function correctPotential(
  mesh: Mesh,
  near: number,
  x: number,
  y: number,
  self: number,
  sign: number,
  charge: number,
  out: Float64Array,
  at: number,
): void {
  const { panels, first, cx, cy, half } = mesh;
  for (let k = 0; k < panels.length; k++) {
    const panel = panels[k]!;
    const reach = (panel.p === 1 ? near : 2 * near + 1) * half[k]!;
    const ox = x - cx[k]!;
    const oy = y - cy[k]!;
    if (ox * ox + oy * oy > reach * reach) continue;
    const start = first[k]!;
    const { n } = panel;
    const own = self >= start && self < start + n;
    let table: Float64Array = logReal;
    let offset = 0;
    let shift = 0;
    if (own) {
      table = selfLogarithm(panel.p, n);
      offset = (self - start) * n;
      shift = Math.log(2 * half[k]!);
    } else panelLogarithm(panel, gaussRule(n), x, y);
    for (let j = 0; j < n; j++) {
      const dx = x - mesh.x[start + j]!;
      const dy = y - mesh.y[start + j]!;
      const r = dx * dx + dy * dy;
      const point = start + j === self ? 0 : 0.5 * Math.log(r);
      out[at + start + j]! += sign * charge * (table[offset + j]! + shift - point);
    }
  }
}

/**
 * Adds sign × the flux through the straight cell a → b, to its right, of unit charges at every node (2π in all around
 * a charge). Charge on the cell's own line sends none through it.
 *
 * @param segment  the segment the cell lies on; −1 where it lies on none, or for a mirrored cell
 */
export function addFlux(
  mesh: Mesh,
  near: number,
  xa: number,
  ya: number,
  xb: number,
  yb: number,
  segment: number,
  sign: number,
  out: Float64Array,
  at: number,
): void {
  const { nodes, mx, my, upper, panels } = mesh;
  const ax = mapX(upper, xa, ya);
  const ay = mapY(upper, xa, ya);
  const bx = mapX(upper, xb, yb);
  const by = mapY(upper, xb, yb);
  let k = 0;
  for (let j = 0; j < nodes; j++) {
    while (j >= mesh.first[k + 1]!) k++;
    const own = panels[k]!.segment === segment || (ya === yb && mesh.y[j] === ya);
    const sx = mx[j]!;
    const sy = my[j]!;
    const x1 = ax - sx;
    const x2 = bx - sx;
    let dot = 1;
    let cross = 0;
    if (!own) {
      dot = x1 * x2 + (ay - sy) * (by - sy);
      cross = x1 * (by - sy) - x2 * (ay - sy);
    }
    const dotI = x1 * x2 + (ay + sy) * (by + sy);
    const crossI = x1 * (by + sy) - x2 * (ay + sy);
    let angle = Math.atan2(cross * dotI - dot * crossI, dot * dotI + cross * crossI);
    if (dot < 0 || dotI < 0) {
      let whole = own ? 0 : angleAt(xa, ya, xb, yb, mesh.x[j]!, mesh.y[j]!);
      whole -= angleAt(xa, ya, xb, yb, mesh.x[j]!, -mesh.y[j]!);
      if (upper > 0) whole -= angleAt(xa, ya, xb, yb, mesh.x[j]!, 2 * upper - mesh.y[j]!);
      angle += 2 * Math.PI * Math.round((whole - angle) / (2 * Math.PI));
    }
    out[at + j]! += sign * angle;
  }
  correctFlux(mesh, near, xa, ya, xb, yb, segment, sign, out, at);
  correctFlux(mesh, near, xa, -ya, xb, -yb, -1, sign, out, at);
  if (upper > 0) correctFlux(mesh, near, xa, 2 * upper - ya, xb, 2 * upper - yb, -1, sign, out, at);
}

function angleAt(xa: number, ya: number, xb: number, yb: number, x: number, y: number): number {
  const x1 = xa - x;
  const x2 = xb - x;
  const y1 = ya - y;
  const y2 = yb - y;
  return Math.atan2(x1 * y2 - x2 * y1, x1 * x2 + y1 * y2);
}

const startImag = new Float64Array(8);

function correctFlux(
  mesh: Mesh,
  near: number,
  xa: number,
  ya: number,
  xb: number,
  yb: number,
  segment: number,
  sign: number,
  out: Float64Array,
  at: number,
): void {
  const { panels, first, cx, cy, half } = mesh;
  const mx = (xa + xb) / 2;
  const my = (ya + yb) / 2;
  const extent = Math.sqrt((xb - xa) * (xb - xa) + (yb - ya) * (yb - ya)) / 2;
  for (let k = 0; k < panels.length; k++) {
    const panel = panels[k]!;
    const reach = (panel.p === 1 ? near : 2 * near + 1) * half[k]! + extent;
    const ox = mx - cx[k]!;
    const oy = my - cy[k]!;
    if (ox * ox + oy * oy > reach * reach) continue;
    if (panel.segment === segment) continue;
    if (ya === yb && panel.ay === ya && panel.vy === 0) continue;
    const start = first[k]!;
    const { n } = panel;
    const rule = gaussRule(n);
    panelLogarithm(panel, rule, xa, ya);
    startImag.set(logImag);
    panelLogarithm(panel, rule, xb, yb);
    let mean = 0;
    for (let j = 0; j < n; j++) {
      logImag[j]! -= startImag[j]!;
      mean += (rule.w[j]! / 2) * logImag[j]!;
    }
    const turns = 2 * Math.PI * Math.round(mean / (2 * Math.PI));
    for (let j = 0; j < n; j++) {
      const point = angleAt(xa, ya, xb, yb, mesh.x[start + j]!, mesh.y[start + j]!);
      out[at + start + j]! += sign * (logImag[j]! - turns - point);
    }
  }
}
