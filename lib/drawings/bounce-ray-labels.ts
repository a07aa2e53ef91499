import type { PlotBox } from "./axis";
import type { RayLine } from "./bounce-diagram.geometry";
import { type Mark, text } from "./marks";
import { voltsText } from "./number-text";
import { textWidth } from "./text-width";

const SIZE = 12;
/** Where along a ray its label may sit, best first. */
const PLACES = [0.5, 0.35, 0.65, 0.25, 0.75];

interface Spot {
  x: number;
  y: number;
  half: number;
}

/** Remembers where labels are; each is covered by circles along its slanted baseline. */
export class RayRoom {
  private readonly spots: Spot[] = [];

  take(candidates: readonly Spot[]): boolean {
    const clash = candidates.some((c) =>
      this.spots.some((s) => (c.x - s.x) ** 2 + (c.y - s.y) ** 2 < (c.half + s.half) ** 2),
    );
    if (!clash) this.spots.push(...candidates);
    return !clash;
  }
}

/** The amplitude along a ray, slanted with it, when there is room. The emphasized ray always has its label. */
export function rayLabel(l: RayLine, emphasized: boolean, room: RayRoom, box: PlotBox): Mark[] {
  const [dx, dy] = [l.x2 - l.x1, l.y2 - l.y1];
  const length = Math.sqrt(dx * dx + dy * dy);
  const words = voltsText(l.ray.amplitude, true);
  const width = textWidth(words, SIZE, emphasized);
  if (!emphasized && (length < width + 24 || l.strength < 0.04)) return [];
  // Level enough to be read from left to right, whichever way the wave goes.
  const slope = Math.atan2(dy, dx);
  const angle = Math.abs(slope) > Math.PI / 2 ? slope - Math.sign(slope) * Math.PI : slope;
  const lift = emphasized ? 9 : 5;
  for (const share of PLACES) {
    const [x, y] = [l.x1 + dx * share + Math.sin(angle) * lift, l.y1 + dy * share - Math.cos(angle) * lift];
    if (y < box.top + SIZE || y > box.bottom - 4) continue;
    const spots = [-0.5, -0.25, 0, 0.25, 0.5].map((k) => ({
      x: x + Math.cos(angle) * width * k,
      y: y + Math.sin(angle) * width * k - 4,
      half: Math.max(SIZE * 0.72, width / 8),
    }));
    if (spots.some((s) => s.x < box.left || s.x > box.right || s.y > box.bottom)) continue;
    if (!room.take(spots) && !emphasized) continue;
    return [
      text(x, y, [{ text: words }], {
        anchor: "middle",
        rotate: (angle * 180) / Math.PI,
        ink: emphasized ? "fail" : l.ray.outward ? "copper" : "violet",
        weight: emphasized ? 700 : 450,
        halo: true,
        opacity: emphasized ? undefined : Math.max(0.75, l.strength),
      }),
    ];
  }
  return [];
}
