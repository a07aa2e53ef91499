import type { Fineness } from "./accuracy";
import type { Mesh } from "./mesh";
import { CORNER, EDGE, INTERFACE, PLAIN, type Outline, type Segment } from "./segment";
import { Vertices, distanceTo, projection } from "./vertices";

/** Integer decisions of a mesh: held fixed, the mesh follows its geometry smoothly. */
export interface Topology {
  /** per segment: the vertices that refine it inside, and the panels in each stretch between them */
  parts: { inner: number[]; counts: number[] }[];
  /** which panels are integrated in closed form from where, see Mesh.isNear */
  near: Uint8Array | null;
}

const vertices = new Vertices();
/** Refinement points of the segment at hand: place and panel length there [m]. */
const at = new Float64Array(64);
const size = new Float64Array(64);
const ends = new Float64Array(1024);

/** Cuts an outline into panels, copper first; decides the topology, or follows the one given. */
export function layPanels(
  mesh: Mesh,
  outline: Outline,
  half: boolean,
  fineness: Fineness,
  fixed?: Topology,
): Topology {
  const { segments, upper } = outline;
  vertices.load(outline, half);
  mesh.begin(upper, fineness.near);
  const held = fixed?.parts.length === segments.length ? fixed : undefined;
  const parts = segments.map((segment, index) => {
    const part = held?.parts[index] ?? { inner: [], counts: [] };
    layOn(mesh, segment, index, fineness, part, held === undefined);
    return part;
  });
  mesh.close();
  mesh.hold(held?.near ?? null);
  return held ?? { parts, near: null };
}

function layOn(
  mesh: Mesh,
  s: Segment,
  index: number,
  f: Fineness,
  part: Topology["parts"][number],
  decide: boolean,
): void {
  const length = Math.sqrt((s.x2 - s.x1) * (s.x2 - s.x1) + (s.y2 - s.y1) * (s.y2 - s.y1));
  const growth = s.outward === 0 ? f.growth : f.outerGrowth;
  at[0] = 0;
  size[0] = endSize(s, s.end1, s.x1, s.y1, f, length);
  at[1] = length;
  size[1] = endSize(s, s.end2, s.x2, s.y2, f, length);
  if (decide) chooseInner(s, f, length, growth, part.inner);
  let last = 0;
  const endAt = at[1];
  const endLength = size[1];
  for (const i of part.inner) {
    last += 1;
    at[last] = projection(s, vertices.x[i]!, vertices.y[i]!) * length;
    size[last] = f.facing * distanceTo(s, vertices.x[i]!, vertices.y[i]!);
  }
  last += 1;
  at[last] = endAt;
  size[last] = endLength;
  const nodes = s.owner === INTERFACE ? f.interfaceNodes : f.copperNodes;
  // of the images between two planes only the nearest are integrated in closed form; the others lie 2b away
  const cap = mesh.upper > 0 ? mesh.upper * (s.owner === INTERFACE ? 2 : 1) : Infinity;
  const first = power(s.end1);
  const final = power(s.end2);
  for (let k = 0; k < last; k++) {
    const from = at[k]!;
    const least = last === 1 && first > 1 && final > 1 ? 2 : 1;
    const count = grade(
      at[k + 1]! - from,
      size[k]!,
      size[k + 1]!,
      growth,
      cap,
      least,
      decide ? 0 : (part.counts[k] ?? 1),
    );
    part.counts[k] = count;
    for (let i = 0; i < count; i++) {
      const a = (from + ends[i]!) / length;
      const b = k + 1 === last && i + 1 === count ? 1 : (from + ends[i + 1]!) / length;
      if (b === 1 && final > 1) mesh.addPanel(s, index, 1, a, final, nodes);
      else mesh.addPanel(s, index, a, b, a === 0 ? first : 1, nodes);
    }
  }
}

/** Charge near copper corners goes as r^(−⅓), at the edges of strips without thickness as r^(−½). */
function power(kind: number): number {
  return kind === CORNER ? 3 : kind === EDGE ? 2 : 1;
}

