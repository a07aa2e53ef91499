import type { ShownVerdict } from "./verdict-mark";

/** A signal path as the strip draws it: what joins nodes, what hangs on them. SI units. */
export interface Topology {
  edges: readonly StripEdge[];
  pins: readonly StripPin[];
  terminations: readonly StripTermination[];
  /** the pin that drives */
  driver: string;
}

export type PartKind = "R" | "C" | "L" | "D";

export type StripEdge =
  | {
      kind: "line";
      id: string;
      a: string;
      b: string;
      impedance: number | null;
      delay: number | null;
      layer?: string;
    }
  | {
      kind: "part";
      id: string;
      a: string;
      b: string;
      part: PartKind;
      value: number | null;
      reference: string;
    }
  | { kind: "via"; id: string; a: string; b: string; label?: string };

export interface StripPin {
  pin: string;
  node: string;
  role: "driver" | "receiver" | "either";
  /** a driver's resistance, a receiver's capacitance, as words */
  detail?: string;
  verdict?: ShownVerdict | null;
}

export interface StripTermination {
  id: string;
  node: string;
  /** in the order from the node to the rail */
  parts: readonly { part: PartKind; value: number | null; reference?: string }[];
  rail: string;
}

/** What a strand ends in. */
export type StrandEnd =
  | { kind: "pin"; pin: StripPin }
  | { kind: "rail"; rail: string }
  | { kind: "joins"; node: string }
  | { kind: "open" };

/** A run of edges drawn level in one row; its branches start at its nodes, in rows below. */
export interface Strand {
  id: string;
  from: string;
  edges: StripEdge[];
  /** nodes after each edge */
  nodes: string[];
  end: StrandEnd;
  branches: Strand[];
  /** drawn under its node with a short lead: a termination or a pin within the line */
  hanging: boolean;
}

/**
 * Turns the graph into strands: from the driver the main one follows the branch that leads on longest (receivers
 * before open ends); every other branch, pin and termination is a strand below. An edge that closes a loop ends in
 * a mark that names the node it joins.
 *
 * @returns the main strand, and what the driver does not reach
 */
export function strandsOf(topology: Topology): { main: Strand; root: string; apart: number } {
  const { edges, pins, terminations } = topology;
  const driver = pins.find((p) => p.pin === topology.driver) ?? pins.find((p) => p.role === "driver");
  const root = driver?.node ?? edges[0]?.a ?? "";
  const at = new Map<string, StripEdge[]>();
  for (const edge of edges)
    for (const node of new Set([edge.a, edge.b])) at.set(node, [...(at.get(node) ?? []), edge]);

  // A spanning tree, breadth first: the shortest way to each node is drawn, what closes a loop is marked.
  const children = new Map<string, { edge: StripEdge; node: string; joins: boolean }[]>();
  const seen = new Set([root]);
  const used = new Set<string>();
  const order: string[] = [root];
  for (let i = 0; i < order.length; i++) {
    const node = order[i] ?? "";
    for (const edge of at.get(node) ?? []) {
      if (used.has(edge.id)) continue;
      used.add(edge.id);
      const other = edge.a === node ? edge.b : edge.a;
      const joins = seen.has(other);
      children.set(node, [...(children.get(node) ?? []), { edge, node: other, joins }]);
      if (joins) continue;
      seen.add(other);
      order.push(other);
    }
  }

  const reach = new Map<string, number>();
  for (const node of [...order].reverse()) {
    const own = pins.some((p) => p.node === node && p !== driver) ? 1 : 0;
    const best = Math.max(0, ...(children.get(node) ?? []).map((c) => weight(c)));
    reach.set(node, own + best);
  }
  function weight(c: { edge: StripEdge; node: string; joins: boolean }): number {
    const step = c.edge.kind === "line" ? 1e-3 + (c.edge.delay ?? 0) * 1e9 : 1e-3;
    return c.joins ? 0 : step + (reach.get(c.node) ?? 0);
  }

  function strandFrom(from: string, first: { edge: StripEdge; node: string; joins: boolean } | null): Strand {
    const strand: Strand = {
      id: first?.edge.id ?? from,
      from,
      edges: [],
      nodes: [],
      end: { kind: "open" },
      branches: [],
      hanging: false,
    };
    let node = from;
    let next = first;
    for (;;) {
      if (next) {
        strand.edges.push(next.edge);
        strand.nodes.push(next.node);
        if (next.joins) {
          strand.end = { kind: "joins", node: next.node };
          return strand;
        }
        node = next.node;
      }
      const onward = [...(children.get(node) ?? [])].sort((a, b) => weight(b) - weight(a));
      next = onward[0] ?? null;
      strand.branches.push(...onward.slice(1).map((c) => strandFrom(node, c)));
      const here = pins.filter((p) => p.node === node && p !== driver);
      const inline = next ? undefined : here[0];
      if (inline) strand.end = { kind: "pin", pin: inline };
      for (const pin of here)
        if (pin !== inline) strand.branches.push({ ...hung(pin.pin, node), end: { kind: "pin", pin } });
      for (const t of terminations.filter((t) => t.node === node)) strand.branches.push(terminationStrand(t));
      if (!next) return strand;
    }
  }
  const apart = edges.filter((e) => !used.has(e.id)).length + pins.filter((p) => !seen.has(p.node)).length;
  return { main: strandFrom(root, null), root, apart };
}

function hung(id: string, from: string): Strand {
  return { id, from, edges: [], nodes: [], end: { kind: "open" }, branches: [], hanging: true };
}

function terminationStrand(t: StripTermination): Strand {
  const edges = t.parts.map((p, i): StripEdge => ({
    kind: "part",
    id: `${t.id}.${i}`,
    a: `${t.id}.${i}`,
    b: `${t.id}.${i + 1}`,
    part: p.part,
    value: p.value,
    reference: p.reference ?? "",
  }));
  return { ...hung(t.id, t.node), edges, nodes: edges.map((e) => e.b), end: { kind: "rail", rail: t.rail } };
}
