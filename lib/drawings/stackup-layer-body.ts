import { group, type Mark, type Point, polygon, rect } from "./marks";
import { px } from "./marks";
import type { PlacedLayer, SectionLayer } from "./stackup-layer";
import { isCopper } from "./stackup-words";

interface Board {
  left: number;
  right: number;
}

const MOST_TRACES = 4;

/** The body of one layer between the board's broken edges. */
export function layerBody(
  placed: readonly PlacedLayer[],
  index: number,
  board: Board,
  scale: number,
): Mark[] {
  const p = placed[index];
  if (!p) return [];
  const box = [board.left, p.y, board.right - board.left, p.height] as const;
  const hit = { hit: p.layer.id };
  switch (p.layer.kind) {
    case "core":
      return [
        rect(...box, { fill: "rule-line", fillOpacity: 0.75, ...hit }),
        rect(...box, { fill: "hatch-core", ...hit }),
      ];
    case "prepreg":
      return [rect(...box, { fill: "rule-line", fillOpacity: 0.4, ...hit })];
    case "plane":
    case "foil":
      return [rect(...box, { fill: "copper", ...hit })];
    case "mask":
      return maskBody(placed, index, board, scale);
    case "signal":
      return [
        rect(...box, { fill: besides(placed, index) ? "rule-line" : "sheet", fillOpacity: 0.4, ...hit }),
        ...tracesOf(placed, index, board, scale).map((trace) => polygon(trace, { fill: "copper", ...hit })),
      ];
  }
}

/** An outer signal layer has air (or mask) beside its traces; an inner one the resin of its prepreg. */
function besides(placed: readonly PlacedLayer[], index: number): boolean {
  return index > 0 && index < placed.length - 1 && !facesMask(placed, index);
}

function facesMask(placed: readonly PlacedLayer[], index: number): boolean {
  return placed[index - 1]?.layer.kind === "mask" || placed[index + 1]?.layer.kind === "mask";
}

/** The traces of a signal layer: trapezoids, foot on the laminate they were etched on, widths to scale. */
function tracesOf(placed: readonly PlacedLayer[], index: number, board: Board, scale: number): Point[][] {
  const p = placed[index];
  if (!p) return [];
  const wide = board.right - board.left;
  const foot = Math.min(footWidth(p.layer) * scale, wide * 0.5);
  const lean = Math.min(((p.layer.etch_m ?? (p.layer.thickness_m ?? 0) * 0.5) * scale) / 2, foot * 0.3);
  const [yFoot, yCrown] = footBelow(placed, index) ? [p.y + p.height, p.y] : [p.y, p.y + p.height];
  const count = Math.min(Math.max(Math.floor(wide / (2.6 * foot)), 1), MOST_TRACES);
  return Array.from({ length: count }, (_, i) => {
    // Layers are set off against each other, so that traces do not stand in columns.
    const x = board.left + ((i + 0.5 + (index % 4 < 2 ? -0.1 : 0.1)) * wide) / count;
    return [
      [x - foot / 2, yFoot],
      [x + foot / 2, yFoot],
      [x + foot / 2 - lean, yCrown],
      [x - foot / 2 + lean, yCrown],
    ] as Point[];
  });
}

function footWidth(layer: SectionLayer): number {
  return layer.traceWidth_m ?? 3 * (layer.thickness_m ?? 0);
}

/** The foot is the wide face: on the core it was etched on, else on the side of the board's middle. */
function footBelow(placed: readonly PlacedLayer[], index: number): boolean {
  const above = placed[index - 1]?.layer;
  const below = placed[index + 1]?.layer;
  if (!below || below.kind === "mask") return false;
  if (!above || above.kind === "mask") return true;
  if (below.kind === "core" && above.kind !== "core") return true;
  if (above.kind === "core" && below.kind !== "core") return false;
  return index < placed.length / 2;
}

/** Solder mask: follows the traces it covers, thinner beside them than the copper is high. */
function maskBody(placed: readonly PlacedLayer[], index: number, board: Board, scale: number): Mark[] {
  const p = placed[index];
  if (!p) return [];
  const onTop = placed[index + 1] !== undefined && isCopper(placed[index + 1]?.layer ?? p.layer);
  const copperIndex = onTop ? index + 1 : index - 1;
  const copper = placed[copperIndex];
  const style = { fill: "pass", fillOpacity: 0.28, hit: p.layer.id } as const;
  if (!copper || copper.layer.kind !== "signal")
    return [rect(board.left, p.y, board.right - board.left, p.height, style)];

  // Heights are counted from the laminate outward; sign turns them to the drawing's y.
  const sign = onTop ? -1 : 1;
  const laminate = onTop ? copper.y + copper.height : copper.y;
  const beside = Math.min((p.layer.thickness_m ?? 0) * scale, copper.height * 0.9) || copper.height * 0.5;
  const crest = copper.height + p.height;
  const points: Point[] = [
    [board.left, laminate],
    [board.left, laminate + sign * beside],
  ];
  for (const [footLeft, footRight, crownRight, crownLeft] of tracesOf(placed, copperIndex, board, scale)) {
    if (!footLeft || !footRight || !crownRight || !crownLeft) continue;
    const side = Math.max(p.height * 0.8, 1);
    points.push(
      [footLeft[0] - side, laminate + sign * beside],
      [crownLeft[0] - side, laminate + sign * crest],
    );
    points.push(
      [crownRight[0] + side, laminate + sign * crest],
      [footRight[0] + side, laminate + sign * beside],
    );
  }
  points.push([board.right, laminate + sign * beside], [board.right, laminate]);
  const top = Math.min(p.y, copper.y);
  const bottom = Math.max(p.y + p.height, copper.y + copper.height);
  return [
    group(
      [
        polygon(
          points.map(([x, y]) => [px(x), px(y)] as const),
          style,
        ),
      ],
      {
        clip: { x: board.left, y: top, width: board.right - board.left, height: bottom - top },
      },
    ),
  ];
}
