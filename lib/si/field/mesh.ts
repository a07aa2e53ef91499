import { gaussRule } from "./gauss";
import { INTERFACE, type Segment } from "./segment";

/**
 * Panels and their nodes in flat arrays, copper first; reused from solve to solve. Between two planes b apart,
 * W = exp(πz/b) maps the strip to the upper half plane, where a charge has one image; over one plane W = z.
 *
 * A panel runs from its start a along v, r = |v|·u^p: p = 3 at copper corners (charge ∝ r^(−⅓)), p = 2 at the edges of
 * strips without thickness (r^(−½)), 1 elsewhere; so the density is smooth in u everywhere.
 */
export class Mesh {
  panels = 0;
  nodes = 0;
  /** nodes on copper; they come first */
  copper = 0;
  /** distance between the planes [m], 0 over one plane */
  upper = 0;
  power = new Int32Array(0);
  size = new Int32Array(0);
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

  /** |ζ − ½|² by p beyond which the rule's points serve instead of integrals, ζ = (z − a)/v */
  private readonly farness = new Float64Array(4);
  private decisions = new Uint8Array(4096);
  private decided = 0;
  private replay: Uint8Array | null = null;
  private roomForPanels = 0;
  private roomForNodes = 0;

  /** @param near  panels nearer than this many half-lengths are integrated in closed form */
  begin(upper: number, near: number): void {
    this.panels = 0;
    this.nodes = 0;
    this.copper = 0;
    this.upper = upper;
    // in u = r^(1/p) everything looks nearer
    this.farness[1] = (near * near) / 4;
    this.farness[2] = this.farness[3] = (near + 0.5) * (near + 0.5);
  }

  /**
   * Adds the panel between shares `from` and `to` of a segment, starting at `from`: r = |v|·u^p from there, p = `power`.
   * Where it runs against the segment, right and left change places.
   */
  addPanel(s: Segment, index: number, from: number, to: number, power: number, n: number): void {
    this.reserve(n);
    const k = this.panels;
    const dx = s.x2 - s.x1;
    const dy = s.y2 - s.y1;
    const ax = from === 1 ? s.x2 : s.x1 + from * dx;
    const ay = from === 1 ? s.y2 : s.y1 + from * dy;
    const vx = (to === 1 ? s.x2 : s.x1 + to * dx) - ax;
    const vy = (to === 1 ? s.y2 : s.y1 + to * dy) - ay;
    const square = vx * vx + vy * vy;
    const half = Math.sqrt(square) / 2;
    this.power[k] = power;
    this.size[k] = n;
    this.owner[k] = s.owner;
    this.segment[k] = index;
    this.right[k] = to > from ? s.right : s.left;
    this.left[k] = to > from ? s.left : s.right;
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
    this.reach[k] = Math.sqrt(square * this.farness[power]!);
    this.addNodes(k, power, n);
  }

  /**
   * Whether a squared distance is below a limit; where decisions are held, what was decided at this place before, so that
   * a result does not step where a panel changes from near to far.
   */
  isNear(square: number, limit: number): boolean {
    const place = this.decided++;
    if (this.replay) return this.replay[place] === 1;
    if (place >= this.decisions.length) {
      const wider = new Uint8Array(2 * place);
      wider.set(this.decisions);
      this.decisions = wider;
    }
    const near = square <= limit;
    this.decisions[place] = near ? 1 : 0;
    return near;
  }

  /** Repeats earlier decisions of isNear, in order; null decides anew. */
  hold(decisions: Uint8Array | null): void {
    this.replay = decisions;
    this.decided = 0;
  }

  /** The decisions since `hold`. */
  takeDecisions(): Uint8Array {
    return this.replay ?? this.decisions.slice(0, this.decided);
  }

  /** After the last panel. */
  close(): void {
    this.first[this.panels] = this.nodes;
  }

  private addNodes(k: number, power: number, n: number): void {
    const { t } = gaussRule(n);
    this.first[k] = this.nodes;
    for (let j = 0; j < n; j++) {
      const r = along(power, t[j]!);
      const x = this.ax[k]! + r * this.vx[k]!;
      const y = this.ay[k]! + r * this.vy[k]!;
      const i = this.nodes + j;
      this.x[i] = x;
      this.y[i] = y;
      this.mapX[i] = mappedX(this.upper, x, y);
      this.mapY[i] = mappedY(this.upper, x, y);
      this.mirrorX[i] = mappedX(this.upper, -x, y);
      this.mirrorY[i] = mappedY(this.upper, -x, y);
    }
    this.panels += 1;
    this.nodes += n;
    if (this.owner[k] !== INTERFACE) this.copper = this.nodes;
  }

  /** Room for one more panel of n nodes. */
  private reserve(n: number): void {
    if (this.panels + 1 > this.roomForPanels) {
      const room = 2 * this.panels + 64;
      for (const name of perPanel) this[name] = longer(this[name], new Float64Array(room));
      for (const name of labels) this[name] = longer(this[name], new Int32Array(room + 1));
      this.roomForPanels = room;
    }
    if (this.nodes + n > this.roomForNodes) {
      const room = 2 * this.nodes + 256;
      for (const name of perNode) this[name] = longer(this[name], new Float64Array(room));
      this.roomForNodes = room;
    }
  }
}

function longer<T extends Float64Array | Int32Array>(old: T, wider: T): T {
  wider.set(old);
  return wider;
}

/** Share r/|v| of a panel's length at t ∈ [−1, 1]: u^p, u = (1 + t)/2. */
export function along(p: number, t: number): number {
  const u = (1 + t) / 2;
  return p === 1 ? u : p === 2 ? u * u : u * u * u;
}

const labels = ["power", "size", "owner", "segment", "first"] as const;
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
