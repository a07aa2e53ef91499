/**
 * Computes every reference case with the engine as it is and writes what the validation page shows:
 * dist/validation.json. Run at build, so the page can never be older than the engine it speaks of.
 */
import { mkdirSync, writeFileSync } from "node:fs";
import type { ValidationReport } from "../lib/schemas/validation";
import { engineVersion } from "../lib/si";
import { fieldSolver, formulas } from "./validation/cross-sections";
import { losses } from "./validation/losses";
import { measuredLines } from "./validation/measured-lines";
import { waveforms } from "./validation/waveforms";

const report: ValidationReport = {
  engine: engineVersion,
  chapters: [...fieldSolver(), losses(), waveforms(), measuredLines(), formulas()],
};
mkdirSync("dist", { recursive: true });
writeFileSync("dist/validation.json", JSON.stringify(report));
