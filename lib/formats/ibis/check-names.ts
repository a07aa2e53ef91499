import type { IbisDocument } from "./document";
import { excerpt, type ProblemList } from "./problem";

/** Names that point at something: of pins, selectors and submodels; and names given twice. */
export function checkNames(document: IbisDocument, problems: ProblemList): void {
  const models = new Map<string, number>();
  for (const { name, line } of document.models) {
    const first = models.get(name);
    if (first === undefined) models.set(name, line);
    else
      problems.add(
        "error",
        line,
        "[Model]",
        `Model ${excerpt(name)} is given a second time (first in line ${first}). Rename one; the first is used.`,
      );
  }
  const known = new Set([...models.keys(), ...document.selectors.map(({ name }) => name)]);
  const reserved = new Set(["POWER", "GND", "NC", "CIRCUITCALL", "NA"]);
  for (const { name, choices } of document.selectors)
    for (const { model, line } of choices)
      if (!models.has(model))
        problems.add(
          "error",
          line,
          "[Model Selector]",
          `${excerpt(name)} offers model ${excerpt(model)}, which is not in the file. Add it, or remove the line.`,
        );
  const told = new Set<string>();
  for (const component of document.components)
    for (const { pin, model, line } of component.pins) {
      if (known.has(model) || reserved.has(model.toUpperCase()) || told.has(model)) continue;
      told.add(model);
      problems.add(
        "error",
        line,
        "[Pin]",
        `Pin ${excerpt(pin)} uses model ${excerpt(model)}, which is not in the file. Add it, or write NC.`,
      );
    }
  const submodels = new Set(document.submodels.map(({ name }) => name));
  for (const model of document.models)
    for (const { name, line } of model.submodels)
      if (!submodels.has(name))
        problems.add(
          "error",
          line,
          "[Add Submodel]",
          `Submodel ${excerpt(name)} is not in the file. Add it, or remove the line.`,
        );
}
