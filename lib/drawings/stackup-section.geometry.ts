import { layerHeights } from "./layer-scale";
import { type Drawing, emptyDrawing, line, type Mark, rect, text } from "./marks";
import { lengthText, type LengthUnit } from "./number-text";
import { scaleBar } from "./scale-bar";
import { spreadLabels } from "./spread-labels";
import { layerBody } from "./stackup-layer-body";
import { dimensionColumn } from "./stackup-dimensions";
import { describeStackup, isCopper, totalThickness } from "./stackup-words";

/** One layer as it is drawn, top to bottom. */
export interface SectionLayer {
  id: string;
  kind: "mask" | "foil" | "signal" | "plane" | "core" | "prepreg";
  name: string;
  material?: string;
  /** finished [m]; mask: over the laminate; null when it is not known yet */
  thickness_m: number | null;
  /** mask: over a trace [m] */
  maskOverTrace_m?: number | null;
  dk?: number | null;
  df?: number | null;
  /** foot minus crown, both sides together [m] */
  etch_m?: number | null;
  /** foot width of the traces drawn on a signal layer [m]; left out: three times the layer's thickness */
  traceWidth_m?: number | null;
  planeNet?: string;
}

export interface StackupSectionOptions {
  /** [px] */
  width: number;
  /** height the board should have [px]; grows when the names need more */
  boardHeight?: number;
  unit: LengthUnit;
  /** least drawn height of a layer [px]; 0: true scale */
  leastHeight?: number;
  highlight?: string | null;
  title?: string;
}

/** A layer with its place on the drawing. */
export interface PlacedLayer {
  layer: SectionLayer;
  y: number;
  height: number;
  exaggerated: boolean;
}

const ROW = 18;
const HEAD = 26;
const NAMES = 176;
const NUMBERS = 216;

/** Cross-section of the whole board: names at the left, the body to scale, dimensions at the right. */
export function stackupSection(
  layers: readonly SectionLayer[],
  options: StackupSectionOptions,
): Drawing & { placed: PlacedLayer[]; scale: number } {
  const { width, unit, leastHeight = 3 } = options;
  const title = options.title ?? "Stackup cross-section";
  const known = layers.filter((l) => l.thickness_m !== null && l.thickness_m > 0);
  if (known.length === 0)
    return { ...emptyDrawing(title, "No layer has a thickness yet.", width, 160), placed: [], scale: 0 };

  const boardHeight = Math.max(options.boardHeight ?? 340, layers.length * ROW - 12);
  const { heights, scale, exaggerated } = layerHeights(layers.map(drawnThickness), boardHeight, leastHeight);
  let y = HEAD + 10;
  const placed = layers.map((layer, i): PlacedLayer => {
    const height = heights[i] ?? 0;
    const place = { layer, y, height, exaggerated: exaggerated[i] ?? false };
    y += height;
    return place;
  });
  const top = HEAD + 10;
  const bottom = y;
  const board = { left: NAMES, right: Math.max(width - NUMBERS, NAMES + 80), top, bottom };
  const rows = spreadLabels(
    placed.map((p) => p.y + p.height / 2),
    ROW,
    top - 6,
    Math.max(bottom + 6, top + layers.length * ROW),
  );

  const marks: Mark[] = [...headings(board, width)];
  const lit = placed.findIndex((p) => p.layer.id === options.highlight);
  if (lit >= 0) marks.push(...highlightBand(placed[lit], rows[lit] ?? 0, board, width));
  placed.forEach((p, i) => marks.push(...layerBody(placed, i, board, scale)));
  marks.push(
    rect(board.left, top, board.right - board.left, bottom - top, { stroke: "ink-soft", weight: 0.75 }),
  );
  if (lit >= 0 && placed[lit]) marks.push(outline(placed[lit], board));
  placed.forEach((p, i) => marks.push(...nameRow(p, rows[i] ?? 0, board.left, i === lit)));
  marks.push(...dimensionColumn(placed, rows, board.right, unit));

  const foot = Math.max(bottom, ...rows.map((r) => r + ROW / 2)) + 16;
  marks.push(...footNotes(layers, exaggerated, board, foot, scale, unit));
  return {
    width: Math.max(width, board.right + NUMBERS),
    height: foot + 30,
    title,
    description: describeStackup(layers, exaggerated, unit),
    marks,
    placed,
    scale,
  };
}

