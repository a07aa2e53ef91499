import { gaussRule } from "./gauss";
import { INTERFACE } from "./segment";
import type { Panel } from "./panels";

/**
 * Nodes of a set of panels, copper first. Between two planes b apart, W = exp(πz/b) maps the strip to the upper half
 * plane, where the field of a charge is that of the charge and one image; over one plane W = z.
 */
export interface Mesh {
  panels: Panel[];
  /** first node of each panel */
  first: Int32Array;
  nodes: number;
  /** nodes on copper */
  copper: number;
  /** nodes in physical and mapped coordinates */
  x: Float64Array;
  y: Float64Array;
  mx: Float64Array;
  my: Float64Array;
  /** centre and half length of each panel */
  cx: Float64Array;
  cy: Float64Array;
  half: Float64Array;
  /** distance between the planes, 0 over one plane */
  upper: number;
}

export function meshOf(panels: Panel[], upper: number): Mesh {
  const first = new Int32Array(panels.length + 1);
  let nodes = 0;
  let copper = 0;
  panels.forEach((panel, k) => {
    first[k] = nodes;
    nodes += panel.n;
    if (panel.owner !== INTERFACE) copper += panel.n;
  });
  first[panels.length] = nodes;
  const mesh: Mesh = {
    panels,
    first,
    nodes,
    copper,
    upper,
    x: new Float64Array(nodes),
    y: new Float64Array(nodes),
    mx: new Float64Array(nodes),
    my: new Float64Array(nodes),
    cx: new Float64Array(panels.length),
    cy: new Float64Array(panels.length),
    half: new Float64Array(panels.length),
  };
  panels.forEach((panel, k) => {
    const { t } = gaussRule(panel.n);
    for (let j = 0; j < panel.n; j++) {
      const r = along(panel, t[j]!);
      const i = first[k]! + j;
      mesh.x[i] = panel.ax + r * panel.vx;
      mesh.y[i] = panel.ay + r * panel.vy;
      mesh.mx[i] = mapX(upper, mesh.x[i], mesh.y[i]);
      mesh.my[i] = mapY(upper, mesh.x[i], mesh.y[i]);
    }
    mesh.cx[k] = panel.ax + panel.vx / 2;
    mesh.cy[k] = panel.ay + panel.vy / 2;
    mesh.half[k] = Math.sqrt(panel.vx * panel.vx + panel.vy * panel.vy) / 2;
  });
  return mesh;
}

/** Share of a panel's length at t ∈ [−1, 1]. */
export function along(panel: Panel, t: number): number {
  const u = (1 + t) / 2;
  return panel.p === 1 ? u : panel.p === 2 ? u * u : u * u * u;
}

export function mapX(upper: number, x: number, y: number): number {
  return upper === 0 ? x : Math.exp((Math.PI * x) / upper) * Math.cos((Math.PI * y) / upper);
}

export function mapY(upper: number, x: number, y: number): number {
  return upper === 0 ? y : Math.exp((Math.PI * x) / upper) * Math.sin((Math.PI * y) / upper);
}
