export interface WidthPoint {
  /** [m] */
  width: number;
  /** [Ω] */
  impedance: number;
}

/** Impedance of a width by straight lines between the points; null outside them. */
export function impedanceOfWidth(table: readonly WidthPoint[], width: number): number | null {
  for (let i = 1; i < table.length; i++) {
    const [a, b] = [table[i - 1], table[i]];
    if (!a || !b || width < a.width * (1 - 1e-9) || width > b.width * (1 + 1e-9)) continue;
    const share = (width - a.width) / (b.width - a.width);
    return a.impedance + (b.impedance - a.impedance) * share;
  }
  return null;
}

/** The width that gives an impedance, likewise. */
export function widthOfImpedance(table: readonly WidthPoint[], ohms: number): number | null {
  for (let i = 1; i < table.length; i++) {
    const [a, b] = [table[i - 1], table[i]];
    if (!a || !b || ohms > a.impedance * (1 + 1e-9) || ohms < b.impedance * (1 - 1e-9)) continue;
    const share = a.impedance === b.impedance ? 0 : (a.impedance - ohms) / (a.impedance - b.impedance);
    return a.width + (b.width - a.width) * share;
  }
  return null;
}
