import { number, place } from "./attributes";
import type { BoardDraft } from "./draft";
import type { XmlElement } from "./scan-xml";
import { placed, UNMOVED, type Xform } from "./xform";

/** An arc becomes chords of at most this angle; their lengths stay those of the arc. */
const CHORD_RAD = Math.PI / 36;

/** A line as it is drawn, corner by corner, in the coordinates of its own element [m]. */
export class DrawnPath {
  readonly points: number[] = [];
  readonly chords: number[] = [];
  /** A corner could not be read: the whole line is not what was meant. */
  broken = false;

  constructor(private readonly draft: BoardDraft) {}

  begin(x: number, y: number): void {
    this.points.push(x, y);
  }

  /** PolyBegin, PolyStepSegment, PolyStepCurve. */
  take(element: XmlElement): void {
    this.draft.count(1);
    const to = place(this.draft, element);
    if (!to) this.broken = true;
    else if (element.name === "PolyBegin") this.begin(to.x, to.y);
    else if (this.points.length === 0) {
      this.draft.problem(element.line, element.name, "stands before PolyBegin; the line is left out.");
      this.broken = true;
    } else if (element.name === "PolyStepCurve") this.curve(element, to);
    else this.straight(to.x, to.y);
  }

  straight(x: number, y: number): void {
    const [fromX, fromY] = this.last();
    const length = Math.hypot(x - fromX, y - fromY);
    if (length === 0) return;
    this.points.push(x, y);
    this.chords.push(length);
  }

  /** About centerX, centerY; counter-clockwise unless it says `clockwise`. Ends that coincide are a full turn. */
  curve(element: XmlElement, to: { x: number; y: number }): void {
    const metres = this.draft.metres;
    const centreX = number(this.draft, element, "centerX");
    const centreY = centreX === null ? null : number(this.draft, element, "centerY");
    if (centreX === null || centreY === null) {
      this.broken = true;
      return;
    }
    const [x0, y0] = this.last();
    const [cx, cy] = [centreX * metres, centreY * metres];
    const r0 = Math.hypot(x0 - cx, y0 - cy);
    const r1 = Math.hypot(to.x - cx, to.y - cy);
    const clockwise = /^(true|1)$/i.test(element.attributes.clockwise ?? "");
    if (!(r0 > 0) || !(r1 > 0) || Math.abs(r0 - r1) > 0.1 * Math.max(r0, r1)) {
      this.draft.problem(
        element.line,
        element.name,
        "has a centre that is not equally far from both ends; taken as straight.",
      );
      this.straight(to.x, to.y);
      return;
    }
    const start = Math.atan2(y0 - cy, x0 - cx);
    let sweep = Math.atan2(to.y - cy, to.x - cx) - start;
    if (clockwise && sweep >= 0) sweep -= 2 * Math.PI;
    if (!clockwise && sweep <= 0) sweep += 2 * Math.PI;
    const steps = Math.max(1, Math.ceil(Math.abs(sweep) / CHORD_RAD - 1e-9));
    this.draft.count(steps);
    for (let step = 1; step <= steps; step++) {
      const share = step / steps;
      const radius = r0 + (r1 - r0) * share;
      const angle = start + sweep * share;
      if (step === steps) this.points.push(to.x, to.y);
      else this.points.push(cx + radius * Math.cos(angle), cy + radius * Math.sin(angle));
      this.chords.push((((r0 + r1) / 2) * Math.abs(sweep)) / steps);
    }
  }

  /** The corners on the board, and the length of each chord. */
  placed(form: Xform, at: { x: number; y: number }): { path: number[]; chords: number[] } {
    if (form === UNMOVED && at.x === 0 && at.y === 0) return { path: this.points, chords: this.chords };
    const path: number[] = [];
    for (let index = 0; index + 1 < this.points.length; index += 2)
      path.push(...placed(form, at, this.points[index] ?? 0, this.points[index + 1] ?? 0));
    return { path, chords: form.scale === 1 ? this.chords : this.chords.map((chord) => chord * form.scale) };
  }

  private last(): [number, number] {
    return [this.points.at(-2) ?? 0, this.points.at(-1) ?? 0];
  }
}
