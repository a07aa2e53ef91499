import { validateCrossSection, type CrossSection, type LineParameters } from "../cross-section";
import { NotConvergedError } from "../errors";
import { EPS0 } from "../physical-constants";
import { rightHalf } from "./half";
import { FINENESS, type Accuracy, type Fineness } from "./accuracy";
import { solveCharges } from "./charges";
import { lineParameters, type Capacitances } from "./line-parameters";
import { Mesh } from "./mesh";
import { outlineOf } from "./outline";
import { layPanels } from "./panels";
import { centred, isMirroredVertically, symmetryOf } from "./symmetry";

const workspace = new Mesh();

/**
 * Quasi-static line parameters of a cross-section by a boundary integral over its charges.
 *
 * @throws DomainError for an illegal section, with the field's name
 */
export function solveCrossSection(
  section: CrossSection,
  options: { accuracy?: Accuracy } = {},
): LineParameters {
  validateCrossSection(section);
  return solveWith(section, FINENESS[options.accuracy ?? "standard"]);
}

export function solveWith(section: CrossSection, fineness: Fineness): LineParameters {
  const { kind, axis } = symmetryOf(section);
  const half = kind !== "none";
  const whole = outlineOf(centred(section, half ? axis : 0));
  const outline = half ? rightHalf(whole) : whole;
  const mesh = workspace;
  layPanels(mesh, outline, half, fineness);
  const count = section.traces.length;
  let c: Capacitances;
  if (kind === "swap") {
    const right = section.traces[0]!.x > section.traces[1]!.x ? 0 : 1;
    const volts = right === 0 ? [1, 0] : [0, 1];
    const [even, odd] = solveCharges(mesh, outline.cuts, "both", [volts]);
    const matrix = (key: "filled" | "air") => {
      const e = even![key][0]![right]! * EPS0;
      const o = odd![key][0]![right]! * EPS0;
      return [
        [(e + o) / 2, (e - o) / 2],
        [(e - o) / 2, (e + o) / 2],
      ];
    };
    c = { filled: matrix("filled"), air: matrix("air") };
  } else {
    const unit = section.traces.map((_, i) => section.traces.map((__, j) => (i === j ? 1 : 0)));
    const [solved] = solveCharges(mesh, outline.cuts, half ? "even" : "whole", unit);
    const scale = EPS0 * (half ? 2 : 1);
    const matrix = (q: number[][]) =>
      section.traces.map((_, i) => section.traces.map((__, j) => (scale * (q[j]![i]! + q[i]![j]!)) / 2));
    c = { filled: matrix(solved!.filled), air: matrix(solved!.air) };
  }
  const result = lineParameters(c, count === 2 && (kind === "swap" || isMirroredVertically(section)));
  if (!(c.filled[0]![0]! > 0)) throw new NotConvergedError("The field solution did not settle.", 0, 0);
  return { ...result, unknowns: mesh.nodes, errorEstimate: 1e-3 };
}
