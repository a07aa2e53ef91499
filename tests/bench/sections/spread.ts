import {
  impedanceSpread,
  lineLoss,
  solveCrossSection,
  type CrossSection,
  type SectionTolerances,
} from "@/lib/si";
import { microseconds, type BenchSection } from "../section";

const UM = 1e-6;

const single: CrossSection = {
  layers: [{ thickness: 100 * UM, er: 4.3, tanD: 0.018 }],
  upperPlane: false,
  traces: [{ x: 0, y: 100 * UM, thickness: 35 * UM, widthBottom: 180 * UM, widthTop: 162 * UM }],
  mask: { overLaminate: 20 * UM, overTrace: 20 * UM, side: 20 * UM, er: 3.5, tanD: 0.025 },
};
const pair: CrossSection = {
  ...single,
  traces: [-150, 150].map((x) => ({
    ...single.traces[0]!,
    x: x * UM,
    widthBottom: 140 * UM,
    widthTop: 122 * UM,
  })),
};
const tolerances: SectionTolerances = {
  width: { absolute: 15 * UM },
  slope: { absolute: 4 * UM },
  copper: { relative: 0.15 },
  layers: [{ thickness: { relative: 0.1 }, er: { relative: 0.05 } }],
  mask: { thickness: { relative: 0.3 }, er: { relative: 0.1 } },
};

const spread = (section: CrossSection, method: "direct" | "surrogate") => () =>
  void impedanceSpread(section, tolerances, { samples: 1000, seed: 1, method });
const frequencies = Float64Array.from({ length: 100 }, (_, i) => 1e6 * 10 ** ((i * 4.5) / 99));
const loss = (section: CrossSection) => () =>
  void lineLoss(section, solveCrossSection(section), { conductivity: 5.8e7 }, frequencies);

/** Figures of spread and loss, in ms; spread of 1,000 samples over seven tolerances of a masked line. */
export const spreadAndLoss: BenchSection = {
  title: "Spread and loss",
  run: () => [
    row("spread, masked microstrip, surrogate", spread(single, "surrogate"), 20),
    row("spread, masked microstrip, direct", spread(single, "direct"), 500),
    row("spread, masked pair, surrogate", spread(pair, "surrogate")),
    row("spread, masked pair, direct", spread(pair, "direct")),
    row("loss at 100 frequencies, masked microstrip", loss(single)),
    row("loss at 100 frequencies, masked pair, both modes", loss(pair)),
  ],
};

function row(what: string, work: () => void, goal?: number) {
  const value = microseconds(work) / 1000;
  return { what, value, unit: "ms", ...(goal !== undefined && { goal }) };
}
