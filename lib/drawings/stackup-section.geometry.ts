import { layerHeights } from "./layer-scale";
import { type Drawing, emptyDrawing, line, type Mark, rect, text } from "./marks";
import { decimalText } from "./decimal-text";
import { lengthNumber, type LengthUnit } from "./number-text";
import { scaleBar } from "./scale-bar";
import { spreadLabels } from "./spread-labels";
import type { PlacedLayer, SectionLayer } from "./stackup-layer";
import { layerBody } from "./stackup-layer-body";
import { DECIMAL, dimensionColumn } from "./stackup-dimensions";
import { describeStackup, isCopper, totalThickness } from "./stackup-words";

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
  const whole = Math.max(width, board.right + NUMBERS);
  const rows = spreadLabels(
    placed.map((p) => p.y + p.height / 2),
    ROW,
    top - 6,
    Math.max(bottom + 6, top + layers.length * ROW),
  );

  const marks: Mark[] = [...headings(board, whole)];
  const lit = placed.findIndex((p) => p.layer.id === options.highlight);
  if (lit >= 0) marks.push(...highlightBand(placed[lit], rows[lit] ?? 0, board, whole));
  // Masks first: they run beneath the copper they cover.
  const masksFirst = [...placed.keys()].sort(
    (a, b) => Number(placed[b]?.layer.kind === "mask") - Number(placed[a]?.layer.kind === "mask"),
  );
  for (const i of masksFirst) marks.push(...layerBody(placed, i, board, scale));
  marks.push(
    rect(board.left, top, board.right - board.left, bottom - top, { stroke: "ink-soft", weight: 0.75 }),
  );
  if (lit >= 0 && placed[lit]) marks.push(outline(placed[lit], board));
  placed.forEach((p, i) => marks.push(...nameRow(p, rows[i] ?? 0, board.left, i === lit)));
  marks.push(...dimensionColumn(placed, rows, board.right, unit));

  const foot = Math.max(bottom, ...rows.map((r) => r + ROW / 2)) + 16;
  marks.push(...footNotes(layers, exaggerated, board, foot, whole, scale, unit));
  return {
    width: whole,
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
    text(board.right + 66, y, "Thickness", style),
    text(board.right + 186, y, "Dk", { ...style, anchor: "end" }),
    line(0, HEAD - 3, width, HEAD - 3, { stroke: "rule-line" }),
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

/** The sum under its column, the scale bar and what is not to scale under the body. */
function footNotes(
  layers: readonly SectionLayer[],
  exaggerated: readonly boolean[],
  board: Board,
  y: number,
  width: number,
  scale: number,
  unit: LengthUnit,
): Mark[] {
  const total = totalThickness(layers);
  const thin = exaggerated.filter((is, i) => is && layers[i]?.thickness_m !== null).length;
  const soft = { ink: "ink-soft" } as const;
  const narrow = board.right - board.left < 330;
  return [
    ...scaleBar(board.left, y + 4, scale, 90, unit),
    ...(thin > 0
      ? [
          text(
            board.right,
            y + (narrow ? 26 : 8),
            `\u2248 ${thin === 1 ? "1 layer" : `${thin} layers`} drawn thicker`,
            {
              ...soft,
              anchor: "end",
            },
          ),
        ]
      : []),
    line(4, y - 8, board.left - 22, y - 8, { stroke: "ink-soft", weight: 0.75 }),
    line(board.right + 62, y - 8, width, y - 8, { stroke: "ink-soft", weight: 0.75 }),
    text(4, y + 8, "Total", { weight: 650 }),
    text(board.left - 26, y + 8, "over copper", { ...soft, anchor: "end" }),
    ...(total.complete
      ? decimalText(board.right + DECIMAL, y + 8, lengthNumber(total.overCopper, unit), unit, { weight: 650 })
      : [text(board.right + DECIMAL - 12, y + 8, "not complete", soft)]),
  ];
}

function shortened(words: string, letters: number): string {
  return words.length <= letters ? words : `${words.slice(0, letters - 1)}\u2026`;
}
