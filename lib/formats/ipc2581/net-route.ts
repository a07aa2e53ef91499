import { AnchorMap, type Anchor } from "./anchors";
import type { BoardSection } from "./document";
import type { DraftTrace } from "./draft";
import { PlaceGrid } from "./place-grid";
import { cutTrace, nearestOn, type Cut } from "./trace-cuts";

const CELL_M = 1e-3;

export interface NetRoute {
  sections: BoardSection[];
  /** Lines that begin and end in the same pad, which join nothing. */
  within: DraftTrace[];
}

/**
 * Joins the lines of one net: ends in a pin's, via's or pad's copper are that node; ends at equal places on one layer
 * are a junction; an end or an anchor on the way of another line cuts it in two.
 *
 * @param tolerance places nearer than this are one [m]
 */
export function routeNet(
  traces: readonly DraftTrace[],
  anchors: readonly Anchor[],
  tolerance: number,
): NetRoute {
  const map = new AnchorMap(anchors, tolerance);
  const nodes = new Nodes(tolerance);
  const ends = traces.map((trace) => {
    const [x0 = 0, y0 = 0] = trace.path;
    const x1 = trace.path.at(-2) ?? 0;
    const y1 = trace.path.at(-1) ?? 0;
    const from = nodes.of(map.find(trace.layer, x0, y0), trace.layer, x0, y0);
    const to = nodes.of(map.find(trace.layer, x1, y1), trace.layer, x1, y1);
    from.beyond = to;
    to.beyond = from;
    return { trace, from, to };
  });
  const cuts = findCuts(ends, anchors, nodes, tolerance);

  const names = new NodeNames();
  const sections: BoardSection[] = [];
  const within: DraftTrace[] = [];
  ends.forEach(({ trace, from, to }, index) => {
    for (const piece of cutTrace(trace, cuts.get(index) ?? [], nodes.root(from), nodes.root(to))) {
      const [start, end] = [nodes.root(piece.from), nodes.root(piece.to)];
      if (start === end) within.push(trace);
      else
        sections.push({
          from: names.of(start),
          to: names.of(end),
          layer: trace.layer,
          width_m: trace.width_m,
          length_m: piece.length_m,
          path: piece.path,
          line: trace.line,
        });
    }
  });
  return { sections, within };
}

export interface RouteNode {
  anchor: Anchor | null;
  layer: string;
  x: number;
  y: number;
  /** Ends of lines here. */
  degree: number;
  /** The other end of the line that ends here; of several lines the last one's. */
  beyond: RouteNode | null;
  /** The node that it turned out to be. */
  into: RouteNode | null;
}

interface TraceEnds {
  trace: DraftTrace;
  from: RouteNode;
  to: RouteNode;
}

