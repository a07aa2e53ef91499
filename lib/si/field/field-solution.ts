import { validateCrossSection, type CrossSection } from "../cross-section";
import { DomainError } from "../errors";
import { FINENESS, type Accuracy } from "./accuracy";
import { potentialRow } from "./copper-rows";
import { Mesh, mappedX, mappedY } from "./mesh";
import { solveWith, type FieldParameters } from "./solve-cross-section";

/** Voltages of the traces [V]: named, or one number per trace. */
export type Excitation = "single" | "odd" | "even" | readonly number[];

export interface FieldSolution {
  parameters: FieldParameters;
  /**
   * Potential [V] at a point [m] of the section's own coordinates. "single": first trace at 1 V, any other at 0; "odd":
   * +1 V and −1 V; "even": both at 1 V. 0 on and beyond the planes.
   * @throws DomainError where the voltages do not fit the traces
   */
  potentialAt: (x: number, y: number, excitation: Excitation) => number;
}

/**
 * The field of a cross-section, for drawing: its charges are kept, and any point's potential is their sum.
 * Accuracy of the potential: about that of the impedance, a little less within a hair of a corner.
 *
 * @throws DomainError for an illegal section, with the field's name
 */
export function fieldSolution(section: CrossSection, options: { accuracy?: Accuracy } = {}): FieldSolution {
  validateCrossSection(section);
  const mesh = new Mesh();
  const charges: Float64Array[][] = [];
  const fineness = FINENESS[options.accuracy ?? "standard"];
  const { parameters, symmetry, right } = solveWith(section, fineness, undefined, { mesh, charges });
  const { kind, axis } = symmetry;
  const traces = section.traces.length;
  const halved = kind !== "none";
  const origin = halved ? axis : 0;
  const even = new Float64Array(mesh.nodes);
  const odd = kind === "swap" ? new Float64Array(mesh.nodes) : null;

  const sum = (row: Float64Array, weights: Float64Array | undefined) => {
    let total = 0;
    for (let j = 0; j < mesh.nodes; j++) total += row[j]! * (weights?.[j] ?? 0);
    return total;
  };
  const potentialOf = (x: number, y: number, volts: readonly number[]): number => {
    const { upper } = mesh;
    const mapped = {
      x: mappedX(upper, x, y),
      y: mappedY(upper, x, y),
      mirrorX: mappedX(upper, -x, y),
      mirrorY: mappedY(upper, -x, y),
    };
    potentialRow(mesh, x, y, mapped, -1, halved, even, odd, 0);
    if (odd) {
      // both modes were solved with 1 V on the trace at x > 0
      const there = volts[right] ?? 0;
      const here = volts[1 - right] ?? 0;
      return (
        ((there + here) / 2) * sum(even, charges[0]?.[0]) + ((there - here) / 2) * sum(odd, charges[1]?.[0])
      );
    }
    let total = 0;
    for (let i = 0; i < traces; i++) total += (volts[i] ?? 0) * sum(even, charges[0]?.[i]);
    return total;
  };

  return {
    parameters,
    potentialAt(x, y, excitation) {
      const volts = voltsOf(excitation, traces);
      if (y <= 0 || (mesh.upper > 0 && y >= mesh.upper)) return 0;
      const value = potentialOf(x - origin, y, volts);
      // exactly on a node of the mesh the logarithm is infinite before it is integrated
      return Number.isFinite(value) ? value : potentialOf(x - origin, y * (1 + 1e-9), volts);
    },
  };
}

function voltsOf(excitation: Excitation, traces: number): readonly number[] {
  if (excitation === "single") return traces === 1 ? [1] : [1, 0];
  if (typeof excitation === "string") {
    if (traces !== 2) throw new DomainError(`A single trace has no ${excitation} mode.`, "excitation");
    return excitation === "odd" ? [1, -1] : [1, 1];
  }
  if (excitation.length !== traces || !excitation.every(Number.isFinite)) {
    throw new DomainError("Give one voltage for each trace.", "excitation");
  }
  return excitation;
}
