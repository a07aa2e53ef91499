import { solveCrossSection, widthForImpedance, type CrossSection } from "@/lib/si";
import { coveredSection, innerSection, outerSection } from "../../support/sections";
import { microseconds, type BenchSection } from "../section";

const single = outerSection({ w: 0.18, wTop: 0.1625, h: 0.1, t: 0.035, er: 4.3, mask: 0.025 });
const pair = outerSection({ w: 0.15, wTop: 0.1325, s: 0.2, h: 0.1, t: 0.035, er: 4.3, mask: 0.025 });
const inner = innerSection({ w: 0.1, wTop: 0.09, t: 0.018, h1: 0.12, h2: 0.2, er: 4.2, erUpper: 3.9 });
const covered = coveredSection({ w: 0.2, h: 0.15, t: 0.018, er: 4.2, cover: 0.08, coverEr: 3.5 });
const coplanar = outerSection({ w: 0.2, wTop: 0.18, h: 0.2, t: 0.035, er: 4.2, slot: 0.15, mask: 0.02 });

const solveTime = (
  what: string,
  section: CrossSection,
  goal?: number,
  accuracy: "live" | "standard" | "reference" = "standard",
) => ({
  what: `${what}, ${accuracy}`,
  value: microseconds(() => solveCrossSection(section, { accuracy })),
  unit: "µs",
  ...(goal === undefined ? {} : { goal }),
  note: `${solveCrossSection(section, { accuracy }).unknowns} unknowns`,
});

const widthTime = (what: string, section: CrossSection, kind: "single" | "differential", goal: number) => {
  const find = () =>
    widthForImpedance({
      section,
      target: { kind, ohms: kind === "single" ? 50 : 90 },
      vary: "width",
      min: 0.05e-3,
      max: 1e-3,
      grid: 1e-6,
      method: "field",
    });
  return { what, value: microseconds(find), unit: "µs", goal, note: `${find().solves} solves` };
};

/** Field solutions of cross-sections, one core, warm (engine.md §1). */
export const field: BenchSection = {
  title: "Field solver",
  run: () => [
    solveTime("single masked microstrip", single, 500),
    solveTime("single masked microstrip", single, undefined, "live"),
    solveTime("single masked microstrip", single, undefined, "reference"),
    solveTime("masked microstrip pair, both modes", pair, 2000),
    solveTime("masked microstrip pair, both modes", pair, undefined, "live"),
    solveTime("stripline in two dielectrics", inner),
    solveTime("embedded microstrip", covered),
    solveTime("masked coplanar", coplanar),
    widthTime("width for 50 Ω, masked, 1 µm grid", single, "single", 2000),
    widthTime("width for 90 Ω differential, masked pair, 1 µm grid", pair, "differential", 6000),
  ],
};
