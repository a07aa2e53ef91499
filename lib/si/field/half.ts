import { PLAIN, type Outline, type Segment } from "./segment";

/** The half x ≥ 0 of an outline that is its own mirror image, cut at the mirror line. */
export function rightHalf({ segments, cuts, upper }: Outline): Outline {
  const kept: Segment[] = [];
  for (const s of segments) {
    const tiny = 1e-9 * s.y1;
    if (s.x1 <= tiny && s.x2 <= tiny) continue;
    if (s.x1 >= -tiny && s.x2 >= -tiny) {
      kept.push(s.x1 < 0 ? { ...s, x1: 0 } : s.x2 < 0 ? { ...s, x2: 0 } : s);
      continue;
    }
    const y = s.y1 + ((s.y2 - s.y1) * -s.x1) / (s.x2 - s.x1);
    if (s.x1 < 0) kept.push({ ...s, x1: 0, y1: y, end1: PLAIN, outward: s.outward > 0 ? 1 : 0 });
    else kept.push({ ...s, x2: 0, y2: y, end2: PLAIN, outward: s.outward < 0 || s.outward === 2 ? -1 : 0 });
  }
  return {
    segments: kept,
    cuts: cuts.filter((cut) => cut.x2 > 0).map((cut) => ({ ...cut, x1: Math.max(0, cut.x1) })),
    upper,
  };
}
