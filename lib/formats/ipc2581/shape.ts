import { optionalNumber } from "./attributes";
import type { XmlElement } from "./scan-xml";
import type { Xform } from "./xform";

/** What a pad covers, by the box around it: enough to tell which ends of lines lie in it. */
export interface Shape {
  /** Half of width and height [m], about the centre. */
  halfX: number;
  halfY: number;
  round: boolean;
  /** Of the box itself [rad]. */
  angle: number;
}

/** Standard primitives, by the attributes that give their size. Null for an element that is none. */
export function readShape(element: XmlElement, metres: number): Shape | null {
  const of = (name: string) => (optionalNumber(element, name) ?? 0) * metres;
  switch (element.name) {
    case "Circle":
      return shape(of("diameter"), of("diameter"), true);
    case "Donut":
    case "Thermal":
    case "Moire":
      return shape(of("outerDiameter") || of("diameter"), of("outerDiameter") || of("diameter"), true);
    case "Octagon":
    case "Hexagon":
      return shape(of("length") || of("diameter"), of("length") || of("diameter"), true);
    case "Ellipse":
    case "Oval":
    case "RectCenter":
    case "RectRound":
    case "RectCham":
    case "Diamond":
    case "Butterfly":
      return shape(of("width") || of("diameter"), of("height") || of("diameter"), false);
    case "Triangle":
      return shape(of("base"), of("height"), false);
    case "RectCorner":
      return shape(
        2 * Math.max(Math.abs(of("lowerLeftX")), Math.abs(of("upperRightX"))),
        2 * Math.max(Math.abs(of("lowerLeftY")), Math.abs(of("upperRightY"))),
        false,
      );
    default:
      return null;
  }
}

/** The box about the origin that holds all corners of an outline. */
export function outlineShape(outline: readonly number[]): Shape | null {
  let halfX = 0;
  let halfY = 0;
  for (let at = 0; at + 1 < outline.length; at += 2) {
    halfX = Math.max(halfX, Math.abs(outline[at] ?? 0));
    halfY = Math.max(halfY, Math.abs(outline[at + 1] ?? 0));
  }
  return shape(2 * halfX, 2 * halfY, false);
}

export function turned(shape: Shape, { rotation, mirror, scale }: Xform): Shape {
  return {
    ...shape,
    halfX: shape.halfX * scale,
    halfY: shape.halfY * scale,
    angle: (mirror ? -shape.angle : shape.angle) + rotation,
  };
}

/** Whether a point, seen from the centre, lies in the shape or within `margin` [m] of it. */
export function covers(
  { halfX, halfY, round, angle }: Shape,
  dx: number,
  dy: number,
  margin: number,
): boolean {
  if (round) return Math.hypot(dx, dy) <= halfX + margin;
  const along = Math.abs(dx * Math.cos(angle) + dy * Math.sin(angle));
  const across = Math.abs(dy * Math.cos(angle) - dx * Math.sin(angle));
  return along <= halfX + margin && across <= halfY + margin;
}

function shape(width: number, height: number, round: boolean): Shape | null {
  if (!(width > 0) || !(height > 0)) return null;
  return { halfX: width / 2, halfY: height / 2, round, angle: 0 };
}
