import { stackHeight, type CrossSection, type Trace } from "../cross-section";
import { gradedEdges, type FilamentConductor, type FilamentRow } from "./filaments";
import { skinDepth } from "./skin-effect";
import type { FilamentModel } from "./series-impedance";

export interface MetalOptions {
  /** [S/m] */
  conductivity: number;
  /** copper thickness of the reference planes [m] */
  planeThickness: number;
  /** width of the reference planes, centred under the traces [m] */
  planeWidth: number;
}

/** First cell at a surface, in skin depths at the highest frequency. */
const FINE = 0.4;
/** Rows at least for a trapezoid whose skin is thin: its sides become steps. */
const SLOPED_ROWS = 8;

/** One current pattern of a section: how the model mirrors and what its solution must be multiplied by. */
export type Pattern = "single" | "odd" | "even" | "both";

/**
 * A section's metal as filaments, fine enough up to `highest` Hz: traces row by row, planes as sheets, coplanar copper
 * out to the planes' edges.
 */
export function conductorModel(
  section: CrossSection,
  metal: MetalOptions,
  pattern: Pattern,
  highest: number,
): FilamentModel {
  const fine = FINE * skinDepth(metal.conductivity, highest);
  const axis = section.traces.reduce((sum, trace) => sum + trace.x, 0) / section.traces.length;
  const traces = section.traces.map((trace) => ({ ...trace, x: trace.x - axis }));
  const mirrored = pattern !== "both" || traces.every((trace) => trace.x === 0);
  const kept = pattern === "odd" || pattern === "even" ? traces.filter((trace) => trace.x > 0) : traces;
  const conductors: FilamentConductor[] = kept.map((trace, signal) => ({
    signal,
    sheet: false,
    rows: traceRows(trace, fine, mirrored && trace.x === 0),
  }));
  const reach = metal.planeWidth / 2;
  const height = stackHeight(section);
  const columns = planeColumns(section, traces, reach, mirrored);
  const plane = (y0: number): FilamentConductor => ({
    signal: -1,
    sheet: true,
    rows: stacked(y0, y0 + metal.planeThickness, fine, () => columns),
  });
  conductors.push(plane(-metal.planeThickness));
  if (section.upperPlane) conductors.push(plane(height));
  if (section.coplanar)
    conductors.push(...coplanarCopper(traces, section.coplanar.gap, fine, reach, mirrored));
  return {
    conductors,
    mirror: mirrored ? (pattern === "odd" ? -1 : 1) : 0,
    signals: kept.length,
    conductivity: metal.conductivity,
  };
}

/** Whether the pattern's currents flow in whole traces or only half of each is in the model. */
export function halved(section: CrossSection, pattern: Pattern): boolean {
  return pattern === "single" || (pattern === "both" && new Set(section.traces.map((t) => t.x)).size === 1);
}

function traceRows(trace: Trace, fine: number, half: boolean): FilamentRow[] {
  const { x, y, thickness, widthBottom, widthTop } = trace;
  const widest = Math.max(widthBottom, widthTop) / 2;
  const unit = gradedEdges(half ? 0 : -1, 1, fine / widest, 1 / 4, { start: !half, end: true });
  const edges = (middle: number) => {
    const share = (middle - y) / thickness;
    const halfWidth = (widthBottom + share * (widthTop - widthBottom)) / 2;
    return unit.map((u) => x + u * halfWidth);
  };
  return stacked(
    y,
    y + thickness,
    fine,
    edges,
    widthBottom === widthTop || fine > thickness / 20 ? 3 : SLOPED_ROWS,
  );
}

function stacked(
  y0: number,
  y1: number,
  fine: number,
  edges: (middle: number) => Float64Array,
  rows = 3,
): FilamentRow[] {
  const ys = gradedEdges(y0, y1, fine, (y1 - y0) / rows, { start: true, end: true });
  return Array.from({ length: ys.length - 1 }, (_, i) => ({
    y0: ys[i]!,
    y1: ys[i + 1]!,
    edges: edges((ys[i]! + ys[i + 1]!) / 2),
  }));
}

/** Even under the traces and two heights beyond, then growing to the plane's edge. */
function planeColumns(
  section: CrossSection,
  traces: Trace[],
  reach: number,
  mirrored: boolean,
): Float64Array {
  const nearest = Math.min(
    ...traces.flatMap(({ y, thickness }) =>
      section.upperPlane ? [y, stackHeight(section) - y - thickness] : [y],
    ),
  );
  const outer = Math.max(
    ...traces.map(({ x, widthBottom, widthTop }) => Math.abs(x) + Math.max(widthBottom, widthTop) / 2),
  );
  const inner = Math.min(outer + 2 * nearest, reach);
  const count = Math.min(36, Math.max(6, Math.ceil((3 * inner) / nearest)));
  const near = Array.from({ length: count + 1 }, (_, i) => (inner * i) / count);
  const far =
    reach > inner
      ? gradedEdges(inner, reach, inner / count, reach / 5, { start: true, end: false }, 1.3).slice(1)
      : [];
  const half = [...near, ...far];
  return Float64Array.from(
    mirrored
      ? half
      : [
          ...half
            .slice(1)
            .reverse()
            .map((x) => -x),
          ...half,
        ],
  );
}

function coplanarCopper(
  traces: Trace[],
  gap: number,
  fine: number,
  reach: number,
  mirrored: boolean,
): FilamentConductor[] {
  const side = (sign: 1 | -1): FilamentConductor => {
    const trace = traces.reduce((a, b) => (sign * b.x > sign * a.x ? b : a));
    const { y, thickness, widthBottom, widthTop } = trace;
    const foot = sign * trace.x + widthBottom / 2 + gap;
    const lean = (widthBottom - widthTop) / 2 / thickness;
    const outer = Math.max(reach, foot + 4 * gap);
    const unit = gradedEdges(foot, outer, fine, (outer - foot) / 4, { start: true, end: false }, 1.7);
    return {
      signal: -1,
      sheet: false,
      rows: stacked(y, y + thickness, fine, (middle) => {
        const shift = lean * (middle - y);
        const edges = unit.map((x) => foot + shift + ((x - foot) * (outer - foot - shift)) / (outer - foot));
        return sign === 1 ? edges : edges.reverse().map((x) => -x);
      }),
    };
  };
  return mirrored ? [side(1)] : [side(1), side(-1)];
}
