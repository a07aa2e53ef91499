import { describe, expect, it } from "vitest";
import { solveComplexSymmetric } from "@/lib/si/frequency/complex-symmetric";
import { gradedEdges, type FilamentRow } from "@/lib/si/frequency/filaments";
import { meanLogDistances } from "@/lib/si/frequency/mean-log-distance";
import { monotoneCubic } from "@/lib/si/frequency/monotone-cubic";

const row = (y0: number, y1: number, ...edges: number[]): FilamentRow => ({
  y0,
  y1,
  edges: Float64Array.from(edges),
});

function mean(a: FilamentRow, b: FilamentRow, mirror = false): number {
  let value = Number.NaN;
  meanLogDistances(a, b, mirror, (i, j, m) => {
    if (i === 0 && j === 0) value = m;
  });
  return value;
}

describe("mean of ln r between rectangles", () => {
  it("of a square with itself is ln(0.44705 a) (Maxwell's geometric mean distance, in every handbook)", () => {
    const square = row(0, 2, 0, 2);
    expect(Math.exp(mean(square, square)) / 2).toBeCloseTo(0.44705, 5);
  });

  it("of a strip with itself tends to ln(a) − 3/2 (limit)", () => {
    const strip = row(0, 1e-6, 0, 1);
    expect(mean(strip, strip)).toBeCloseTo(-1.5, 4);
  });

  it("of adjoining and of distant rectangles agrees with quadrature to 5e-4, its own error (computed)", () => {
    const a = row(0, 1, 0, 2);
    for (const b of [row(1, 1.5, 0.5, 3), row(0.2, 2, 2, 2.5), row(5, 6, 7, 9), row(0, 3, 40, 41)]) {
      for (const mirror of [false, true]) {
        expect(mean(a, b, mirror)).toBeCloseTo(quadrature(a, b, mirror), 3);
      }
    }
  });
});

function quadrature(a: FilamentRow, b: FilamentRow, mirror: boolean): number {
  const n = 24;
  const points = (from: number, to: number, shift: number) =>
    Array.from({ length: n }, (_, i) => from + ((i + shift) / n) * (to - from));
  let sum = 0;
  // the grids of both rectangles are staggered, so no two points fall together
  for (const x of points(a.edges[0]!, a.edges[1]!, 0.5))
    for (const y of points(a.y0, a.y1, 0.5))
      for (const u of points(b.edges[0]!, b.edges[1]!, 0.5))
        for (const v of points(b.y0, b.y1, 0.5)) sum += Math.log(Math.hypot(x - (mirror ? -u : u), y - v));
  return sum / n ** 4;
}

describe("cells of a conductor", () => {
  it("fill it exactly, ascend, start fine where graded and stay below the coarse width", () => {
    const edges = gradedEdges(1, 2, 0.01, 0.2, { start: true, end: true });
    expect([edges[0], edges.at(-1)]).toEqual([1, 2]);
    for (let i = 0; i + 1 < edges.length; i++) {
      const width = edges[i + 1]! - edges[i]!;
      expect(width).toBeGreaterThan(0);
      expect(width).toBeLessThan(0.28);
    }
    expect(edges[1]! - 1).toBeCloseTo(0.01, 9);
    expect(2 - edges.at(-2)!).toBeCloseTo(0.01, 9);
    expect([...gradedEdges(0, 1, 5, 5, { start: true, end: false })]).toEqual([0, 1]);
  });
});

describe("complex symmetric equations", () => {
  it("are solved to 1e-12 (residual of a matrix like those of filaments)", () => {
    const n = 12;
    const a = (i: number, j: number) => ({
      re: i === j ? 1 + 0.1 * i : 0,
      im: Math.log(20) - Math.log(Math.abs(i - j) + 0.45),
    });
    const re = new Float64Array(n * n);
    const im = new Float64Array(n * n);
    for (let i = 0; i < n; i++)
      for (let j = 0; j <= i; j++) {
        re[i * n + j] = a(i, j).re;
        im[i * n + j] = a(i, j).im;
      }
    const b = { re: Float64Array.from({ length: n }, (_, i) => i), im: new Float64Array(n).fill(1) };
    const x = { re: b.re.slice(), im: b.im.slice() };
    solveComplexSymmetric(re, im, n, [x]);
    for (let i = 0; i < n; i++) {
      let [sr, si] = [-b.re[i]!, -b.im[i]!];
      for (let j = 0; j < n; j++) {
        const m = a(i, j);
        sr += m.re * x.re[j]! - m.im * x.im[j]!;
        si += m.re * x.im[j]! + m.im * x.re[j]!;
      }
      expect(Math.abs(sr) + Math.abs(si)).toBeLessThan(1e-12 * n);
    }
  });
});

describe("monotone cubic", () => {
  it("passes its points, never overshoots, and is straight through a straight line", () => {
    const x = Float64Array.of(0, 1, 2, 4);
    const curve = monotoneCubic(x, Float64Array.of(0, 0, 1, 1));
    for (let t = 0; t <= 4; t += 0.05) {
      expect(curve(t)).toBeGreaterThanOrEqual(0);
      expect(curve(t)).toBeLessThanOrEqual(1 + 1e-12);
    }
    expect(monotoneCubic(x, x)(3.3)).toBeCloseTo(3.3, 12);
    expect(monotoneCubic(Float64Array.of(1), Float64Array.of(7))(3)).toBe(7);
  });
});
