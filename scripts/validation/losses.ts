import type { ValidationChapter, ValidationCompared } from "../../lib/schemas/validation";
import { COPPER_CONDUCTIVITY, type CrossSection, lineLoss, solveCrossSection } from "../../lib/si";
import lossReference from "../../tests/reference/impedance/loss.json";
import seriesReference from "../../tests/reference/impedance/rl.json";
import { referenceSection, type ReferenceSectionCase } from "../../tests/support/reference-cross-section";
import { type CaseValues, grouped } from "./grouped";

/** What the engine has to hold, as a share. */
const ALLOWED = 0.02;
const MM = 1e-3;

const compared = (quantity: string, unit: string, reference: number, engine: number): ValidationCompared => ({
  quantity,
  unit,
  reference,
  engine,
  error: Math.abs(engine / reference - 1),
});

type LossCase = ReferenceSectionCase & { results: Record<string, { kR_per_m: number }> };

function conductorLoss(): CaseValues[] {
  return (lossReference.cases as unknown as LossCase[]).flatMap((entry) => {
    const section = referenceSection({ ...entry, structure: entry.structure.replace(/^loss-/, "") });
    if (!section) return [];
    const { modes } = lineLoss(
      section,
      solveCrossSection(section),
      { conductivity: COPPER_CONDUCTIVITY },
      Float64Array.of(1e9),
    );
    const values = Object.entries(entry.results).map(([name, { kR_per_m }]) => {
      const engine = modes.find((mode) => mode.name === name)?.resistanceFactor ?? Number.NaN;
      return compared(`loss factor, ${name}`, "1/m", kR_per_m, engine);
    });
    return [{ group: "Skin-effect loss factor", id: entry.id, values }];
  });
}

function seriesImpedance(): CaseValues[] {
  return seriesReference.cases.map((entry) => {
    const g = entry.geometry_mm;
    const section: CrossSection = {
      layers: [{ thickness: g.h * MM, er: 1 }],
      upperPlane: false,
      traces: [{ x: 0, y: g.h * MM, thickness: g.t * MM, widthBottom: g.w * MM, widthTop: g.w * MM }],
    };
    const conductor = {
      conductivity: 1 / entry.conductor.rho_ohm_m,
      planeThickness: g.plane_thickness * MM,
      planeWidth: g.plane_width * MM,
    };
    const { table } = entry.results;
    const frequencies = Float64Array.from(table, (row) => row.f_Hz);
    const loss = lineLoss(section, solveCrossSection(section), conductor, frequencies);
    const values = table.flatMap((row, k) => [
      compared(`R at ${row.f_Hz / 1e6} MHz`, "Ω/m", row.R_ohm_per_m, loss.resistance[k] ?? Number.NaN),
      compared(`L at ${row.f_Hz / 1e6} MHz`, "H/m", row.L_H_per_m, loss.inductance[k] ?? Number.NaN),
    ]);
    return { group: "Resistance and inductance, 1 kHz to 10 GHz", id: entry.id, values };
  });
}

export function losses(): ValidationChapter {
  return {
    id: "losses",
    title: "Loss against finite elements",
    about:
      "The skin-effect loss factor of each mode by receding walls, and resistance and inductance from direct current to full skin effect by filaments, as shares of the reference.",
    source:
      "Finite elements in statics and magneto-quasi-statics, computed for this project apart from its code; the loss factor is exact to 10⁻⁴ of its definition, which holds the physical resistance to 2 %.",
    groups: grouped([...conductorLoss(), ...seriesImpedance()], ALLOWED),
  };
}
