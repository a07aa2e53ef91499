import { INTERFACE, PLAIN, type Outline, type Segment } from "./segment";

/** Corners of an outline and the room each has: distance to the nearest other corner, copper face, mirror image or plane. */
export class Vertices {
  count = 0;
  x = new Float64Array(64);
  y = new Float64Array(64);
  room = new Float64Array(64);

  load(outline: Outline, half: boolean): this {
    const { segments, upper } = outline;
    this.count = 0;
    for (const s of segments) {
      if (s.end1 !== PLAIN) this.add(s.x1, s.y1);
      if (s.end2 !== PLAIN) this.add(s.x2, s.y2);
    }
    for (let i = 0; i < this.count; i++) {
      const x = this.x[i]!;
      const y = this.y[i]!;
      let room = 2 * y;
      if (upper > 0) room = Math.min(room, 2 * (upper - y));
      // a corner on the mirror line is its own image
      if (half && x > 1e-9 * y) room = Math.min(room, 2 * x);
      for (let j = 0; j < this.count; j++) {
        const d = Math.sqrt((this.x[j]! - x) * (this.x[j]! - x) + (this.y[j]! - y) * (this.y[j]! - y));
        if (j !== i && d < room) room = d;
      }
      for (const s of segments) {
        if (s.owner === INTERFACE) continue;
        const d = distanceTo(s, x, y);
        if (d > 0 && d < room) room = d;
      }
      this.room[i] = room;
    }
    return this;
  }

  /** Index of the vertex at a point, −1 for none. */
  at(x: number, y: number): number {
    for (let i = 0; i < this.count; i++) if (this.x[i] === x && this.y[i] === y) return i;
    return -1;
  }

  private add(x: number, y: number): void {
    if (this.at(x, y) >= 0) return;
    if (this.count === this.x.length) {
      for (const name of ["x", "y", "room"] as const) {
        const wider = new Float64Array(2 * this.count);
        wider.set(this[name]);
        this[name] = wider;
      }
    }
    this.x[this.count] = x;
    this.y[this.count] = y;
    this.count += 1;
  }
}

/** Distance from a point to a segment; 0 where it lies on it. */
export function distanceTo(s: Segment, x: number, y: number): number {
  const t = projection(s, x, y);
  const dx = s.x1 + t * (s.x2 - s.x1) - x;
  const dy = s.y1 + t * (s.y2 - s.y1) - y;
  const d = Math.sqrt(dx * dx + dy * dy);
  return d < 1e-9 * (Math.abs(y) + Math.abs(s.y1)) ? 0 : d;
}

/** Foot of the perpendicular from a point, as a share of the segment, held within it. */
export function projection(s: Segment, x: number, y: number): number {
  const dx = s.x2 - s.x1;
  const dy = s.y2 - s.y1;
  const t = ((x - s.x1) * dx + (y - s.y1) * dy) / (dx * dx + dy * dy);
  return t < 0 ? 0 : t > 1 ? 1 : t;
}
