import type { Circuit, Port, Ref } from "./circuit";
import type { TableElement } from "./current-table";

/** A line end as the lattice numbers it: 2 · line for end a, 2 · line + 1 for end b. */
export type EndIndex = number;

/** How an end's voltage is made of the cluster's unknowns and of fixed nodes. */
export interface ClusterPort {
  end: EndIndex;
  admittance: number;
  /** unknown of the first and second node; −1 where it is fixed or absent */
  node: number;
  second: number;
  /** share of each in the port's voltage, and of the port's current into each */
  share: number;
  secondShare: number;
  sign: 1 | -1;
  /** fixed nodes' share in the port's voltage */
  held: { fixed: number; factor: number }[];
}

/**
 * Nodes that act on one another at once, joined by parts or by a pair: E z′ + G z = J, where z holds node voltages, then
 * coil currents. J comes from arriving waves (2 Y a at the port's nodes) and from the fixed nodes.
 */
export interface Cluster {
  size: number;
  /** circuit node of each node unknown */
  nodes: number[];
  ports: ClusterPort[];
  e: Float64Array;
  g: Float64Array;
  isStatic: boolean;
  /** fixed node → row: J = siemens · s + farads · s′ (rows of coils: siemens holds ±1) */
  feeds: { fixed: number; row: number; siemens: number; farads: number }[];
  /** parts with tables: rows of their two nodes, −1 where fixed */
  tables: { element: TableElement; a: number; b: number }[];
}

export function buildClusters(circuit: Circuit): Cluster[] {
  const group = groupNodes(circuit);
  const clusters: Cluster[] = [];
  const clusterOf = new Map<number, Cluster>();
  const place = new Int32Array(circuit.nodeCount);
  const branchesOf = new Map<Cluster, typeof circuit.branches>();
  const create = (): Cluster => {
    const cluster: Cluster = {
      size: 0,
      nodes: [],
      ports: [],
      e: new Float64Array(0),
      g: new Float64Array(0),
      isStatic: true,
      feeds: [],
      tables: [],
    };
    clusters.push(cluster);
    branchesOf.set(cluster, []);
    return cluster;
  };
  for (let node = 0; node < circuit.nodeCount; node++) {
    const root = group(node);
    let cluster = clusterOf.get(root);
    if (!cluster) clusterOf.set(root, (cluster = create()));
    place[node] = cluster.nodes.length;
    cluster.nodes.push(node);
  }
  const home = (ref: Ref) => (ref < 0 ? undefined : clusterOf.get(group(ref)));
  circuit.lines.forEach((line, i) => {
    for (const [port, end] of [
      [line.a, 2 * i],
      [line.b, 2 * i + 1],
    ] as const) {
      const cluster = home(port.node) ?? (port.second === null ? undefined : home(port.second)) ?? create();
      cluster.ports.push(clusterPort(port, end, 1 / line.impedance, place));
    }
  });
  for (const branch of circuit.branches) {
    const cluster = home(branch.a) ?? home(branch.b);
    if (cluster) branchesOf.get(cluster)?.push(branch);
  }
  for (const element of circuit.elements)
    home(element.a >= 0 ? element.a : element.b)?.tables.push({
      element,
      a: element.a < 0 ? -1 : place[element.a]!,
      b: element.b < 0 ? -1 : place[element.b]!,
    });
  for (const cluster of clusters) fill(cluster, branchesOf.get(cluster) ?? [], place);
  return clusters;
}

function clusterPort(port: Port, end: EndIndex, admittance: number, place: Int32Array): ClusterPort {
  const share = port.second === null ? 1 : 0.5;
  const held: ClusterPort["held"] = [];
  if (port.node < 0) held.push({ fixed: -1 - port.node, factor: share });
  if (port.second !== null && port.second < 0)
    held.push({ fixed: -1 - port.second, factor: share * port.sign });
  return {
    end,
    admittance,
    node: port.node < 0 ? -1 : place[port.node]!,
    second: port.second === null || port.second < 0 ? -1 : place[port.second]!,
    share,
    secondShare: share * port.sign,
    sign: port.sign,
    held,
  };
}

function fill(cluster: Cluster, branches: Circuit["branches"], place: Int32Array) {
  const coils = branches.filter((branch) => branch.kind === "L");
  const size = (cluster.size = cluster.nodes.length + coils.length);
  const e = (cluster.e = new Float64Array(size * size));
  const g = (cluster.g = new Float64Array(size * size));
  const add = (m: Float64Array, row: number, column: number, value: number) => {
    m[row * size + column] = m[row * size + column]! + value;
  };
  for (const { kind, a, b, value } of branches) {
    if (kind === "L") continue;
    const amount = kind === "R" ? 1 / value : value;
    if (kind === "C") cluster.isStatic = false;
    for (const [from, to] of [
      [a, b],
      [b, a],
    ] as const) {
      if (from < 0) continue;
      const row = place[from]!;
      add(kind === "R" ? g : e, row, row, amount);
      if (to >= 0) add(kind === "R" ? g : e, row, place[to]!, -amount);
      else if (to < -1)
        cluster.feeds.push({
          fixed: -1 - to,
          row,
          siemens: kind === "R" ? amount : 0,
          farads: kind === "C" ? amount : 0,
        });
    }
  }
  let row = cluster.nodes.length;
  for (const { a, b, value } of coils) {
    cluster.isStatic = false;
    add(e, row, row, value);
    for (const [ref, sign] of [
      [a, 1],
      [b, -1],
    ] as const) {
      if (ref >= 0) {
        add(g, place[ref]!, row, sign);
        add(g, row, place[ref]!, -sign);
      } else if (ref < -1) cluster.feeds.push({ fixed: -1 - ref, row, siemens: sign, farads: 0 });
    }
    row++;
  }
  for (const port of cluster.ports) {
    for (const [node, weight] of [
      [port.node, 1],
      [port.second, port.sign],
    ] as const) {
      if (node < 0) continue;
      const siemens = port.admittance * weight;
      if (port.node >= 0) add(g, node, port.node, siemens * port.share);
      if (port.second >= 0) add(g, node, port.second, siemens * port.secondShare);
      for (const { fixed, factor } of port.held)
        if (fixed > 0) cluster.feeds.push({ fixed, row: node, siemens: -siemens * factor, farads: 0 });
    }
  }
  // A node that nothing but open lines' far ends could define keeps a defined value: it is held at rest.
  for (let node = 0; node < cluster.nodes.length; node++) {
    let sum = 0;
    for (let j = 0; j < size; j++) sum += Math.abs(g[node * size + j]!) + Math.abs(e[node * size + j]!);
    if (sum === 0) g[node * size + node] = 1;
  }
}

/** Union of free nodes over parts and pairs; returns the finder of a node's group. */
function groupNodes(circuit: Circuit): (node: number) => number {
  const parent = new Int32Array(circuit.nodeCount).map((_, i) => i);
  const find = (node: number): number => {
    let top = node;
    while (parent[top] !== top) top = parent[top]!;
    return top;
  };
  const join = (a: Ref, b: Ref) => {
    if (a >= 0 && b >= 0) parent[find(a)] = find(b);
  };
  for (const branch of circuit.branches) join(branch.a, branch.b);
  for (const { a, b } of circuit.elements) join(a, b);
  for (const { a, b } of circuit.lines) {
    if (a.second !== null) join(a.node, a.second);
    if (b.second !== null) join(b.node, b.second);
  }
  return find;
}
