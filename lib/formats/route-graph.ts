import type { NetPinDoc, NetSectionDoc, RouteGap } from "@/lib/schemas/net";
import { pinsInOnePlace } from "@/lib/si/path/pins-in-one-place";
import { toSi } from "@/lib/si/units";

export interface PinName {
  reference: string;
  pin: string;
}

/** What the sections of one net form. */
export interface RouteGraph {
  pins: NetPinDoc[];
  viaCount: number;
  /** Connected groups of nodes, the one with most pins first; nodes in the order of the list. */
  islands: string[][];
  gaps: RouteGap[];
  /** One piece, no loop, at least two pins. */
  complete: boolean;
}

export type SectionEnds = Pick<NetSectionDoc, "from" | "to" | "layer"> &
  Partial<Pick<NetSectionDoc, "length">>;

const NAMED_LOOPS = 8;
const MAX_GAP_TEXT = 400;
const NAMED_NODES = 6;
const NAMED_ISLANDS = 4;

/**
 * A pin is REFERENCE.PIN ("U1.E10"): the reference begins with a letter and holds a digit, or is in the parts list.
 * A name such as "via3.2" or "12.5" is no pin.
 */
export function readPinName(node: string, references?: ReadonlySet<string>): PinName | null {
  const dot = node.lastIndexOf(".");
  if (dot <= 0 || dot === node.length - 1) return null;
  const reference = node.slice(0, dot);
  const pin = node.slice(dot + 1);
  if (reference.length > 40 || pin.length > 40) return null;
  if (references?.has(reference)) return { reference, pin };
  if (!/^\p{L}[\p{L}\p{N}_.:/[\]<>-]*$/u.test(reference) || !/\p{N}/u.test(reference)) return null;
  return /^via\d*$/i.test(reference) ? null : { reference, pin };
}

/** Joins the sections of one net into a graph and says what keeps it from being a complete route. */
export function buildRoute(sections: readonly SectionEnds[], references?: ReadonlySet<string>): RouteGraph {
  const nodes = new NodeSets();
  const layersOf = new Map<string, Set<string>>();
  const loops: [number, SectionEnds][] = [];
  sections.forEach((section, index) => {
    for (const node of [section.from, section.to]) {
      const layers = layersOf.get(node);
      if (layers) layers.add(section.layer.toLowerCase());
      else layersOf.set(node, new Set([section.layer.toLowerCase()]));
    }
    if (!nodes.join(section.from, section.to)) loops.push([index, section]);
  });

  const pins: NetPinDoc[] = [];
  const pinNodes = new Set<string>();
  let viaCount = 0;
  for (const [node, layers] of layersOf) {
    const name = readPinName(node, references);
    if (name) {
      pins.push({ node, ...name, role: null });
      pinNodes.add(node);
    } else if (layers.size > 1 || /^via/i.test(node)) viaCount++;
  }

  const islands = nodes.groups().sort((a, b) => countPins(b, pinNodes) - countPins(a, pinNodes));
  const gaps = findGaps(sections, islands, pinNodes, loops);
  return { pins, viaCount, islands, gaps, complete: gaps.length === 0 };
}

function findGaps(
  sections: readonly SectionEnds[],
  islands: readonly string[][],
  pins: ReadonlySet<string>,
  loops: readonly [number, SectionEnds][],
): RouteGap[] {
  if (sections.length === 0)
    return [{ kind: "no sections", text: "The list gives no routed section of this net." }];
  const gaps: RouteGap[] = [];
  if (islands.length > 1) gaps.push({ kind: "islands", text: islandText(islands, pins) });
  for (const [index, section] of loops.slice(0, NAMED_LOOPS))
    gaps.push({ kind: "loop", text: loopText(sections, index, section) });
  if (loops.length > NAMED_LOOPS)
    gaps.push({ kind: "loop", text: `${loops.length - NAMED_LOOPS} more loops` });
  const unrouted = pinsInOnePlace(sections.map(withLength), [...pins]);
  if (unrouted)
    gaps.push({
      kind: "no sections",
      text: short(
        `The list gives a length of 0 between ${joinAnd(unrouted)}, as for what is not routed. Route it or give its length.`,
      ),
    });
  if (pins.size === 0)
    gaps.push({
      kind: "no pins",
      text: short(`No node is a pin (REFERENCE.PIN): ${named(islands[0] ?? [])}.`),
    });
  else if (pins.size === 1 && islands.length === 1)
    gaps.push({
      kind: "one pin",
      text: short(
        `${[...pins][0]} is the only pin; the route leads no further than ${farEnds(sections, pins)}.`,
      ),
    });
  return gaps;
}