/** An unknown thickness is drawn at the least height. A mask stands above the copper by its own height over it. */
function drawnThickness(layer: SectionLayer): number {
  return (layer.kind === "mask" ? (layer.maskOverTrace_m ?? layer.thickness_m) : layer.thickness_m) ?? 0;
}

interface Board {
  left: number;
  right: number;
  top: number;
  bottom: number;
}

function headings(board: Board, width: number): Mark[] {
  const style = { ink: "ink-soft" } as const;
  const y = HEAD - 10;
  return [
    text(0, y, "Layer", style),
    text(board.right + 122, y, "Thickness", { ...style, anchor: "end" }),
    text(board.right + 178, y, "Dk", { ...style, anchor: "end" }),
    line(0, HEAD - 3, Math.max(width, board.right + NUMBERS), HEAD - 3, { stroke: "rule-line" }),
  ];
}

function highlightBand(p: PlacedLayer | undefined, row: number, board: Board, width: number): Mark[] {
  if (!p) return [];
  const style = { fill: "copper", fillOpacity: 0.1 } as const;
  return [
    rect(0, row - ROW / 2, board.left - 22, ROW, { ...style, radius: 3 }),
    rect(board.right + 62, row - ROW / 2, width - board.right - 62, ROW, { ...style, radius: 3 }),
  ];
}

function outline(p: PlacedLayer, board: Board): Mark {
  const inset = Math.max(2 - p.height / 2, 0);
  return rect(board.left - 2, p.y - inset - 1, board.right - board.left + 4, p.height + 2 * inset + 2, {
    stroke: "ink",
    weight: 1.75,
    radius: 1,
  });
}

function nameRow(p: PlacedLayer, row: number, left: number, lit: boolean): Mark[] {
  const { layer } = p;
  const detail =
    layer.kind === "plane" && layer.planeNet
      ? `plane ${layer.planeNet}`
      : layer.kind === "foil"
        ? "foil"
        : layer.kind;
  const middle = p.y + p.height / 2;
  const soft = { stroke: "ink-soft", weight: 0.6, opacity: 0.7 } as const;
  return [
    text(4, row + 4, shortened(layer.name, 13), { weight: lit ? 650 : isCopper(layer) ? 550 : 400 }),
    text(left - 26, row + 4, shortened(detail, 12), { ink: "ink-soft", anchor: "end" }),
    line(left - 22, row, left - 14, row, soft),
    line(left - 14, row, left - 4, middle, soft),
  ];
}

function footNotes(
  layers: readonly SectionLayer[],
  exaggerated: readonly boolean[],
  board: Board,
  y: number,
  scale: number,
  unit: LengthUnit,
): Mark[] {
  const total = totalThickness(layers);
  const marks: Mark[] = [...scaleBar(board.left, y + 4, scale, 90, unit)];
  const thin = exaggerated.filter(Boolean).length;
  if (thin > 0)
    marks.push(
      text(4, y + 8, thin === 1 ? "\u2248 1 layer drawn thicker" : `\u2248 ${thin} layers drawn thicker`, {
        ink: "ink-soft",
      }),
    );
  const words = total.complete ? lengthText(total.overCopper, unit) : "not complete";
  marks.push(
    line(board.right + 50, y - 6, board.right + NUMBERS, y - 6, { stroke: "ink-soft", weight: 0.75 }),
    text(board.right + 150, y + 10, words, { anchor: "end", weight: 650 }),
    text(board.right + 50, y + 10, "Total", { weight: 650 }),
    text(board.right + 158, y + 10, "over copper", { ink: "ink-soft", size: 11 }),
  );
  return marks;
}

function shortened(words: string, letters: number): string {
  return words.length <= letters ? words : `${words.slice(0, letters - 1)}\u2026`;
}