function findCuts(
  ends: readonly TraceEnds[],
  anchors: readonly Anchor[],
  nodes: Nodes,
  tolerance: number,
): Map<number, Cut[]> {
  const grids = new Map<string, PlaceGrid<{ index: number; chord: number }>>();
  ends.forEach(({ trace: { layer, path, width_m } }, index) => {
    let grid = grids.get(layer);
    if (!grid) grids.set(layer, (grid = new PlaceGrid(CELL_M)));
    const reach = width_m / 2 + tolerance;
    for (let chord = 0; 2 * chord + 3 < path.length; chord++) {
      const [x0 = 0, y0 = 0, x1 = 0, y1 = 0] = path.slice(2 * chord, 2 * chord + 4);
      const [left, right] = [Math.min(x0, x1) - reach, Math.max(x0, x1) + reach];
      grid.add(left, Math.min(y0, y1) - reach, right, Math.max(y0, y1) + reach, { index, chord });
    }
  });
  const cuts = new Map<number, Cut[]>();
  const meet = (
    node: RouteNode,
    layer: string,
    x: number,
    y: number,
    reachOf: (trace: DraftTrace) => number,
  ) => {
    const asked = new Set<number>();
    for (const { index } of grids.get(layer)?.at(x, y) ?? []) {
      const line = ends[index];
      if (!line || asked.has(index)) continue;
      asked.add(index);
      const [from, to, self] = [nodes.root(line.from), nodes.root(line.to), nodes.root(node)];
      if (from === self || to === self) continue;
      // Its own line leads there already; what lies between is a section, however short.
      const beyond = node.degree === 1 && node.beyond ? nodes.root(node.beyond) : null;
      if (beyond && (beyond === from || beyond === to)) continue;
      const found = nearestOn(line.trace, x, y);
      const reach = reachOf(line.trace);
      if (found.distance > reach) continue;
      // At its very end the other line is met, not cut.
      if (found.at <= reach) nodes.unite(from, self);
      else if (found.total - found.at <= reach) nodes.unite(to, self);
      else cuts.set(index, [...(cuts.get(index) ?? []), { ...found, node: self }]);
    }
  };
  for (const anchor of anchors)
    for (const [layer, { x, y }] of anchor.shapes)
      meet(nodes.ofAnchor(anchor), layer, x, y, ({ width_m }) => width_m / 2);
  for (const node of nodes.junctions()) {
    // A loose end lies in the other line's copper; an end that is joined already must meet its very centre.
    const loose = node.degree === 1;
    meet(node, node.layer, node.x, node.y, ({ width_m }) => (loose ? width_m / 2 : tolerance));
  }
  return cuts;
}

/** Nodes of one net: one for each anchor, one for each place on a layer where lines end. */
class Nodes {
  private readonly anchors = new Map<Anchor, RouteNode>();
  private readonly places: RouteNode[] = [];
  private readonly grids = new Map<string, PlaceGrid<RouteNode>>();

  constructor(private readonly tolerance: number) {}

  of(anchor: Anchor | null, layer: string, x: number, y: number): RouteNode {
    const node = anchor ? this.ofAnchor(anchor) : this.place(layer, x, y);
    node.degree++;
    return node;
  }

  ofAnchor(anchor: Anchor): RouteNode {
    let node = this.anchors.get(anchor);
    if (!node)
      this.anchors.set(
        anchor,
        (node = { anchor, layer: "", x: anchor.x, y: anchor.y, degree: 0, beyond: null, into: null }),
      );
    return node;
  }

  junctions(): readonly RouteNode[] {
    return this.places;
  }

  root(node: RouteNode): RouteNode {
    let root = node;
    while (root.into) root = root.into;
    return root;
  }

  /** A pin's name outlives a via's, a via's a junction's. */
  unite(a: RouteNode, b: RouteNode): void {
    const [first, second] = [this.root(a), this.root(b)];
    if (first === second) return;
    if (rank(first) >= rank(second)) second.into = first;
    else first.into = second;
  }

  private place(layer: string, x: number, y: number): RouteNode {
    let grid = this.grids.get(layer);
    if (!grid) this.grids.set(layer, (grid = new PlaceGrid(CELL_M)));
    const t = this.tolerance;
    for (const node of grid.at(x, y)) if (Math.abs(node.x - x) <= t && Math.abs(node.y - y) <= t) return node;
    const node: RouteNode = { anchor: null, layer, x, y, degree: 0, beyond: null, into: null };
    this.places.push(node);
    grid.add(x - t, y - t, x + t, y + t, node);
    return node;
  }
}

function rank({ anchor }: RouteNode): number {
  return anchor === null ? 0 : anchor.pin === null ? 1 : 2;
}

/** Pins by their name; vias, lone pads and junctions counted through. */
class NodeNames {
  private readonly names = new Map<RouteNode, string>();
  private readonly counts = { via: 0, pad: 0, j: 0 };

  of(node: RouteNode): string {
    let name = this.names.get(node);
    if (name === undefined) {
      const { anchor } = node;
      const kind = !anchor ? "j" : anchor.plated ? "via" : "pad";
      name = anchor?.pin ?? `${kind}${++this.counts[kind]}`;
      this.names.set(node, name);
    }
    return name;
  }
}
