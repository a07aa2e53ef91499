import {
  kirschningJansenDispersion,
  lineLoss,
  solveCrossSection,
  type CrossSection,
  type TwoPortChain,
} from "../../lib/si";

/** What the measured board's description states [m]; the rest is fitted. */
export const BOARD = { height: 1.5e-3, copper: 50e-6, width: 3e-3, conductivity: 5.8e7 } as const;
const LIGHT = 299_792_458;
/** Frequencies at which a line is computed; between them it is drawn by straight lines over log frequency. */
const KNOTS = Float64Array.from({ length: 49 }, (_, i) => 1e6 * 10 ** (i / 12));

export interface Dielectric {
  /** at 1 GHz */
  er: number;
  tanD: number;
}

/** Attenuation [Np/m], phase [rad/m] and impedance [Ω] of a line of the board. */
export interface LineValues {
  attenuation: number;
  phase: number;
  impedance: number;
  reactance: number;
}

/**
 * A microstrip of the board over frequency: cross-section by field, loss by skin effect and wideband Debye dielectric,
 * and the growth of its permittivity with frequency by Kirschning and Jansen's dispersion.
 */
export function boardLine(width: number, { er, tanD }: Dielectric): (frequency: number) => LineValues {
  const section: CrossSection = {
    layers: [{ thickness: BOARD.height, er, tanD }],
    upperPlane: false,
    traces: [{ x: 0, y: BOARD.height, thickness: BOARD.copper, widthBottom: width, widthTop: width }],
  };
  const params = solveCrossSection(section);
  const loss = lineLoss(section, params, { conductivity: BOARD.conductivity }, KNOTS);
  const still = kirschningJansenDispersion(width, BOARD.height, er, 0).effectivePermittivity;
  const grown = Array.from(KNOTS, (f) => {
    const { effectivePermittivity } = kirschningJansenDispersion(width, BOARD.height, er, f);
    return Math.sqrt(effectivePermittivity / still);
  });
  return (frequency) => {
    const place = Math.min(KNOTS.length - 1.000001, Math.max(0, 12 * Math.log10(frequency / 1e6)));
    const k = Math.floor(place);
    const u = place - k;
    const mix = (values: ArrayLike<number>) => values[k]! * (1 - u) + values[k + 1]! * u;
    const index = Math.sqrt(mix(loss.effectivePermittivity)) * mix(grown);
    // Below the first knot nothing but the resistance is left of the loss.
    return {
      attenuation: mix(loss.attenuation) * Math.min(1, frequency / 1e6),
      phase: (2 * Math.PI * frequency * index) / LIGHT,
      impedance: mix(loss.impedance),
      reactance: mix(loss.reactance),
    };
  };
}

/** Chain matrices of `length` [m] of a line at every frequency. */
export function lineChain(
  line: (frequency: number) => LineValues,
  length: number,
  frequencies: Float64Array,
): TwoPortChain {
  const values = new Float64Array(8 * frequencies.length);
  frequencies.forEach((f, k) => {
    const { attenuation, phase, impedance: r, reactance: x } = line(f);
    const [a, b] = [attenuation * length, phase * length];
    const cosh = [Math.cosh(a) * Math.cos(b), Math.sinh(a) * Math.sin(b)] as const;
    const sinh = [Math.sinh(a) * Math.cos(b), Math.cosh(a) * Math.sin(b)] as const;
    const size = r * r + x * x;
    values.set(
      [
        ...cosh,
        r * sinh[0] - x * sinh[1],
        r * sinh[1] + x * sinh[0],
        (sinh[0] * r + sinh[1] * x) / size,
        (sinh[1] * r - sinh[0] * x) / size,
        ...cosh,
      ],
      8 * k,
    );
  });
  return { frequencies, values };
}
