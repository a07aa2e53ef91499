/**
 * Fits Dk, Df and launch on two measured straight lines, simulates the open and the stepped one with them, and writes
 * how near they come: tests/reference/measured-lines.json, which the validation page shows. Needs the measurements.
 */
import { writeFileSync } from "node:fs";
import { measuredLinesFigures } from "./measured-lines/figures";
import { measurements } from "./measured-lines/measurement";

const measured = measurements();
if (measured) {
  const figures = measuredLinesFigures(measured);
  const short = (_key: string, value: unknown) =>
    typeof value === "number" ? Number(value.toPrecision(4)) : value;
  writeFileSync("tests/reference/measured-lines.json", `${JSON.stringify(figures, short, 2)}\n`);
  for (const { board, wave, method, rms } of figures.steps)
    console.log(`${board}, ${wave}, ${method}: ${(100 * rms).toFixed(2)} % rms`);
} else
  console.log(
    "The measured lines are not beside this repository (shared/reference/touchstone); nothing was written.",
  );
