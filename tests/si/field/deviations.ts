import { LIGHT_SPEED } from "@/lib/si/physical-constants";
import type { LineParameters, Mode } from "@/lib/si/cross-section";
import type { ReferenceCase } from "./reference-sections";

export interface Deviation {
  quantity: string;
  /** relative; off-diagonals over √(C11 C22), crosstalk absolute */
  value: number;
}

/** Deviation of every value that a reference case states. */
export function deviations(line: LineParameters, item: ReferenceCase): Deviation[] {
  const found: Deviation[] = [];
  const r = item.results;
  const add = (quantity: string, got: number | undefined, wanted: unknown) => {
    if (typeof wanted === "number") found.push({ quantity, value: (got ?? Number.NaN) / wanted - 1 });
  };
  const matrix = (quantity: string, got: number[][], wanted: unknown) => {
    if (!Array.isArray(wanted)) return;
    const rows = wanted as number[][];
    const size = (i: number, j: number) => Math.sqrt(rows[i]![i]! * rows[j]![j]!);
    rows.forEach((row, i) =>
      row.forEach((value, j) => {
        if (j >= i)
          found.push({ quantity: `${quantity}${i + 1}${j + 1}`, value: (got[i]![j]! - value) / size(i, j) });
      }),
    );
  };
  add("C", line.capacitance[0]?.[0], r.C_F_per_m);
  add("C0", line.airCapacitance[0]?.[0], r.C0_F_per_m);
  add("L", line.inductance[0]?.[0], r.L_H_per_m);
  add("Z0", line.single?.impedance, r.Z0_ohm);
  add("eps", line.single?.effectivePermittivity, r.eps_eff);
  add("delay", line.single && line.single.delay * 1e9, r.delay_ps_per_mm);
  matrix("C", line.capacitance, r.C_matrix_F_per_m);
  matrix("C0", line.airCapacitance, r.C0_matrix_F_per_m);
  matrix("L", line.inductance, r.L_matrix_H_per_m);
  for (const name of ["odd", "even"] as const) {
    const mode = line.pair?.[name];
    if (r[`Z_${name}_ohm`] === undefined) continue;
    add(`Z_${name}`, mode?.impedance, r[`Z_${name}_ohm`]);
    add(`eps_${name}`, mode?.effectivePermittivity, r[`eps_eff_${name}`]);
  }
  add("Zdiff", line.pair?.differential, r.Z_diff_ohm);
  add("Zcomm", line.pair?.common, r.Z_comm_ohm);
  if (typeof r.Kb_backward === "number" && line.pair) {
    found.push({ quantity: "Kb", value: line.pair.backwardCrosstalk - r.Kb_backward });
  }
  if (Array.isArray(r.eps_eff_modes) && line.pair) {
    const sorted = (list: number[]) => [...list].sort((a, b) => a - b);
    const wanted = sorted(r.eps_eff_modes as number[]);
    sorted(line.pair.modes.map((mode: Mode) => mode.effectivePermittivity)).forEach((value, i) =>
      add(`eps_mode${i + 1}`, value, wanted[i]),
    );
    sorted(line.pair.modes.map((mode) => (mode.delay * LIGHT_SPEED) ** 2)).forEach((value, i) =>
      add(`delay_mode${i + 1}`, value, wanted[i]),
    );
  }
  return found;
}
