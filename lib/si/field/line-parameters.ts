import type { LineParameters, Mode } from "../cross-section";
import { EPS0, LIGHT_SPEED, MU0 } from "../physical-constants";

/** C and C0 [F/m] of a line, full matrices. */
export interface Capacitances {
  filled: number[][];
  air: number[][];
}

type Parameters = Omit<LineParameters, "unknowns" | "errorEstimate">;

/** Z = 1/(c √(C C0)), εeff = C/C0. */
export function modeFrom(capacitance: number, air: number): Mode {
  const effectivePermittivity = capacitance / air;
  return {
    impedance: 1 / (LIGHT_SPEED * Math.sqrt(capacitance * air)),
    effectivePermittivity,
    delay: Math.sqrt(effectivePermittivity) / LIGHT_SPEED,
  };
}

/**
 * Impedances, modes and coupling from the capacitance matrices; L = μ0 ε0 C0⁻¹.
 * Unequal pairs: modes from L C, Zc = C⁻¹ (C L)^½, differential = Zc11 + Zc22 − 2 Zc12, common = 1/ΣYc. The impedance of a
 * mode with voltages v is vᵀv/(vᵀ Yc v): the wave of that mode carries the power vᵀv/Z. For equal lines this is Zodd, Zeven.
 */
export function lineParameters(c: Capacitances, mirrored: boolean): Parameters {
  if (c.filled.length === 1) {
    const [[filled = 0] = []] = c.filled;
    const [[air = 0] = []] = c.air;
    return {
      capacitance: c.filled,
      airCapacitance: c.air,
      inductance: [[(MU0 * EPS0) / air]],
      single: modeFrom(filled, air),
    };
  }
  const [c11, c12, c22] = entries(c.filled);
  const [a11, a12, a22] = entries(c.air);
  const determinant = a11 * a22 - a12 * a12;
  const l11 = (MU0 * EPS0 * a22) / determinant;
  const l12 = (-MU0 * EPS0 * a12) / determinant;
  const l22 = (MU0 * EPS0 * a11) / determinant;
  const inductance = [
    [l11, l12],
    [l12, l22],
  ];
  const backwardCrosstalk = (-c12 / Math.sqrt(c11 * c22) + l12 / Math.sqrt(l11 * l22)) / 4;
  const shared = { capacitance: c.filled, airCapacitance: c.air, inductance };
  if (mirrored) {
    const odd = modeFrom((c11 + c22) / 2 - c12, (a11 + a22) / 2 - a12);
    const even = modeFrom((c11 + c22) / 2 + c12, (a11 + a22) / 2 + a12);
    const differential = 2 * odd.impedance;
    const common = even.impedance / 2;
    return { ...shared, pair: { odd, even, modes: [odd, even], differential, common, backwardCrosstalk } };
  }
  return { ...shared, pair: { ...unequal(c11, c12, c22, l11, l12, l22), backwardCrosstalk } };
}

function entries(m: number[][]): [number, number, number] {
  return [m[0]?.[0] ?? 0, m[0]?.[1] ?? 0, m[1]?.[1] ?? 0];
}

function unequal(c11: number, c12: number, c22: number, l11: number, l12: number, l22: number) {
  // M = C L; √M = (M + √det M)/√(tr M + 2 √det M)
  const m11 = c11 * l11 + c12 * l12;
  const m12 = c11 * l12 + c12 * l22;
  const m21 = c12 * l11 + c22 * l12;
  const m22 = c12 * l12 + c22 * l22;
  const root = Math.sqrt(m11 * m22 - m12 * m21);
  const scale = 1 / Math.sqrt(m11 + m22 + 2 * root);
  const s11 = (m11 + root) * scale;
  const s12 = m12 * scale;
  const s21 = m21 * scale;
  const s22 = (m22 + root) * scale;
  const d = c11 * c22 - c12 * c12;
  const z11 = (c22 * s11 - c12 * s21) / d;
  const z12 = (c22 * s12 - c12 * s22) / d;
  const z22 = (c11 * s22 - c12 * s12) / d;
  const dz = z11 * z22 - z12 * z12;
  const y11 = z22 / dz;
  const y12 = -z12 / dz;
  const y22 = z11 / dz;
  // voltages of a mode: eigenvectors of L C = Mᵀ
  const half = (m11 + m22) / 2;
  const spread = Math.sqrt(Math.max(0, ((m11 - m22) / 2) * ((m11 - m22) / 2) + m12 * m21));
  const mode = (eigenvalue: number, sign: number): Mode => {
    let v1 = m21;
    let v2 = eigenvalue - m11;
    if (Math.abs(v1) + Math.abs(v2) < 1e-7 * half) {
      v1 = eigenvalue - m22;
      v2 = m12;
    }
    if (Math.abs(v1) + Math.abs(v2) < 1e-7 * half) {
      // one velocity: any voltages are a mode; take those that divide evenly
      v1 = 1;
      v2 = sign * Math.sqrt(y11 / y22);
    }
    const effectivePermittivity = eigenvalue * LIGHT_SPEED * LIGHT_SPEED;
    return {
      impedance: (v1 * v1 + v2 * v2) / (y11 * v1 * v1 + 2 * y12 * v1 * v2 + y22 * v2 * v2),
      effectivePermittivity,
      delay: Math.sqrt(eigenvalue),
    };
  };
  return {
    modes: [mode(half - spread, -1), mode(half + spread, 1)],
    differential: z11 + z22 - 2 * z12,
    common: 1 / (y11 + 2 * y12 + y22),
  };
}
