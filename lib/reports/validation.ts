import "server-only";
import { readFile } from "node:fs/promises";
import path from "node:path";
import { type ValidationReport, validationReportSchema } from "@/lib/schemas/validation";

/** Written by scripts/make-validation.ts at build. */
const FILE = "dist/validation.json";

/** What the last build measured; null where no build has (a development server in a new checkout). */
export async function readValidation(): Promise<ValidationReport | null> {
  const text = await readFile(path.resolve(/* turbopackIgnore: true */ process.cwd(), FILE), "utf8").catch(
    () => null,
  );
  return text === null ? null : validationReportSchema.parse(JSON.parse(text));
}
