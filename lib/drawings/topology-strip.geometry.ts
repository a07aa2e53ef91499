import { circle, type Drawing, emptyDrawing, group, line, type Mark, text } from "./marks";
import { quantityText } from "./number-text";
import type { StrandEnd, Topology } from "./topology-graph";
import { layTopology, type PlacedEdge, type PlacedStrand, type TopologyLayout } from "./topology-layout";
import { bufferSymbol, isGround, partSymbol, railSymbol, viaSymbol } from "./topology-symbols";
import { rowLabels } from "./topology-labels";
import { describeTopology, edgeWords } from "./topology-words";
import { VERDICT_INK, verdictMark } from "./verdict-mark";

export interface TopologyStripOptions {
  width: number;
  title?: string;
  /** an edge, pin or termination to point out */
  highlight?: string | null;
}

const PITCH = 72;
const TOP = 40;

/** Driver at the left, sections as long as their delay, branches below, receivers with their verdicts. */
export function topologyStrip(
  topology: Topology,
  options: TopologyStripOptions,
): Drawing & { layout: TopologyLayout | null } {
  const title = options.title ?? "Topology";
  if (topology.edges.length === 0 && topology.pins.length === 0)
    return { ...emptyDrawing(title, "This path has no sections yet.", options.width, 96), layout: null };

  const layout = layTopology(topology, options.width);
  const width = Math.max(options.width, Math.ceil(layout.right) + 4);
  const y = (row: number): number => TOP + row * PITCH;
  const driver = topology.pins.find((p) => p.pin === topology.driver);
  const marks: Mark[] = [
    bufferSymbol(layout.left - 17, y(0), true),
    text(2, y(0) - 16, topology.driver, { weight: 600 }),
    text(2, y(0) + 24, driver?.detail ?? "driver", { ink: "ink-soft" }),
    ...layout.strands.flatMap((s) => upright(s, y)),
    ...layout.strands.flatMap((s) =>
      s.edges.map((e) => edgeMark(e, y(s.row), options.highlight === e.edge.id)),
    ),
    ...layout.strands.flatMap((s) => nodes(s, y)),
    ...layout.strands.flatMap((s) =>
      endMarks(s.strand.end, s.end, y(s.row), s.row > 0, options.highlight ?? null),
    ),
    ...rowLabels(layout, y),
  ];
  const foot = y(layout.rows - 1) + 56;
  marks.push(...notes(layout, foot));
  return { width, height: foot + 12, title, description: describeTopology(topology), marks, layout };
}

/** From the line above down to a branch, with the lead of what hangs. */
function upright(s: PlacedStrand, y: (row: number) => number): Mark[] {
  if (s.row === s.parentRow) return [];
  const style = { stroke: "ink", weight: 1.25 } as const;
  return [
    line(s.x0, y(s.parentRow), s.x0, y(s.row), style),
    ...(s.start > s.x0 ? [line(s.x0, y(s.row), s.start, y(s.row), style)] : []),
  ];
}

/** A section's line is the broader, the lower its impedance, as its trace is. */
function edgeMark({ edge, x1, x2 }: PlacedEdge, y: number, lit: boolean): Mark {
  const glow = lit ? [line(x1, y, x2, y, { stroke: "violet", weight: 18, opacity: 0.22 })] : [];
  const tip = edgeWords(edge);
  if (edge.kind === "part")
    return group([...glow, ...partSymbol(edge.part, x1, x2, y)], { hit: edge.id, tip });
  if (edge.kind === "via") return group([...glow, ...viaSymbol(x1, x2, y)], { hit: edge.id, tip });
  const known = edge.impedance !== null && edge.delay !== null;
  const weight = edge.impedance === null ? 3 : Math.min(Math.max(250 / edge.impedance, 2), 10);
  return group(
    [
      ...glow,
      line(x1, y, x2, y, { stroke: known ? "copper" : "ink-soft", weight, dash: known ? undefined : "4 4" }),
      // A wide, invisible line is easier to point at.
      line(x1, y, x2, y, { stroke: "sheet", weight: 20, opacity: 0 }),
    ],
    { hit: edge.id, tip },
  );
}

