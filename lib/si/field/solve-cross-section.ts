import { validateCrossSection, type CrossSection, type LineParameters } from "../cross-section";
import { NotConvergedError } from "../errors";
import { EPS0 } from "../physical-constants";
import { FINENESS, type Accuracy, type Fineness } from "./accuracy";
import { solveCharges, type Charges } from "./charges";
import { rightHalf } from "./half";
import { lineParameters, type Capacitances } from "./line-parameters";
import { Mesh } from "./mesh";
import { outlineOf } from "./outline";
import { layPanels, type Topology } from "./panels";
import type { Cut } from "./segment";
import { centred, isMirroredVertically, symmetryOf, type Symmetry } from "./symmetry";

export interface FieldParameters extends LineParameters {
  /** |C12 − C21|/C11 before both are replaced by their mean; 0 where symmetry leaves none */
  reciprocityGap: number;
}

/** A solved section with what its drawing needs. */
export interface Solved {
  parameters: FieldParameters;
  topology: Topology;
  symmetry: Symmetry;
  /** index of the trace at x > 0 where an equal pair was halved */
  right: number;
}

const workspace = new Mesh();

/**
 * Quasi-static line parameters of a cross-section, from a boundary integral over its charges (perfect conductors,
 * lossless dielectrics, infinite planes).
 *
 * Lengths [m] as in CrossSection; returns C, L [F/m, H/m], impedances [Ω], delays [s/m].
 * Accuracy over tests/reference/impedance (87 finite-element and 38 exact cases), worst value: live 0.1 %,
 * standard 0.03 %, reference 0.001 %; `errorEstimate` is that of the section at hand.
 *
 * @throws DomainError for an illegal section, with the field's name
 */
export function solveCrossSection(
  section: CrossSection,
  options: { accuracy?: Accuracy } = {},
): FieldParameters {
  validateCrossSection(section);
  return solveWith(section, FINENESS[options.accuracy ?? "standard"]).parameters;
}

/**
 * A solver for neighbouring cross-sections (sweeps, secants, differences): it keeps the first section's mesh topology, so
 * that results follow small changes of a length or a permittivity smoothly. A section of another shape starts anew.
 */
export function neighbourSolver(
  options: { accuracy?: Accuracy } = {},
): (section: CrossSection) => FieldParameters {
  let topology: Topology | undefined;
  return (section) => {
    validateCrossSection(section);
    const solved = solveWith(section, FINENESS[options.accuracy ?? "standard"], topology);
    topology = { ...solved.topology, near: workspace.takeDecisions() };
    return solved.parameters;
  };
}

/** @param keep  mesh to use, and where the charges of every mode and excitation go */
export function solveWith(
  section: CrossSection,
  fineness: Fineness,
  held?: Topology,
  keep?: { mesh: Mesh; charges: Float64Array[][] },
): Solved {
  const symmetry = symmetryOf(section);
  const half = symmetry.kind !== "none";
  const whole = outlineOf(centred(section, half ? symmetry.axis : 0));
  const outline = half ? rightHalf(whole) : whole;
  const mesh = keep?.mesh ?? workspace;
  const topology = layPanels(mesh, outline, half, fineness, held);
  const [a, b] = section.traces;
  const right = a && b && a.x > b.x ? 0 : 1;
  const solved = symmetry.kind === "swap" ? equalPair : unlike;
  const { capacitances, gap, unresolved } = solved(section, mesh, outline.cuts, right, half, keep?.charges);
  if (!(capacitances.air[0]![0]! > 0 && capacitances.filled[0]![0]! > 0)) {
    throw new NotConvergedError("The field of this cross-section could not be solved.", gap, 1);
  }
  const mirrored = b !== undefined && (symmetry.kind === "swap" || isMirroredVertically(section));
  const parameters = {
    ...lineParameters(capacitances, mirrored),
    unknowns: mesh.nodes,
    errorEstimate: Math.max(fineness.floor + fineness.tail * unresolved, gap),
    reciprocityGap: gap,
  };
  return { parameters, topology, symmetry, right };
}

interface Raw {
  capacitances: Capacitances;
  gap: number;
  unresolved: number;
}

function equalPair(
  _section: CrossSection,
  mesh: Mesh,
  cuts: Cut[],
  right: number,
  _half: boolean,
  keep?: Float64Array[][],
): Raw {
  const [even, odd] = solveCharges(mesh, cuts, "both", [right === 0 ? [1, 0] : [0, 1]], keep);
  const matrix = (key: "filled" | "air") => {
    const e = even![key][0]![right]! * EPS0;
    const o = odd![key][0]![right]! * EPS0;
    return [
      [(e + o) / 2, (e - o) / 2],
      [(e - o) / 2, (e + o) / 2],
    ];
  };
  return {
    capacitances: { filled: matrix("filled"), air: matrix("air") },
    gap: 0,
    unresolved: Math.max(even!.unresolved, odd!.unresolved),
  };
}

function unlike(
  { traces }: CrossSection,
  mesh: Mesh,
  cuts: Cut[],
  _right: number,
  half: boolean,
  keep?: Float64Array[][],
): Raw {
  const units = traces.map((_, i) => traces.map((__, j) => (i === j ? 1 : 0)));
  const [solved] = solveCharges(mesh, cuts, half ? "even" : "whole", units, keep) as [Charges];
  const scale = EPS0 * (half ? 2 : 1);
  const matrix = (q: number[][]) =>
    traces.map((_, i) => traces.map((__, j) => (scale * (q[j]![i]! + q[i]![j]!)) / 2));
  const { filled, air } = solved;
  const gap =
    traces.length < 2
      ? 0
      : Math.max(
          Math.abs(filled[0]![1]! - filled[1]![0]!) / filled[0]![0]!,
          Math.abs(air[0]![1]! - air[1]![0]!) / air[0]![0]!,
        );
  return { capacitances: { filled: matrix(filled), air: matrix(air) }, gap, unresolved: solved.unresolved };
}
