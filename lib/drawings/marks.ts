import type { Hatch, Ink } from "./palette";

/**
 * A drawing is a list of marks: plain data, made by the geometry, drawn by React on a page and by
 * `svg-string` in a report. Both draw the same thing, because there is only one description of it.
 */
export interface Drawing {
  /** [px] */
  width: number;
  /** [px] */
  height: number;
  /** what it is, in a few words */
  title: string;
  /** the facts it shows, in sentences: the text alternative */
  description: string;
  marks: Mark[];
  /** said in place of the drawing when there is nothing to draw */
  empty?: string;
}

interface Stroke {
  stroke?: Ink;
  weight?: number;
  dash?: string;
  opacity?: number;
  /** what the pointer finds here */
  hit?: string;
  /** words shown when the pointer rests here */
  tip?: string;
}

interface Fill extends Stroke {
  fill?: Ink | Hatch;
  fillOpacity?: number;
}

export interface LineMark extends Stroke {
  kind: "line";
  x1: number;
  y1: number;
  x2: number;
  y2: number;
}

export interface PathMark extends Fill {
  kind: "path";
  d: string;
}

export interface RectMark extends Fill {
  kind: "rect";
  x: number;
  y: number;
  width: number;
  height: number;
  radius?: number;
}

export interface CircleMark extends Fill {
  kind: "circle";
  cx: number;
  cy: number;
  r: number;
}

export interface TextSpan {
  text: string;
  ink?: Ink;
  weight?: number;
}

export interface TextMark {
  kind: "text";
  x: number;
  /** of the baseline */
  y: number;
  spans: TextSpan[];
  size: number;
  ink: Ink;
  anchor: "start" | "middle" | "end";
  weight?: number;
  mono?: boolean;
  /** degrees, clockwise, about x, y */
  rotate?: number;
  /** paper behind the letters, so that a line beneath does not cross them */
  halo?: boolean;
  opacity?: number;
  tip?: string;
}

export interface GroupMark {
  kind: "group";
  marks: Mark[];
  /** clip to this box */
  clip?: { x: number; y: number; width: number; height: number };
  opacity?: number;
  hit?: string;
  tip?: string;
}

export type Mark = LineMark | PathMark | RectMark | CircleMark | TextMark | GroupMark;

export function line(x1: number, y1: number, x2: number, y2: number, style: Stroke = {}): LineMark {
  return { kind: "line", x1, y1, x2, y2, stroke: "ink", weight: 1, ...style };
}

export function path(d: string, style: Fill): PathMark {
  return { kind: "path", d, ...style };
}

export function polygon(points: readonly Point[], style: Fill): PathMark {
  return path(`${pathThrough(points)}Z`, style);
}

export function polyline(points: readonly Point[], style: Stroke): PathMark {
  return path(pathThrough(points), style);
}

export function rect(
  x: number,
  y: number,
  width: number,
  height: number,
  style: Fill & { radius?: number },
): RectMark {
  return { kind: "rect", x, y, width: Math.max(width, 0), height: Math.max(height, 0), ...style };
}

export function circle(cx: number, cy: number, r: number, style: Fill): CircleMark {
  return { kind: "circle", cx, cy, r, ...style };
}

type TextStyle = Partial<Omit<TextMark, "kind" | "x" | "y" | "spans">>;

export function text(x: number, y: number, words: string | TextSpan[], style: TextStyle = {}): TextMark {
  const spans = typeof words === "string" ? withSoftUnits(words, style.ink) : words;
  return { kind: "text", x, y, spans, size: 12, ink: "ink", anchor: "start", ...style };
}

/** Units, known by the thin space before them, are set softer than their numbers. */
function withSoftUnits(words: string, ink: Ink = "ink"): TextSpan[] {
  if (ink !== "ink" || !words.includes("\u2009")) return [{ text: words }];
  return words
    .split(/(\u2009[^\s,;()]+)/)
    .filter((part) => part !== "")
    .map((part) => (part.startsWith("\u2009") ? { text: part, ink: "ink-soft" } : { text: part }));
}

export function group(marks: Mark[], rest: Omit<GroupMark, "kind" | "marks"> = {}): GroupMark {
  return { kind: "group", marks, ...rest };
}

export type Point = readonly [x: number, y: number];

/** A hundredth of a pixel is enough, and keeps files small and the same everywhere. */
export function px(value: number): number {
  return Math.round(value * 100) / 100;
}

export function pathThrough(points: readonly Point[]): string {
  return points.map(([x, y], i) => `${i === 0 ? "M" : "L"}${px(x)} ${px(y)}`).join("");
}

/** A drawing that says why there is nothing to see. */
export function emptyDrawing(title: string, reason: string, width: number, height: number): Drawing {
  return {
    width,
    height,
    title,
    description: reason,
    empty: reason,
    marks: [text(width / 2, height / 2, reason, { ink: "ink-soft", anchor: "middle", size: 13 })],
  };
}