function nodes(s: PlacedStrand, y: (row: number) => number): Mark[] {
  const dot = (x: number, row: number): Mark => circle(x, y(row), 3, { fill: "ink" });
  const between = s.edges
    .slice(0, -1)
    .filter((e, i) => e.edge.kind === "line" && s.edges[i + 1]?.edge.kind === "line")
    .map((e) => circle(e.x2, y(s.row), 3.2, { fill: "sheet", stroke: "ink", weight: 1.25 }));
  return s.row === s.parentRow ? between : [dot(s.x0, s.parentRow), ...between];
}

function endMarks(end: StrandEnd, x: number, y: number, below: boolean, highlight: string | null): Mark[] {
  switch (end.kind) {
    case "pin": {
      const { pin } = end;
      const words = pin.verdict ?? pin.detail ?? "";
      const glow = highlight === pin.pin ? [circle(x + 8, y, 15, { fill: "violet", fillOpacity: 0.2 })] : [];
      // In the rows below, names stand under the symbol: branches are closer together there.
      const mark = pin.verdict ? verdictMark(pin.verdict, below ? x + 27 : x + 30, below ? y : y + 1) : [];
      const at = below ? x : x + 24 + (pin.verdict ? 17 : 0);
      const [name, word] = below ? [23, 36] : words ? [-3, 12] : [4, 0];
      return [
        group(
          [
            ...glow,
            bufferSymbol(x, y, pin.role === "driver"),
            ...mark,
            text(at, y + name, pin.pin, { weight: 600 }),
            ...(words
              ? [text(at, y + word, words, { ink: pin.verdict ? VERDICT_INK[pin.verdict] : "ink-soft" })]
              : []),
          ],
          { hit: pin.pin },
        ),
      ];
    }
    case "rail":
      return [
        line(x, y, x + 6, y, { weight: 1.25 }),
        ...railSymbol(x + 6, y, isGround(end.rail)),
        text(x + 20, y + 4, end.rail, { ink: "ink-soft" }),
      ];
    case "joins":
      return [text(x + 8, y + 4, `joins ${end.node}`, { ink: "ink-soft" })];
    case "open":
      return [
        circle(x, y, 3.2, { fill: "sheet", stroke: "ink", weight: 1.25 }),
        text(x + 8, y + 4, "open", { ink: "ink-soft" }),
      ];
  }
}

function notes(layout: TopologyLayout, y: number): Mark[] {
  const words: string[] = [];
  if (layout.stretched > 0)
    words.push(
      `${layout.stretched === 1 ? "1 short section is" : `${layout.stretched} short sections are`} drawn longer`,
    );
  if (layout.apart > 0)
    words.push(
      layout.apart === 1
        ? "1 section or pin is not reached from the driver"
        : `${layout.apart} sections or pins are not reached from the driver`,
    );
  const marks: Mark[] = [];
  if (layout.scale > 0) {
    const ps = [1000, 500, 200, 100, 50, 20, 10, 5].find((n) => n * 1e-12 * layout.scale <= 110) ?? 5;
    const end = layout.left + ps * 1e-12 * layout.scale;
    const style = { stroke: "ink-soft" } as const;
    marks.push(
      line(layout.left, y, end, y, style),
      line(layout.left, y - 4, layout.left, y + 4, style),
      line(end, y - 4, end, y + 4, style),
      text(
        end + 8,
        y + 4,
        `${quantityText(ps * 1e-12, "s")} of delay${words.length > 0 ? `; ${words.join("; ")}` : ""}`,
        { ink: "ink-soft" },
      ),
    );
  } else if (words.length > 0) marks.push(text(layout.left, y + 4, words.join("; "), { ink: "ink-soft" }));
  return marks;
}
