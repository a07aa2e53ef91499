import { backsolve, factorise } from "./factorise";
import { gaussRule } from "./gauss";
import { along, type Mesh } from "./mesh";
import { addFlux, addPotential } from "./rows";
import { INTERFACE, type Cut } from "./segment";

/** 1: mirror-even about x = 0, −1: mirror-odd, 0: the whole plane is meshed. */
export type Parity = -1 | 0 | 1;

export interface Charges {
  /** free charge on each trace by each excitation, over ε0 and volt; with dielectrics and without */
  filled: number[][];
  air: number[][];
  /** total charge of every node by each excitation, over 2πε0, with dielectrics */
  density: Float64Array[];
}

/**
 * Solves the total-charge equations of a mesh: potential at the nodes of copper, balance of flux over a cell around each
 * node of an interface, X + K F/π = 0, K = (ε_right − ε_left)/(ε_right + ε_left). Copper comes first, so its factors are
 * those of the air-filled line.
 *
 * @param excitations  potential of each trace [V]; coplanar ground is at 0
 */
export function solveCharges(
  mesh: Mesh,
  cuts: Cut[],
  parity: Parity,
  near: number,
  excitations: number[][],
): Charges {
  const { nodes, copper, panels, first } = mesh;
  const stride = nodes % 512 === 0 ? nodes + 1 : nodes;
  const a = new Float64Array(nodes * stride);
  fillMatrix(mesh, parity, near, a, stride);
  factorise(a, nodes, stride);
  const traces = excitations[0]?.length ?? 0;
  const weights = panels.map((panel) => Math.PI * (panel.right + panel.left));
  const cutRows = cuts.map((cut) => {
    const row = new Float64Array(nodes);
    flux(mesh, parity, near, cut.x1, cut.y, cut.x2, cut.y, -1, row, 0);
    return row;
  });
  const result: Charges = { filled: [], air: [], density: [] };
  for (const volts of excitations) {
    const rhs = new Float64Array(nodes);
    panels.forEach((panel, k) => {
      if (panel.owner < 0) return;
      for (let j = first[k]!; j < first[k + 1]!; j++) rhs[j] = volts[panel.owner] ?? 0;
    });
    const airDensity = rhs.slice(0, copper);
    backsolve(a, copper, stride, airDensity);
    backsolve(a, nodes, stride, rhs);
    const filled = new Array<number>(traces).fill(0);
    const air = new Array<number>(traces).fill(0);
    panels.forEach((panel, k) => {
      if (panel.owner < 0) return;
      for (let j = first[k]!; j < first[k + 1]!; j++) {
        filled[panel.owner]! += weights[k]! * rhs[j]!;
        air[panel.owner]! += 2 * Math.PI * airDensity[j]!;
      }
    });
    cuts.forEach((cut, c) => {
      let through = 0;
      for (let j = 0; j < nodes; j++) through += cutRows[c]![j]! * rhs[j]!;
      filled[cut.owner]! += cut.step * through;
    });
    result.filled.push(filled);
    result.air.push(air);
    result.density.push(rhs);
  }
  return result;
}

function fillMatrix(mesh: Mesh, parity: Parity, near: number, a: Float64Array, stride: number): void {
  const { panels, first } = mesh;
  panels.forEach((panel, k) => {
    const rule = gaussRule(panel.n);
    for (let i = 0; i < panel.n; i++) {
      const row = (first[k]! + i) * stride;
      const node = first[k]! + i;
      if (panel.owner !== INTERFACE) {
        addPotential(mesh, near, mesh.x[node]!, mesh.y[node]!, node, 1, a, row);
        if (parity !== 0) addPotential(mesh, near, -mesh.x[node]!, mesh.y[node]!, -1, parity, a, row);
        continue;
      }
      const from = along(panel, rule.ends[i]!);
      const to = along(panel, rule.ends[i + 1]!);
      const { ax, ay, vx, vy, segment } = panel;
      flux(mesh, parity, near, ax + from * vx, ay + from * vy, ax + to * vx, ay + to * vy, segment, a, row);
      const k0 = (panel.right - panel.left) / (panel.right + panel.left) / Math.PI;
      for (let j = 0; j < mesh.nodes; j++) a[row + j]! *= k0;
      for (let j = 0; j < panel.n; j++) a[row + first[k]! + j]! += rule.cellShare[i * panel.n + j]!;
    }
  });
}

/** Flux through a cell of the charges and of their mirror images. */
function flux(
  mesh: Mesh,
  parity: Parity,
  near: number,
  xa: number,
  ya: number,
  xb: number,
  yb: number,
  segment: number,
  out: Float64Array,
  at: number,
): void {
  addFlux(mesh, near, xa, ya, xb, yb, segment, 1, out, at);
  if (parity !== 0) addFlux(mesh, near, -xa, ya, -xb, yb, -1, -parity, out, at);
}
