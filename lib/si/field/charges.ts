import { potentialRow } from "./copper-rows";
import { backsolve, factorise } from "./factorise";
import { fluxRows } from "./flux-rows";
import { gaussRule } from "./gauss";
import { along, type Mesh } from "./mesh";

import { INTERFACE, type Cut } from "./segment";

/** Mirror symmetry used: none, the even mode alone, or even and odd. */
export type Modes = "whole" | "even" | "both";

export interface Charges {
  /** free charge of each trace over ε0 and volt, by excitation, with dielectrics and without */
  filled: number[][];
  air: number[][];
  /** largest unresolved share of the charge over the excitations, see unresolvedShare */
  unresolved: number;
}

let matrixA = new Float64Array(0);
let matrixB = new Float64Array(0);
let cutEven = new Float64Array(0);
let cutOdd = new Float64Array(0);
const endX = new Float64Array(9);
const endY = new Float64Array(9);
const mapped = { x: 0, y: 0, mirrorX: 0, mirrorY: 0 };

/**
 * Solves the total-charge equations of a mesh: potential at the nodes of copper, balance of flux over a cell around each
 * node of an interface, X + K F/π = 0, K = (ε_right − ε_left)/(ε_right + ε_left). Copper comes first, so its factors are
 * those of the air-filled line.
 *
 * @param excitations  potential of each trace [V]; coplanar ground is at 0
 * @param keep  receives the total charge of every node over 2πε0, by mode and excitation, with dielectrics
 * @returns one result per mode: [whole], [even] or [even, odd]
 */
export function solveCharges(
  mesh: Mesh,
  cuts: Cut[],
  modes: Modes,
  excitations: number[][],
  keep?: Float64Array[][],
): Charges[] {
  const { nodes } = mesh;
  // rows a multiple of 4096 bytes apart would fall on the same cache lines
  const stride = nodes % 64 === 0 ? nodes + 1 : nodes;
  if (matrixA.length < nodes * stride) matrixA = new Float64Array(nodes * stride);
  const both = modes === "both";
  if (both && matrixB.length < nodes * stride) matrixB = new Float64Array(nodes * stride);
  if (cutEven.length < cuts.length * nodes) {
    cutEven = new Float64Array(cuts.length * nodes);
    cutOdd = new Float64Array(cuts.length * nodes);
  }
  fillMatrix(mesh, modes !== "whole", matrixA, both ? matrixB : null, stride);
  cuts.forEach((cut, c) => {
    endX[0] = cut.x1;
    endX[1] = cut.x2;
    endY[0] = endY[1] = cut.y;
    fluxRows(mesh, endX, endY, 1, -1, modes !== "whole", cutEven, both ? cutOdd : null, c * nodes, nodes);
  });
  const results = [solveMode(mesh, cuts, cutEven, matrixA, stride, excitations, keep)];
  if (both) results.push(solveMode(mesh, cuts, cutOdd, matrixB, stride, excitations, keep));
  return results;
}

function fillMatrix(
  mesh: Mesh,
  mirrored: boolean,
  even: Float64Array,
  odd: Float64Array | null,
  stride: number,
): void {
  for (let k = 0; k < mesh.panels; k++) {
    const start = mesh.first[k]!;
    const n = mesh.size[k]!;
    if (mesh.owner[k] === INTERFACE) {
      balanceRows(mesh, k, mirrored, even, odd, stride);
      continue;
    }
    for (let i = start; i < start + n; i++) {
      mapped.x = mesh.mapX[i]!;
      mapped.y = mesh.mapY[i]!;
      mapped.mirrorX = mesh.mirrorX[i]!;
      mapped.mirrorY = mesh.mirrorY[i]!;
      potentialRow(mesh, mesh.x[i]!, mesh.y[i]!, mapped, i, mirrored, even, odd, i * stride);
    }
  }
}

