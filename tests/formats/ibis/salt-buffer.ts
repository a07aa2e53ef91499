import type { IvDriver, IvTable, Part } from "@/lib/si/network";
import { simulate } from "@/lib/si/lattice";

/** An invented buffer whose insides are known, and the file its maker would write. */
export const SUPPLY = 3.3;
const SWITCH: IvTable = [
  [-3.3, -0.09],
  [-1, -0.04],
  [-0.5, -0.021],
  [0, 0],
  [0.2, 0.0095],
  [0.4, 0.018],
  [0.8, 0.031],
  [1.2, 0.0395],
  [1.8, 0.0465],
  [2.5, 0.0502],
  [3.3, 0.052],
  [6.6, 0.058],
];
const CLAMP: IvTable = [
  [-3.3, -0.9],
  [-1.2, -0.12],
  [-0.9, -0.03],
  [-0.7, -0.004],
  [-0.5, -0.0002],
  [0, 0],
  [6.6, 0],
];

export const saltDriver: IvDriver = {
  name: "SALT",
  kind: "iv",
  node: "pad",
  vdd: SUPPLY,
  pullup: SWITCH,
  pulldown: SWITCH,
  pullupWeight: { kind: "pwl", time: [0, 0.3e-9, 0.6e-9, 0.9e-9, 1.1e-9], value: [0, 0, 0.4, 0.95, 1] },
  pulldownWeight: { kind: "pwl", time: [0, 0.1e-9, 0.3e-9, 0.5e-9], value: [1, 1, 0.3, 0] },
  capacitance: 3e-12,
};
export const saltClamp: Part = { name: "SALT clamp", kind: "iv", a: "pad", b: "0", points: CLAMP };

/** Pad voltage of the known buffer into `ohms` to `volts`, every 25 ps for 4 ns. */
function measured(ohms: number, volts: number): [number, number][] {
  const { time, voltage } = simulate(
    {
      rails: [{ name: "fixture", node: "f", volts }],
      drivers: [saltDriver],
      sections: [],
      parts: [saltClamp, { name: "R", kind: "R", a: "pad", b: "f", value: ohms }],
      probes: [{ name: "pad", node: "pad" }],
    },
    { until: 4.1e-9, accuracy: "reference" },
  );
  return Array.from({ length: 161 }, (_, i) => [i * 25e-12, sample(time, voltage.pad!, i * 25e-12)]);
}

export function sample(time: Float64Array, volts: Float64Array, at: number): number {
  let k = 0;
  while (k < time.length - 2 && time[k + 1]! <= at) k++;
  const span = time[k + 1]! - time[k]!;
  return volts[k]! + (span > 0 ? ((volts[k + 1]! - volts[k]!) * (at - time[k]!)) / span : 0);
}

const table = (points: readonly (readonly number[])[]) =>
  points.map(([x, y]) => `${x} ${y} NA NA`).join("\n");

/** The file; `rising` false leaves the waveforms out. */
export function saltFile({ waveforms = true } = {}): string {
  const rising = [0, SUPPLY].map(
    (volts) => `[Rising Waveform]\nR_fixture = 50\nV_fixture = ${volts}\n${table(measured(50, volts))}`,
  );
  return `[IBIS Ver] 5.0
[File Name] salt.ibs
[File Rev] 1
[Component] SALT_CHIP
[Manufacturer] Saltmarsh Sensing
[Package]
R_pkg 50m 40m 60m
L_pkg 3nH 2nH 4nH
C_pkg 0.5pF 0.4pF 0.6pF
[Pin] signal_name model_name R_pin L_pin C_pin
A1 TIDE SALT_BUF NA 2.5nH 0.3pF
A2 VDD POWER
A3 VSS GND
[Model] SALT_BUF
Model_type I/O
Polarity Non-Inverting
Vinl = 0.8V
Vinh = 2.0V
Vmeas = 1.5
C_comp 3.0pF 2.5pF 3.5pF
[Voltage Range] 3.3 3.0 3.6
[Model Spec]
Vinh 2.1 2.0 2.2
S_overshoot_high 4.1 NA NA
S_overshoot_low -0.5 NA NA
[Pulldown]
${table(SWITCH)}
[Pullup]
${table(SWITCH.map(([x, i]) => [x, -i]))}
[GND Clamp]
${table(CLAMP)}
[Ramp]
dV/dt_r 1.26/0.45n NA NA
dV/dt_f 1.26/0.45n NA NA
${waveforms ? rising.join("\n") : ""}
[End]
`;
}
