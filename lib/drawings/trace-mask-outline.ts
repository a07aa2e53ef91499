import type { TraceSectionShape } from "./trace-shape";

type Corner = readonly [x: number, y: number];

/**
 * Outline of the solder mask over one or two traces on the laminate: beside them at its height over laminate,
 * over them at its height over copper; the side face is the copper's own, shifted outward and prolonged
 * straight up. Humps that meet merge.
 *
 * @param shape the cross-section [m]
 * @param left  where the drawing ends [m]
 * @param right where the drawing ends [m]
 * @returns corners of a closed outline, anticlockwise from the lower left [m]
 */
export function maskOutline(shape: TraceSectionShape, left: number, right: number): Corner[] {
  const { mask, traces, coplanar } = shape;
  if (!mask) return [];
  const laminate = shape.layers.reduce((sum, l) => sum + l.thickness, 0);
  const beside = laminate + mask.overLaminate;

  // Every copper strip with its own feet and crowns; ground beside runs off the drawing.
  interface Strip {
    foot: [number, number];
    crown: [number, number];
    top: number;
  }
  const strips: Strip[] = traces.map((t) => ({
    foot: [t.x - t.widthBottom / 2, t.x + t.widthBottom / 2],
    crown: [t.x - t.widthTop / 2, t.x + t.widthTop / 2],
    top: t.y + t.thickness,
  }));
  const [first, last] = [strips[0], strips.at(-1)];
  if (coplanar && first && last) {
    const lean = first.crown[0] - first.foot[0];
    const [a, b] = [first.foot[0] - coplanar.gap, last.foot[1] + coplanar.gap];
    strips.unshift({ foot: [left - 1, a], crown: [left - 1, a - lean], top: first.top });
    strips.push({ foot: [b, right + 1], crown: [b + lean, right + 1], top: last.top });
  }

  const corners: Corner[] = [];
  for (const { foot, crown, top } of strips) {
    const crest = top + mask.overTrace;
    // Where the shifted side face leaves the mask beside it.
    const share = top > laminate ? mask.overLaminate / (top - laminate) : 1;
    const knee = (i: 0 | 1): number =>
      foot[i] + (crown[i] - foot[i]) * share + (i === 0 ? -mask.side : mask.side);
    const high = (i: 0 | 1): number => crown[i] + (i === 0 ? -mask.side : mask.side);
    const rise: Corner[] = [
      [knee(0), beside],
      [high(0), crest],
    ];
    const before = corners.at(-1);
    if (before && before[0] >= knee(0)) {
      // The humps meet: take away the fall of the last one and run on level.
      corners.pop();
      corners.pop();
      corners.push([corners.at(-1)?.[0] ?? high(0), crest]);
    } else corners.push(...rise);
    corners.push([high(1), crest], [knee(1), beside]);
  }
  const inside = (x: number): number => Math.min(Math.max(x, left), right);
  return [
    [left, laminate],
    [left, coplanar ? (strips[0]?.top ?? beside) + mask.overTrace : beside],
    ...corners
      .map(([x, y]): Corner => [inside(x), x < left ? Math.max(y, laminate) : y])
      .filter(([x]) => x > left && x < right),
    [right, coplanar ? (strips.at(-1)?.top ?? beside) + mask.overTrace : beside],
    [right, laminate],
  ];
}
