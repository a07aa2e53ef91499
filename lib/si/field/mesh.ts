import { gaussRule } from "./gauss";
import { along, type Panel } from "./panels";
import { INTERFACE } from "./segment";

/**
 * Panels and their nodes in flat arrays, copper first; reused from solve to solve. Between two planes b apart,
 * W = exp(πz/b) maps the strip to the upper half plane, where a charge has one image; over one plane W = z.
 */
export class Mesh {
  panels = 0;
  nodes = 0;
  /** nodes on copper; they come first */
  copper = 0;
  /** distance between the planes [m], 0 over one plane */
  upper = 0;
  power = new Uint8Array(0);
  size = new Uint8Array(0);
  owner = new Int32Array(0);
  segment = new Int32Array(0);
  /** first node of each panel, and one past the last */
  first = new Int32Array(0);
  right = new Float64Array(0);
  left = new Float64Array(0);
  ax = new Float64Array(0);
  ay = new Float64Array(0);
  vx = new Float64Array(0);
  vy = new Float64Array(0);
  /** 1/v, as a complex number, and ln|v| */
  inverseX = new Float64Array(0);
  inverseY = new Float64Array(0);
  logLength = new Float64Array(0);
  centreX = new Float64Array(0);
  centreY = new Float64Array(0);
  half = new Float64Array(0);
  /** distance from the centre within which the panel is integrated in closed form */
  reach = new Float64Array(0);
  /** nodes, physical, mapped, and the mapped mirror image in x = 0 */
  x = new Float64Array(0);
  y = new Float64Array(0);
  mapX = new Float64Array(0);
  mapY = new Float64Array(0);
  mirrorX = new Float64Array(0);
  mirrorY = new Float64Array(0);

  /** @param near  panels nearer than this many half-lengths are integrated in closed form */
  load(panels: Panel[], upper: number, near: number): this {
    let nodes = 0;
    for (const panel of panels) nodes += panel.n;
    this.reserve(panels.length, nodes);
    this.panels = panels.length;
    this.nodes = nodes;
    this.copper = 0;
    this.upper = upper;
    let node = 0;
    for (let k = 0; k < panels.length; k++) {
      const panel = panels[k]!;
      this.first[k] = node;
      this.loadPanel(k, panel, near);
      this.loadNodes(node, panel);
      node += panel.n;
      if (panel.owner !== INTERFACE) this.copper = node;
    }
    this.first[panels.length] = nodes;
    return this;
  }

  private loadPanel(k: number, panel: Panel, near: number): void {
    const { ax, ay, vx, vy, p } = panel;
    const square = vx * vx + vy * vy;
    const half = Math.sqrt(square) / 2;
    this.power[k] = p;
    this.size[k] = panel.n;
    this.owner[k] = panel.owner;
    this.segment[k] = panel.segment;
    this.right[k] = panel.right;
    this.left[k] = panel.left;
    this.ax[k] = ax;
    this.ay[k] = ay;
    this.vx[k] = vx;
    this.vy[k] = vy;
    this.inverseX[k] = vx / square;
    this.inverseY[k] = -vy / square;
    this.logLength[k] = Math.log(square) / 2;
    this.centreX[k] = ax + vx / 2;
    this.centreY[k] = ay + vy / 2;
    this.half[k] = half;
    // in u = r^(1/3) everything looks nearer
    this.reach[k] = (p === 1 ? near : 2 * near + 1) * half;
  }

  private loadNodes(node: number, panel: Panel): void {
    const { t } = gaussRule(panel.n);
    for (let j = 0; j < panel.n; j++) {
      const r = along(panel.p, t[j]!);
      const x = panel.ax + r * panel.vx;
      const y = panel.ay + r * panel.vy;
      const i = node + j;
      this.x[i] = x;
      this.y[i] = y;
      this.mapX[i] = mappedX(this.upper, x, y);
      this.mapY[i] = mappedY(this.upper, x, y);
      this.mirrorX[i] = mappedX(this.upper, -x, y);
      this.mirrorY[i] = mappedY(this.upper, -x, y);
    }
  }

  private reserve(panels: number, nodes: number): void {
    if (this.power.length < panels) {
      const room = panels + 24;
      this.power = new Uint8Array(room);
      this.size = new Uint8Array(room);
      this.owner = new Int32Array(room);
      this.segment = new Int32Array(room);
      this.first = new Int32Array(room + 1);
      for (const name of perPanel) this[name] = new Float64Array(room);
    }
    if (this.x.length < nodes) for (const name of perNode) this[name] = new Float64Array(nodes + 64);
  }
}

const perPanel = [
  "right",
  "left",
  "ax",
  "ay",
  "vx",
  "vy",
  "inverseX",
  "inverseY",
  "logLength",
  "centreX",
  "centreY",
  "half",
  "reach",
] as const;
const perNode = ["x", "y", "mapX", "mapY", "mirrorX", "mirrorY"] as const;

export function mappedX(upper: number, x: number, y: number): number {
  return upper === 0 ? x : Math.exp((Math.PI * x) / upper) * Math.cos((Math.PI * y) / upper);
}

export function mappedY(upper: number, x: number, y: number): number {
  return upper === 0 ? y : Math.exp((Math.PI * x) / upper) * Math.sin((Math.PI * y) / upper);
}
