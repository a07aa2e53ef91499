import { textWidth } from "./text-width";
import type { Strand, StrandEnd, StripEdge, Topology } from "./topology-graph";
import { strandsOf } from "./topology-graph";

/** A section shorter than this could not be seen; it is drawn this long and counted. */
export const LEAST_SECTION = 12;
const UNKNOWN_SECTION = 76;
const PART = 54;
const VIA = 18;
/** The lead of what hangs under its node. */
const LEAD = 14;
const MOST_PX_PER_PS = 3;
/** More rows than this are worth a wider drawing. */
const DEEP = 4;

export interface PlacedEdge {
  edge: StripEdge;
  x1: number;
  x2: number;
  row: number;
}

export interface PlacedStrand {
  strand: Strand;
  row: number;
  /** row of the strand it leaves */
  parentRow: number;
  /** where it leaves it, and where its own first edge starts [px] */
  x0: number;
  start: number;
  end: number;
  edges: PlacedEdge[];
}

export interface TopologyLayout {
  strands: PlacedStrand[];
  rows: number;
  /** [px/s]; 0 when no section has a delay */
  scale: number;
  /** sections drawn longer than to scale */
  stretched: number;
  left: number;
  right: number;
  apart: number;
}

/** Places the strands: across by delay, branches in rows below, nothing over anything. */
export function layTopology(topology: Topology, width: number): TopologyLayout {
  let layout = layAt(topology, width);
  // Many branches side by side would become a deep staircase: a wider drawing, to be scrolled, is easier to read.
  for (let wide = width * 1.12; layout.rows > DEEP && wide < width * 1.9; wide *= 1.12) {
    const next = layAt(topology, wide);
    if (next.rows < layout.rows) layout = next;
  }
  return layout;
}

function layAt(topology: Topology, width: number): TopologyLayout {
  const { main, apart } = strandsOf(topology);
  const driver = topology.pins.find((p) => p.pin === topology.driver);
  const left = 16 + Math.max(44, textWidth(driver?.pin ?? "", 12, true), textWidth(driver?.detail ?? "", 12));
  const delays = topology.edges.flatMap((e) =>
    e.kind === "line" && e.delay !== null && e.delay > 0 ? [e.delay] : [],
  );

  const scale = chooseScale(main, left, width, delays);
  const strands: PlacedStrand[] = [];
  placeStrand(main, left, 0, 0, scale, strands, []);
  const lines = strands.flatMap((s) => s.edges).filter((e) => e.edge.kind === "line");
  return {
    strands,
    rows: Math.max(...strands.map((s) => s.row)) + 1,
    scale,
    stretched: lines.filter(
      ({ edge }) => edge.kind === "line" && edge.delay !== null && edge.delay * scale < LEAST_SECTION,
    ).length,
    left,
    right: Math.max(...strands.map((s) => s.end + endWidth(s.strand.end, s.row > 0))),
    apart,
  };
}

/** The largest scale that fits the width. A path too long for it is drawn wider, so that sections stay legible. */
function chooseScale(main: Strand, left: number, width: number, delays: readonly number[]): number {
  if (delays.length === 0) return 0;
  const most = MOST_PX_PER_PS * 1e12;
  const extent = (scale: number): number => rightOf(main, left, scale);
  const mean = delays.reduce((a, b) => a + b, 0) / delays.length;
  const legible = 30 / mean;
  if (extent(Math.min(legible, most) * 0.5) > width) return Math.min(legible, most);
  let [low, high] = [0, most];
  for (let i = 0; i < 60; i++) {
    const middle = (low + high) / 2;
    if (extent(middle) <= width - 8) low = middle;
    else high = middle;
  }
  return low;
}

function rightOf(strand: Strand, x0: number, scale: number, below = false): number {
  let x = x0 + (strand.hanging ? LEAD : 0);
  const at = new Map([[strand.from, x0]]);
  strand.edges.forEach((e, i) => {
    x += edgeLength(e, scale);
    at.set(strand.nodes[i] ?? "", x);
  });
  return Math.max(
    x + endWidth(strand.end, below),
    ...strand.branches.map((b) => rightOf(b, at.get(b.from) ?? x, scale, true)),
  );
}

/** Drawn length of an edge [px]: a section's by its delay. */
export function edgeLength(edge: StripEdge, scale: number): number {
  if (edge.kind === "part") return PART;
  if (edge.kind === "via") return VIA;
  if (edge.delay === null || !Number.isFinite(edge.delay)) return UNKNOWN_SECTION;
  return Math.max(edge.delay * scale, LEAST_SECTION);
}

export function endWidth(end: StrandEnd, below: boolean): number {
  switch (end.kind) {
    case "pin": {
      const { pin } = end;
      const words = Math.max(textWidth(pin.pin, 12, true), textWidth(pin.verdict ?? pin.detail ?? "", 12));
      return below ? Math.max(pin.verdict ? 36 : 20, words) : 24 + (pin.verdict ? 17 : 0) + words;
    }
    case "rail":
      return 24 + textWidth(end.rail, 12);
    case "joins":
      return 16 + textWidth(`joins ${end.node}`, 12);
    case "open":
      return 12 + textWidth("open", 12);
  }
}

interface Taken {
  row: number;
  from: number;
  to: number;
  node: string;
}

function placeStrand(
  strand: Strand,
  x0: number,
  parentRow: number,
  row: number,
  scale: number,
  out: PlacedStrand[],
  taken: Taken[],
): void {
  const start = x0 + (strand.hanging ? LEAD : 0);
  let x = start;
  const at = new Map([[strand.from, x0]]);
  const edges = strand.edges.map((edge, i): PlacedEdge => {
    const x1 = x;
    x += edgeLength(edge, scale);
    at.set(strand.nodes[i] ?? "", x);
    return { edge, x1, x2: x, row };
  });
  out.push({ strand, row, parentRow, x0, start, end: x, edges });
  taken.push({ row, from: x0 - 4, to: x + endWidth(strand.end, row > 0) + 10, node: strand.from });

  // From the right, so that no branch has to cross one that is already there.
  const branches = strand.branches
    .map((b) => ({ b, x: at.get(b.from) ?? x }))
    .sort((p, q) => q.x - p.x || rightOf(p.b, p.x, scale, true) - rightOf(q.b, q.x, scale, true));
  for (const { b, x: from } of branches) {
    const to = from + rightOf({ ...b, branches: [] }, 0, scale, true) + 10;
    let below = row + 1;
    while (!isFree(taken, below, from - 4, to, b.from)) below++;
    for (let r = row + 1; r < below; r++) taken.push({ row: r, from: from - 4, to: from + 4, node: b.from });
    placeStrand(b, from, row, below, scale, out, taken);
  }
}

/** Same-node strands may share an upright, but not a row's length. */
function isFree(taken: readonly Taken[], row: number, from: number, to: number, node: string): boolean {
  return !taken.some(
    (t) => t.row === row && t.from < to && t.to > from && !(t.node === node && t.to - t.from <= 8),
  );
}