/** Panel length wanted at an end of a segment. */
function endSize(s: Segment, kind: number, x: number, y: number, f: Fineness, length: number): number {
  if (kind === PLAIN) {
    let nearest = length;
    for (let i = 0; i < vertices.count; i++) {
      const dx = vertices.x[i]! - x;
      const dy = vertices.y[i]! - y;
      nearest = Math.min(nearest, 2 * f.facing * Math.sqrt(dx * dx + dy * dy));
    }
    return nearest;
  }
  const share = s.owner === INTERFACE && kind < CORNER ? f.interfaceShare : f.copperShare;
  return share * Math.min(vertices.room[vertices.at(x, y)] ?? length, length);
}

/** Chooses the vertices that face the segment so closely that it must be refined between its ends. */
function chooseInner(s: Segment, f: Fineness, length: number, growth: number, inner: number[]): void {
  let count = 2;
  // the closest first; each takes in those whose demand it already meets
  for (let round = 0; round < vertices.count; round++) {
    let best = -1;
    let bestSize = Infinity;
    let bestAt = 0;
    for (let i = 0; i < vertices.count; i++) {
      const x = vertices.x[i]!;
      const y = vertices.y[i]!;
      const place = projection(s, x, y) * length;
      if (place <= 0 || place >= length) continue;
      const wanted = f.facing * distanceTo(s, x, y);
      if (wanted <= 0 || wanted >= bestSize || Math.min(place, length - place) < 0.3 * wanted) continue;
      let allowed = Infinity;
      for (let p = 0; p < count; p++)
        allowed = Math.min(allowed, size[p]! + growth * Math.abs(at[p]! - place));
      if (wanted > 0.7 * allowed) continue;
      best = i;
      bestSize = wanted;
      bestAt = place;
    }
    if (best < 0 || count === at.length) break;
    at[count] = bestAt;
    size[count] = bestSize;
    count += 1;
    inner.push(best);
  }
  inner.sort(
    (a, b) => projection(s, vertices.x[a]!, vertices.y[a]!) - projection(s, vertices.x[b]!, vertices.y[b]!),
  );
}

/**
 * Fills `ends` with the ends of panels on (0, length) whose lengths follow
 * size(t) = min(a + growth·t, b + growth·(length − t), cap): equal steps of ∫dt/size.
 *
 * @param fixed  number of panels, or 0 to let the sizes decide
 * @returns number of panels
 */
function grade(
  length: number,
  a: number,
  b: number,
  growth: number,
  cap: number,
  least: number,
  fixed: number,
): number {
  const start = Math.min(a, b + growth * length, cap);
  const end = Math.min(b, a + growth * length, cap);
  // where both branches meet, and the stretch on which the cap holds
  const middle = Math.min(length, Math.max(0, (end - start + growth * length) / (2 * growth)));
  const top = Math.min(cap, start + growth * middle, end + growth * (length - middle));
  const flatFrom = Math.min(middle, (cap - start) / growth);
  const flat = Math.max(0, length - flatFrom - Math.min(length - middle, (cap - end) / growth));
  const rising = Math.log(1 + (growth * flatFrom) / start) / growth;
  const falling = Math.log(1 + (growth * (length - flatFrom - flat)) / end) / growth;
  const total = rising + flat / top + falling;
  const most = ends.length - 1;
  const count = fixed > 0 ? fixed : Math.min(most, Math.max(least, Math.ceil(total - 0.2)));
  ends[0] = 0;
  for (let i = 1; i < count; i++) {
    const m = (i * total) / count;
    if (m <= rising) ends[i] = (start * (Math.exp(growth * m) - 1)) / growth;
    else if (m <= total - falling) ends[i] = flatFrom + (m - rising) * top;
    else ends[i] = length - (end * (Math.exp(growth * (total - m)) - 1)) / growth;
  }
  ends[count] = length;
  return count;
}
