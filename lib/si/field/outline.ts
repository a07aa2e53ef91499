import { stackHeight, type CrossSection } from "../cross-section";
import { SNAP, coppersOf, sideAt, type Copper, type Level } from "./coppers";
import { maskOutline, type Hump } from "./mask-outline";
import { CORNER, EDGE, INTERFACE, PLAIN, WEAK, type Cut, type Outline, type Segment } from "./segment";

/**
 * The surfaces of a valid cross-section on which charge sits: copper faces, split where interfaces meet them, and
 * every interface between unlike dielectrics outside the copper. Lengths as in the section.
 */
export function outlineOf(section: CrossSection): Outline {
  const height = stackHeight(section);
  const above = section.mask ? section.mask.er : 1;
  const levels = levelsOf(section, above);
  const coppers = coppersOf(section, levels, height);
  // between planes fields fade as exp(−κx), κ down to 0.4π/b where a high permittivity lies between low ones; in the open
  // the charge on an interface falls as x⁻², its effect as x⁻³
  const reach = section.upperPlane ? 6 * height : 60 * (height + extraHeight(coppers, height));
  const outermost = Math.max(...coppers.filter((c) => c.owner >= 0).flatMap((c) => c.right));
  const innermost = Math.min(...coppers.filter((c) => c.owner >= 0).flatMap((c) => c.left));
  const slot = section.coplanar?.gap ?? 0;
  const far = { left: innermost - slot - reach, right: outermost + slot + reach };
  const segments: Segment[] = [];
  const cuts: Cut[] = [];
  const erAt = (y: number) => permittivityAt(section, y, above);
  for (const copper of coppers) addCopper(segments, cuts, copper, levels, erAt, far);
  for (const level of levels) addInterface(segments, level, coppers, far);
  if (section.mask && section.mask.er > 1 + SNAP) {
    const humps = coppers.map((c) => humpOf(c, far));
    segments.push(...maskOutline(section.mask, height, humps, far));
  }
  return { segments, cuts, upper: section.upperPlane ? height : 0 };
}

function extraHeight(coppers: Copper[], height: number): number {
  return Math.max(0, ...coppers.map((c) => c.top - height));
}

function levelsOf(section: CrossSection, above: number): Level[] {
  const levels: Level[] = [];
  let y = 0;
  section.layers.forEach((layer, index) => {
    y += layer.thickness;
    const next = section.layers[index + 1]?.er ?? (section.upperPlane ? layer.er : above);
    if (Math.abs(next - layer.er) > SNAP * layer.er) levels.push({ y, below: layer.er, above: next });
  });
  return levels;
}

function permittivityAt(section: CrossSection, y: number, above: number): number {
  let top = 0;
  for (const layer of section.layers) {
    top += layer.thickness;
    if (y < top) return layer.er;
  }
  return section.upperPlane ? (section.layers.at(-1)?.er ?? 1) : above;
}

function addCopper(
  segments: Segment[],
  cuts: Cut[],
  copper: Copper,
  levels: Level[],
  erAt: (y: number) => number,
  far: { left: number; right: number },
): void {
  const { owner, y, top } = copper;
  const touched = levels.filter((level) => level.y >= y && level.y <= top);
  const mean = (at: number, plain: number) => {
    const level = levels.find((l) => l.y === at);
    return level ? (level.below + level.above) / 2 : plain;
  };
  if (owner >= 0) {
    for (const level of touched) {
      const x1 = sideAt(copper, copper.left, level.y);
      const x2 = sideAt(copper, copper.right, level.y);
      cuts.push({ owner, x1, x2, y: level.y, step: level.below - level.above });
    }
  }
  const push = (x1: number, y1: number, x2: number, y2: number, end1: number, end2: number, er: number) => {
    const a = Math.max(x1, far.left);
    const b = Math.min(x2, far.right);
    const outward = x1 < far.left ? -1 : x2 > far.right ? 1 : 0;
    segments.push({
      x1: a,
      y1,
      x2: b,
      y2,
      end1: outward === -1 ? PLAIN : end1,
      end2: outward === 1 ? PLAIN : end2,
      owner,
      right: er,
      left: er,
      outward,
    });
  };
  if (top === y) {
    push(copper.left[0], y, copper.right[0], y, EDGE, EDGE, mean(y, erAt(y)));
    return;
  }
  push(copper.left[0], y, copper.right[0], y, CORNER, CORNER, mean(y, erAt(y - 0.5 * SNAP * top)));
  push(copper.left[1], top, copper.right[1], top, CORNER, CORNER, mean(top, erAt(top + 0.5 * SNAP * top)));
  const heights = [y, ...touched.map((l) => l.y).filter((at) => at > y && at < top), top];
  for (const side of [copper.left, copper.right]) {
    if (!Number.isFinite(side[0])) continue;
    for (let k = 0; k + 1 < heights.length; k++) {
      const y1 = heights[k] as number;
      const y2 = heights[k + 1] as number;
      segments.push({
        x1: sideAt(copper, side, y1),
        y1,
        x2: sideAt(copper, side, y2),
        y2,
        end1: y1 === y ? CORNER : WEAK,
        end2: y2 === top ? CORNER : WEAK,
        owner,
        right: erAt((y1 + y2) / 2),
        left: erAt((y1 + y2) / 2),
        outward: 0,
      });
    }
  }
}

function addInterface(
  segments: Segment[],
  level: Level,
  coppers: Copper[],
  far: { left: number; right: number },
): void {
  const blocks = coppers
    .filter((c) => level.y >= c.y && level.y <= c.top)
    .map((c) => ({
      from: sideAt(c, c.left, level.y),
      to: sideAt(c, c.right, level.y),
      end: c.top === c.y ? EDGE : level.y === c.y || level.y === c.top ? CORNER : WEAK,
    }))
    .sort((a, b) => a.from - b.from);
  let from = far.left;
  let end = PLAIN;
  const push = (to: number, end2: number) => {
    const outward = from === far.left ? (to === far.right ? 2 : -1) : to === far.right ? 1 : 0;
    if (to > from) {
      const span = { x1: from, y1: level.y, x2: to, y2: level.y };
      segments.push({
        ...span,
        end1: end,
        end2,
        owner: INTERFACE,
        right: level.below,
        left: level.above,
        outward,
      });
    }
  };
  for (const block of blocks) {
    if (block.from > far.left) push(block.from, block.end);
    from = block.to;
    end = block.end;
  }
  if (from < far.right) push(far.right, PLAIN);
}

function humpOf(copper: Copper, far: { left: number; right: number }): Hump {
  const slope = (side: [number, number]) =>
    Number.isFinite(side[0]) && copper.top > copper.y ? (side[1] - side[0]) / (copper.top - copper.y) : 0;
  return {
    y: copper.y,
    top: copper.top,
    left: Math.max(copper.left[0], far.left),
    right: Math.min(copper.right[0], far.right),
    leftOpen: copper.left[0] < far.left,
    rightOpen: copper.right[0] > far.right,
    leftSlope: slope(copper.left),
    rightSlope: slope(copper.right),
  };
}
