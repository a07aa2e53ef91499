import type { CrossSection } from "@/lib/si/cross-section";

/** Cross-sections of the kinds in tests/reference/impedance, lengths in mm as there. */

const mm = 1e-3;

export interface TraceSize {
  /** bottom and top width [mm] */
  w: number;
  wTop?: number;
  t: number;
  /** gap between bottom faces [mm]: makes an equal pair */
  s?: number;
}

export function outerSection(
  size: TraceSize & { h: number; er: number; slot?: number; mask?: number },
): CrossSection {
  return {
    layers: [{ thickness: size.h * mm, er: size.er }],
    upperPlane: false,
    traces: traces(size, size.h),
    ...(size.slot === undefined ? {} : { coplanar: { gap: size.slot * mm } }),
    ...(size.mask === undefined
      ? {}
      : { mask: { overLaminate: size.mask * mm, overTrace: size.mask * mm, side: size.mask * mm, er: 3.5 } }),
  };
}

export function coveredSection(
  size: TraceSize & { h: number; er: number; cover: number; coverEr: number },
): CrossSection {
  return {
    layers: [
      { thickness: size.h * mm, er: size.er },
      { thickness: size.cover * mm, er: size.coverEr },
    ],
    upperPlane: false,
    traces: traces(size, size.h),
  };
}

export function innerSection(
  size: TraceSize & { h1: number; h2: number; er: number; erUpper?: number },
): CrossSection {
  return {
    layers: [
      { thickness: size.h1 * mm, er: size.er },
      { thickness: (size.t + size.h2) * mm, er: size.erUpper ?? size.er },
    ],
    upperPlane: true,
    traces: traces(size, size.h1),
  };
}

function traces(size: TraceSize, y: number): CrossSection["traces"] {
  const one = {
    x: 0,
    y: y * mm,
    thickness: size.t * mm,
    widthBottom: size.w * mm,
    widthTop: (size.wTop ?? size.w) * mm,
  };
  if (size.s === undefined) return [one];
  const half = ((size.w + size.s) / 2) * mm;
  return [
    { ...one, x: -half },
    { ...one, x: half },
  ];
}
