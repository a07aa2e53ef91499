import { classifyCrossSection, type CrossSection } from "@/lib/si/cross-section";
import { EngineError } from "@/lib/si/errors";
import { solveCrossSection } from "@/lib/si/field";
import {
  COPPER_CONDUCTIVITY,
  kirschningJansenDispersion,
  kirschningJansenPairDispersion,
  lineLoss,
} from "@/lib/si/frequency";
import { buildCrossSection, isDielectric, type Stackup } from "@/lib/si/stackup";
import { attempt, type LineShape, type Outcome, traceShape } from "./engine-line";
import { remembered } from "./engine-memo";

/** How the loss of one line grows with frequency. */
export interface LossJob {
  kind: "line-loss";
  stackup: Stackup;
  index: number;
  shape: LineShape;
}

export interface LossFacts {
  /** of the single line, or the pair's odd mode [Hz], [dB/m] */
  points: { frequency: number; conductor: number; dielectric: number }[];
  /** of the copper [m] rms; null: not told, taken as smooth */
  roughness: number | null;
  /** some dielectric has no Df and is taken as lossless */
  losslessTaken: boolean;
  /** from where on the effective Dk lies `DISPERSED` above its static value [Hz]; null: not below the last frequency */
  dispersionFrom: number | null;
  /** false: between planes of one dielectric there is no dispersion of this kind */
  disperses: boolean;
}

const FROM = 10e6;
const TO = 20e9;
const POINTS = 34;
/** A change of the effective Dk that moves impedance and delay by one per cent. */
const DISPERSED = 0.02;

export function lossOf({ stackup, index, shape }: LossJob): Outcome<LossFacts> {
  return attempt(() => {
    const { section } = buildCrossSection(stackup, index, traceShape(shape));
    const roughness = stackup.layers[index]?.roughness ?? null;
    const at = dielectricsAt(stackup, index);
    return remembered(["loss", section, roughness, at], () => {
      const frequencies = Float64Array.from(
        { length: POINTS },
        (_, i) => FROM * (TO / FROM) ** (i / (POINTS - 1)),
      );
      const loss = lineLoss(
        section,
        solveCrossSection(section, { accuracy: "standard" }),
        {
          conductivity: COPPER_CONDUCTIVITY,
          ...(roughness ? { roughness: { model: "hammerstad", rms: roughness } } : {}),
        },
        frequencies,
        { dielectricsAt_Hz: at },
      );
      return {
        points: [...frequencies].map((frequency, i) => ({
          frequency,
          conductor: loss.conductor[i] ?? 0,
          dielectric: loss.dielectric[i] ?? 0,
        })),
        roughness,
        losslessTaken: [...section.layers, ...(section.mask ? [section.mask] : [])].some(
          ({ tanD }) => tanD === undefined,
        ),
        dispersionFrom: dispersionOf(section),
        disperses: classifyCrossSection(section).place === "outer",
      };
    });
  });
}

/** The frequency at which the nearest dielectric's Dk and Df hold [Hz]; 1 GHz where none tells. */
function dielectricsAt(stackup: Stackup, index: number): number {
  for (const step of [1, -1])
    for (let at = index + step; at >= 0 && at < stackup.layers.length; at += step) {
      const layer = stackup.layers[at];
      if (!layer || !isDielectric(layer)) break;
      if (layer.dkFrequency !== null && layer.dkFrequency > 0) return layer.dkFrequency;
    }
  return 1e9;
}

/** By the published dispersion of outer lines; between planes of one dielectric there is none. */
function dispersionOf(section: CrossSection): number | null {
  const { place, width, gap, below } = classifyCrossSection(section);
  if (place !== "outer") return null;
  const permittivity = (f: number): number =>
    gap === null
      ? kirschningJansenDispersion(width, below.height, below.er, f).effectivePermittivity
      : kirschningJansenPairDispersion(width, gap, below.height, below.er, f).effectivePermittivityOdd;
  try {
    const rest = permittivity(0);
    const dispersed = (f: number) => permittivity(f) / rest - 1 >= DISPERSED;
    if (!dispersed(TO)) return null;
    let [low, high] = [FROM, TO];
    while (high / low > 1.01) {
      const middle = Math.sqrt(low * high);
      if (dispersed(middle)) high = middle;
      else low = middle;
    }
    return high;
  } catch (error) {
    if (error instanceof EngineError) return null; // outside what the formula describes
    throw error;
  }
}
