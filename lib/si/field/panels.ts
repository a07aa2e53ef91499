import type { Fineness } from "./accuracy";
import { CORNER, EDGE, INTERFACE, PLAIN, type Outline, type Segment } from "./segment";

/**
 * Panels of one solve. A panel runs from its start a along v, r = |v|·u^p: p = 3 at copper corners (charge ∝ r^−⅓),
 * p = 2 at the edges of strips without thickness (r^−½), 1 elsewhere; so the density is smooth in u everywhere.
 */
export interface Panel {
  ax: number;
  ay: number;
  vx: number;
  vy: number;
  p: 1 | 2 | 3;
  n: number;
  owner: number;
  right: number;
  left: number;
  segment: number;
}

/** Share r/|v| of a panel's length at t ∈ [−1, 1], u = (1 + t)/2. */
export function along(p: number, t: number): number {
  const u = (1 + t) / 2;
  return p === 1 ? u : p === 2 ? u * u : u * u * u;
}

/** Integer decisions of a mesh: held fixed, the mesh follows its geometry smoothly. */
export interface Topology {
  /** per segment: vertices that refine it inside, and panels between breakpoints */
  parts: { inner: number[]; counts: number[] }[];
}

interface Vertex {
  x: number;
  y: number;
  kind: number;
  /** distance to the nearest other vertex, mirror image or plane [m] */
  room: number;
}

/** Segments of the half x ≥ 0, cut at the mirror line. */
export function rightHalf(segments: Segment[], scale: number): Segment[] {
  const tiny = 1e-9 * scale;
  const kept: Segment[] = [];
  for (const s of segments) {
    if (s.x1 <= tiny && s.x2 <= tiny) continue;
    if (s.x1 >= -tiny && s.x2 >= -tiny) {
      kept.push(s);
      continue;
    }
    const y = s.y1 + ((s.y2 - s.y1) * -s.x1) / (s.x2 - s.x1);
    const outward = s.outward === 2 ? 1 : s.outward;
    if (s.x1 < 0) kept.push({ ...s, x1: 0, y1: y, end1: PLAIN, outward: outward === -1 ? 0 : outward });
    else kept.push({ ...s, x2: 0, y2: y, end2: PLAIN, outward: outward === 1 ? 0 : outward });
  }
  return kept;
}

/** Cuts an outline into panels, copper first; decides the topology, or follows the one given. */
export function panelsOf(
  outline: Outline,
  half: boolean,
  fineness: Fineness,
  fixed?: Topology,
): { panels: Panel[]; topology: Topology } {
  const { segments } = outline;
  const vertices = verticesOf(segments, outline.upper, half);
  const topology: Topology = { parts: [] };
  const panels: Panel[] = [];
  segments.forEach((segment, index) => {
    const part = fixed?.parts[index] ?? { inner: innerVertices(segment, vertices, fineness), counts: [] };
    topology.parts.push(part);
    cut(segment, index, vertices, fineness, part, panels);
  });
  panels.sort((a, b) => Number(a.owner === INTERFACE) - Number(b.owner === INTERFACE));
  return { panels, topology };
}

function verticesOf(segments: Segment[], upper: number, half: boolean): Vertex[] {
  const vertices: Vertex[] = [];
  const add = (x: number, y: number, kind: number) => {
    if (kind === PLAIN) return;
    const known = vertices.find((v) => v.x === x && v.y === y);
    if (known) known.kind = Math.max(known.kind, kind);
    else vertices.push({ x, y, kind, room: 2 * y });
  };
  for (const s of segments) {
    add(s.x1, s.y1, s.end1);
    add(s.x2, s.y2, s.end2);
  }
  for (const v of vertices) {
    if (upper > 0) v.room = Math.min(v.room, 2 * (upper - v.y));
    if (half) v.room = Math.min(v.room, 2 * v.x);
    for (const other of vertices) {
      if (other === v) continue;
      const d = Math.sqrt((other.x - v.x) ** 2 + (other.y - v.y) ** 2);
      if (d < v.room) v.room = d;
    }
    for (const s of segments) {
      if (s.owner === INTERFACE) continue;
      const d = distanceTo(s, v);
      if (d > 0 && d < v.room) v.room = d;
    }
  }
  return vertices;
}

/** Distance from a vertex to a segment; 0 where it lies on it. */
function distanceTo(s: Segment, v: { x: number; y: number }): number {
  const t = projection(s, v);
  const x = s.x1 + t * (s.x2 - s.x1) - v.x;
  const y = s.y1 + t * (s.y2 - s.y1) - v.y;
  const d = Math.sqrt(x * x + y * y);
  return d < 1e-9 * (Math.abs(v.y) + Math.abs(s.y1)) ? 0 : d;
}

/** Foot of the perpendicular as a share of the segment, held within it. */
function projection(s: Segment, v: { x: number; y: number }): number {
  const dx = s.x2 - s.x1;
  const dy = s.y2 - s.y1;
  const t = ((v.x - s.x1) * dx + (v.y - s.y1) * dy) / (dx * dx + dy * dy);
  return Math.min(1, Math.max(0, t));
}

function lengthOf(s: Segment): number {
  return Math.sqrt((s.x2 - s.x1) ** 2 + (s.y2 - s.y1) ** 2);
}