/** Where no length is told, none is doubted. */
function withLength({ from, to, length }: SectionEnds) {
  return { from, to, length: length ? toSi(length, "length") : Infinity };
}

function islandText(islands: readonly string[][], pins: ReadonlySet<string>): string {
  const [first = [], second = []] = islands;
  const a = first.find((node) => pins.has(node)) ?? first[0];
  const b = second.find((node) => pins.has(node)) ?? second[0];
  const shown = islands.slice(0, NAMED_ISLANDS).map(named);
  const rest = islands.length - shown.length;
  const list = rest > 0 ? `${shown.join(", ")} and ${rest} more` : joinAnd(shown);
  return short(`${a} and ${b} are not joined: islands ${list}`);
}

function loopText(sections: readonly SectionEnds[], index: number, section: SectionEnds): string {
  const way = shortestWay(sections.slice(0, index), section.to, section.from);
  const nodes =
    way.length > 2 * NAMED_NODES ? [...way.slice(0, NAMED_NODES), "…", ...way.slice(-NAMED_NODES)] : way;
  return short(
    way.length === 2
      ? `Two sections run side by side between ${section.from} and ${section.to}: a loop`
      : `A loop: ${[section.from, ...nodes].join(" – ")}`,
  );
}

/** Nodes from `start` to `end` over sections that join them. */
function shortestWay(sections: readonly SectionEnds[], start: string, end: string): string[] {
  const next = new Map<string, string[]>();
  const link = (a: string, b: string) => {
    const known = next.get(a);
    if (known) known.push(b);
    else next.set(a, [b]);
  };
  for (const { from, to } of sections) {
    link(from, to);
    link(to, from);
  }
  const cameFrom = new Map<string, string | null>([[start, null]]);
  const queue = [start];
  for (const node of queue) {
    if (node === end) break;
    for (const other of next.get(node) ?? [])
      if (!cameFrom.has(other)) {
        cameFrom.set(other, node);
        queue.push(other);
      }
  }
  const way: string[] = [];
  for (let node: string | null | undefined = end; node; node = cameFrom.get(node)) way.push(node);
  return way.reverse();
}

function farEnds(sections: readonly SectionEnds[], pins: ReadonlySet<string>): string {
  const degree = new Map<string, number>();
  for (const { from, to } of sections)
    for (const node of [from, to]) degree.set(node, (degree.get(node) ?? 0) + 1);
  const ends = [...degree].filter(([node, count]) => count === 1 && !pins.has(node)).map(([node]) => node);
  return ends.length > 0 ? joinAnd(ends.slice(0, NAMED_NODES)) : "its own sections";
}

function countPins(nodes: readonly string[], pins: ReadonlySet<string>): number {
  return nodes.filter((node) => pins.has(node)).length;
}

function named(nodes: readonly string[]): string {
  const shown = nodes.slice(0, NAMED_NODES);
  const rest = nodes.length - shown.length;
  return `{${shown.join(", ")}${rest > 0 ? `, ${rest} more` : ""}}`;
}

function joinAnd(items: readonly string[]): string {
  return items.length < 2 ? items.join("") : `${items.slice(0, -1).join(", ")} and ${items.at(-1)}`;
}

function short(text: string): string {
  return text.length > MAX_GAP_TEXT ? `${text.slice(0, MAX_GAP_TEXT - 1)}…` : text;
}

/** Union–find over node names. */
class NodeSets {
  private readonly parent = new Map<string, string>();

  /** False where both were joined already: the new edge closes a loop. */
  join(a: string, b: string): boolean {
    const rootA = this.root(a);
    const rootB = this.root(b);
    if (rootA === rootB) return false;
    this.parent.set(rootB, rootA);
    return true;
  }

  groups(): string[][] {
    const groups = new Map<string, string[]>();
    for (const node of this.parent.keys()) {
      const root = this.root(node);
      const group = groups.get(root);
      if (group) group.push(node);
      else groups.set(root, [node]);
    }
    return [...groups.values()];
  }

  private root(node: string): string {
    let root = node;
    for (let up = this.parent.get(root); up !== undefined && up !== root; up = this.parent.get(root))
      root = up;
    for (let at = node; at !== root;) {
      const up = this.parent.get(at) ?? root;
      this.parent.set(at, root);
      at = up;
    }
    this.parent.set(root, root);
    return root;
  }
}
