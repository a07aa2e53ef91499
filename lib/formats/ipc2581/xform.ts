import { flag, optionalNumber } from "./attributes";
import type { XmlElement } from "./scan-xml";

/** How a thing is placed: mirrored left to right, scaled, turned, moved. */
export interface Xform {
  /** [rad], counter-clockwise. */
  rotation: number;
  mirror: boolean;
  scale: number;
  /** [m], before it is turned. */
  dx: number;
  dy: number;
}

export const UNMOVED: Xform = { rotation: 0, mirror: false, scale: 1, dx: 0, dy: 0 };

export function readXform(element: XmlElement, metres: number): Xform {
  const scale = optionalNumber(element, "scale") ?? 1;
  return {
    rotation: ((optionalNumber(element, "rotation") ?? 0) * Math.PI) / 180,
    mirror: flag(element, "mirror"),
    scale: scale > 0 && scale <= 1000 ? scale : 1,
    dx: (optionalNumber(element, "xOffset") ?? 0) * metres,
    dy: (optionalNumber(element, "yOffset") ?? 0) * metres,
  };
}

/** Several Xform elements of one thing add up, as some exporters write rotation and mirror apart. */
export function both(a: Xform, b: Xform): Xform {
  return {
    rotation: a.rotation + b.rotation,
    mirror: a.mirror !== b.mirror,
    scale: a.scale * b.scale,
    dx: a.dx + b.dx,
    dy: a.dy + b.dy,
  };
}

/** Where a point of a thing lies once the thing is placed at `at`. */
export function placed(form: Xform, at: { x: number; y: number }, x: number, y: number): [number, number] {
  const px = (form.mirror ? -(x + form.dx) : x + form.dx) * form.scale;
  const py = (y + form.dy) * form.scale;
  if (form.rotation === 0) return [at.x + px, at.y + py];
  const cos = Math.cos(form.rotation);
  const sin = Math.sin(form.rotation);
  return [at.x + px * cos - py * sin, at.y + px * sin + py * cos];
}