/** Panel length wanted at an end of a segment. */
function endSize(s: Segment, end: 1 | 2, vertices: Vertex[], f: Fineness, length: number): number {
  const kind = end === 1 ? s.end1 : s.end2;
  const x = end === 1 ? s.x1 : s.x2;
  const y = end === 1 ? s.y1 : s.y2;
  if (kind === PLAIN) {
    let size = length;
    for (const v of vertices) {
      const d = Math.sqrt((v.x - x) ** 2 + (v.y - y) ** 2);
      size = Math.min(size, 2 * f.facing * d);
    }
    return size;
  }
  const vertex = vertices.find((v) => v.x === x && v.y === y);
  const room = Math.min(vertex?.room ?? length, length);
  const share = s.owner === INTERFACE && kind < CORNER ? f.interfaceShare : f.copperShare;
  return share * room;
}

function slopeOf(s: Segment, f: Fineness): number {
  return s.outward !== 0 ? f.outerGrowth : f.growth;
}

/** Vertices that face the segment so closely that it must be refined between its ends. */
function innerVertices(s: Segment, vertices: Vertex[], f: Fineness): number[] {
  const length = lengthOf(s);
  const growth = slopeOf(s, f);
  const points = [
    { at: 0, size: endSize(s, 1, vertices, f, length) },
    { at: length, size: endSize(s, 2, vertices, f, length) },
  ];
  const facing = vertices
    .map((v, index) => ({ index, at: projection(s, v) * length, size: f.facing * distanceTo(s, v) }))
    .filter((item) => item.size > 0 && item.at > 0 && item.at < length)
    .sort((a, b) => a.size - b.size);
  const chosen: { index: number; at: number }[] = [];
  for (const item of facing) {
    const already = Math.min(...points.map((p) => p.size + growth * Math.abs(p.at - item.at)));
    if (item.size > 0.7 * already) continue;
    if (Math.min(item.at, length - item.at) < 0.3 * item.size) continue;
    points.push(item);
    chosen.push(item);
  }
  return chosen.sort((a, b) => a.at - b.at).map((item) => item.index);
}

function cut(
  s: Segment,
  index: number,
  vertices: Vertex[],
  f: Fineness,
  part: Topology["parts"][number],
  panels: Panel[],
): void {
  const length = lengthOf(s);
  const growth = slopeOf(s, f);
  const points = [
    { at: 0, size: endSize(s, 1, vertices, f, length) },
    ...part.inner.map((i) => {
      const v = vertices[i] as Vertex;
      return { at: projection(s, v) * length, size: f.facing * distanceTo(s, v) };
    }),
    { at: length, size: endSize(s, 2, vertices, f, length) },
  ];
  for (let k = 0; k + 1 < points.length; k++) {
    const a = points[k] as (typeof points)[number];
    const b = points[k + 1] as (typeof points)[number];
    const ends = grade(
      b.at - a.at,
      a.size,
      b.size,
      growth,
      part.counts,
      k,
      bothSingular(s, k, points.length),
    );
    for (let i = 0; i + 1 < ends.length; i++) {
      const first = k === 0 && i === 0 ? power(s.end1) : 1;
      const last = k + 2 === points.length && i + 2 === ends.length ? power(s.end2) : 1;
      pushPanel(s, index, (a.at + ends[i]!) / length, (a.at + ends[i + 1]!) / length, first, last, f, panels);
    }
  }
}

function bothSingular(s: Segment, k: number, count: number): boolean {
  return count === 2 && k === 0 && power(s.end1) > 1 && power(s.end2) > 1;
}

function power(kind: number): 1 | 2 | 3 {
  return kind === CORNER ? 3 : kind === EDGE ? 2 : 1;
}

/**
 * Ends of panels on (0, length) whose lengths follow size(t) = min(a + growth·t, b + growth·(length − t)):
 * equal steps of ∫dt/size.
 */
function grade(
  length: number,
  a: number,
  b: number,
  growth: number,
  counts: number[],
  k: number,
  two: boolean,
): Float64Array {
  const start = Math.min(a, b + growth * length);
  const end = Math.min(b, a + growth * length);
  // where both branches meet
  const middle = Math.min(length, Math.max(0, (end - start + growth * length) / (2 * growth)));
  const rising = Math.log(1 + (growth * middle) / start) / growth;
  const falling = Math.log(1 + (growth * (length - middle)) / end) / growth;
  const total = rising + falling;
  const count = counts[k] ?? Math.max(two ? 2 : 1, Math.ceil(total - 0.2));
  counts[k] = count;
  const ends = new Float64Array(count + 1);
  for (let i = 1; i < count; i++) {
    const m = (i * total) / count;
    ends[i] =
      m <= rising
        ? (start * (Math.exp(growth * m) - 1)) / growth
        : length - (end * (Math.exp(growth * (total - m)) - 1)) / growth;
  }
  ends[count] = length;
  return ends;
}

function pushPanel(
  s: Segment,
  segment: number,
  from: number,
  to: number,
  first: 1 | 2 | 3,
  last: 1 | 2 | 3,
  f: Fineness,
  panels: Panel[],
): void {
  const dx = s.x2 - s.x1;
  const dy = s.y2 - s.y1;
  const base = { n: s.owner === INTERFACE ? f.interfaceNodes : f.copperNodes, owner: s.owner, segment };
  const x1 = s.x1 + from * dx;
  const y1 = s.y1 + from * dy;
  const x2 = to === 1 ? s.x2 : s.x1 + to * dx;
  const y2 = to === 1 ? s.y2 : s.y1 + to * dy;
  if (last > 1) {
    // turned round, so that the panel starts at its corner
    panels.push({ ...base, ax: x2, ay: y2, vx: x1 - x2, vy: y1 - y2, p: last, right: s.left, left: s.right });
  } else {
    panels.push({
      ...base,
      ax: x1,
      ay: y1,
      vx: x2 - x1,
      vy: y2 - y1,
      p: first,
      right: s.right,
      left: s.left,
    });
  }
}