function balanceRows(
  mesh: Mesh,
  k: number,
  mirrored: boolean,
  even: Float64Array,
  odd: Float64Array | null,
  stride: number,
): void {
  const start = mesh.first[k]!;
  const n = mesh.size[k]!;
  const rule = gaussRule(n);
  for (let e = 0; e <= n; e++) {
    const r = along(mesh.power[k]!, rule.ends[e]!);
    endX[e] = mesh.ax[k]! + r * mesh.vx[k]!;
    endY[e] = mesh.ay[k]! + r * mesh.vy[k]!;
  }
  fluxRows(mesh, endX, endY, n, mesh.segment[k]!, mirrored, even, odd, start * stride, stride);
  const right = mesh.right[k]!;
  const left = mesh.left[k]!;
  const contrast = (right - left) / (right + left) / Math.PI;
  for (let i = 0; i < n; i++) {
    const row = (start + i) * stride;
    for (let j = 0; j < mesh.nodes; j++) even[row + j]! *= contrast;
    for (let j = 0; j < n; j++) even[row + start + j]! += rule.cellShare[i * n + j]!;
    if (!odd) continue;
    for (let j = 0; j < mesh.nodes; j++) odd[row + j]! *= contrast;
    for (let j = 0; j < n; j++) odd[row + start + j]! += rule.cellShare[i * n + j]!;
  }
}

let rhs = new Float64Array(0);
let airRhs = new Float64Array(0);

function solveMode(
  mesh: Mesh,
  cuts: Cut[],
  cutRows: Float64Array,
  a: Float64Array,
  stride: number,
  excitations: number[][],
  keep?: Float64Array[][],
): Charges {
  const { nodes, copper, first } = mesh;
  factorise(a, nodes, stride);
  if (rhs.length < nodes) {
    rhs = new Float64Array(nodes);
    airRhs = new Float64Array(nodes);
  }
  const charges: Charges = { filled: [], air: [], unresolved: 0 };
  const kept: Float64Array[] = [];
  for (const volts of excitations) {
    rhs.fill(0);
    for (let k = 0; k < mesh.panels; k++) {
      const owner = mesh.owner[k]!;
      if (owner >= 0) rhs.fill(volts[owner] ?? 0, first[k], first[k + 1]);
    }
    airRhs.set(rhs);
    backsolve(a, copper, stride, airRhs);
    backsolve(a, nodes, stride, rhs);
    const filled = volts.map(() => 0);
    const air = volts.map(() => 0);
    for (let k = 0; k < mesh.panels; k++) {
      const owner = mesh.owner[k]!;
      if (owner < 0) continue;
      const weight = Math.PI * (mesh.right[k]! + mesh.left[k]!);
      for (let j = first[k]!; j < first[k + 1]!; j++) {
        filled[owner]! += weight * rhs[j]!;
        air[owner]! += 2 * Math.PI * airRhs[j]!;
      }
    }
    cuts.forEach((cut, c) => {
      let through = 0;
      for (let j = 0; j < nodes; j++) through += cutRows[c * nodes + j]! * rhs[j]!;
      filled[cut.owner]! += cut.step * through;
    });
    charges.filled.push(filled);
    charges.air.push(air);
    charges.unresolved = Math.max(charges.unresolved, unresolvedShare(mesh, rhs));
    if (keep) kept.push(rhs.slice(0, nodes));
  }
  keep?.push(kept);
  return charges;
}

/**
 * What the panels' polynomials leave out, judged by how their Legendre coefficients fall: Σ a²/(a + b) over the charge on
 * copper, a and b the last coefficients' magnitudes.
 */
function unresolvedShare(mesh: Mesh, density: Float64Array): number {
  let missing = 0;
  let charge = 0;
  for (let k = 0; k < mesh.panels; k++) {
    const n = mesh.size[k]!;
    const start = mesh.first[k]!;
    const { legendre } = gaussRule(n);
    let last = 0;
    let previous = 0;
    for (let j = 0; j < n; j++) {
      const x = density[start + j]!;
      last += legendre[j * n + n - 1]! * x;
      previous += legendre[j * n + n - 2]! * x;
      if (mesh.owner[k] !== INTERFACE) charge += Math.abs(x);
    }
    const a = Math.abs(last);
    missing += (a * a) / (a + Math.abs(previous) + 1e-300);
  }
  return missing / charge;
}
