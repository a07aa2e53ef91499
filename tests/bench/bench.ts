import type { BenchSection } from "./section";
import { calibration } from "./sections/calibration";
import { check } from "./sections/check";
import { field } from "./sections/field";
import { lattice } from "./sections/lattice";
import { besideNgspice } from "./sections/ngspice";
import { spreadAndLoss } from "./sections/spread";

const sections: BenchSection[] = [calibration, field, lattice, besideNgspice, check, spreadAndLoss];

const print = (line: string) => process.stdout.write(`${line}\n`);
for (const section of sections) {
  print(`\n${section.title}`);
  for (const { what, value, unit, goal, note } of section.run()) {
    const text = value >= 100 ? value.toFixed(0) : value.toPrecision(3);
    print(
      `  ${what.padEnd(58)} ${text.padStart(9)} ${unit.padEnd(3)}${goal === undefined ? "" : ` goal ${goal}`}${note ? `  ${note}` : ""}`,
    );
  }
}
