import type { ValidationChapter } from "../../lib/schemas/validation";
import { closedForms, solveCrossSection } from "../../lib/si";
import exact from "../../tests/reference/impedance/exact.json";
import fem from "../../tests/reference/impedance/fem.json";
import {
  compareWithReference,
  referenceSection,
  type ReferenceSectionCase,
} from "../../tests/support/reference-cross-section";
import { type CaseValues, grouped } from "./grouped";

const finite = fem.cases as unknown as ReferenceSectionCase[];
const analytic = exact.cases as unknown as ReferenceSectionCase[];

/** What the field solver has to hold at its standard setting, as a share. */
const STANDARD = 1e-3;

/** "stripline-offset-two-dielectrics-pair" → "Stripline, offset, two dielectrics, pair" */
function spoken(structure: string): string {
  const words = structure.replace("cpwg", "coplanar over a plane").replaceAll("-", " ");
  return words.charAt(0).toUpperCase() + words.slice(1);
}

function solved(cases: readonly ReferenceSectionCase[]): CaseValues[] {
  return cases.flatMap((entry) => {
    const section = referenceSection(entry);
    if (!section) return [];
    const values = compareWithReference(entry, solveCrossSection(section, { accuracy: "standard" }));
    return [{ group: spoken(entry.structure), id: entry.id, values }];
  });
}

export function fieldSolver(): ValidationChapter[] {
  const about =
    "The field solver at its standard setting: every impedance, permittivity, matrix entry and crosstalk coefficient. Errors are shares of the value itself; of off-diagonal entries, of the geometric mean of their diagonals; of crosstalk, the plain difference.";
  return [
    {
      id: "field",
      title: "Field solver against finite elements",
      about,
      source:
        "Finite elements of degree 7 between two energy bounds, computed for this project apart from its code; half the gap between the bounds is at most 6·10⁻⁷.",
      groups: grouped(solved(finite), STANDARD),
    },
    {
      id: "exact",
      title: "Field solver against exact values",
      about,
      source:
        "Conformal maps and elliptic integrals (Cohn 1954 and 1955 among them) and a Schwarz–Christoffel solution for thick traces, exact to 10⁻⁹.",
      groups: grouped(solved(analytic), STANDARD),
    },
  ];
}

/** How far each published formula lies from the finite-element values, inside its range and outside. */
export function formulas(): ValidationChapter {
  const cases = finite.flatMap((entry): CaseValues[] => {
    const section = referenceSection(entry);
    if (!section) return [];
    const { Z0_ohm: single, Z_diff_ohm: differential } = entry.results;
    return closedForms(section).flatMap((form) => {
      const [engine, reference, quantity] =
        form.impedance.single === undefined
          ? [
              form.impedance.odd === undefined ? undefined : 2 * form.impedance.odd,
              differential,
              "Z differential",
            ]
          : [form.impedance.single, single, "Z₀"];
      if (engine === undefined || typeof reference !== "number") return [];
      const value = { quantity, unit: "Ω", reference, engine, error: Math.abs(engine / reference - 1) };
      return [
        { group: `${form.title}${form.inRange ? "" : ", outside its range"}`, id: entry.id, values: [value] },
      ];
    });
  });
  return {
    id: "formulas",
    title: "Published formulas against finite elements",
    about:
      "The impedance by each closed form on the same cross-sections, as a share of the finite-element value. Most formulas know neither mask nor mixed dielectrics; that is in these figures.",
    source:
      "The same finite-element values; the formulas' own sources stand beside each on the impedance page.",
    groups: grouped(cases, null).sort((a, b) => a.median - b.median),
  };
}
