import type { Part } from "@/lib/si/network";
import { byLoad, byProcess, dieCapacitance, type IbisCorner } from "./corners";
import { clampParts } from "./driver";
import type { IbisComponent, IbisModel } from "./document";
import { cornerTables } from "./iv-tables";
import { DomainError } from "@/lib/si/errors";

export interface IbisReceiver {
  /** die capacitance, clamps and terminators at the node */
  parts: Part[];
  /** [V] */
  supply: number;
  notes: string[];
}

/**
 * What a model that listens (or one whose driver is off) loads its node with.
 * @throws DomainError where the supply is needed and not in the file
 */
export function ibisReceiver(
  model: IbisModel,
  corner: IbisCorner,
  { name, node }: { name: string; node: string },
): IbisReceiver {
  if (model.type === "Series" || model.type === "Series_switch")
    throw new DomainError(
      `Model ${model.name} is of type ${model.type}: it lies between two pins and is not simulated. Draw it as a part of the net.`,
      "type",
    );
  const notes: string[] = [];
  const tables = cornerTables(model, corner);
  const capacitance = dieCapacitance(model, corner);
  if (capacitance === null)
    notes.push(`Model ${model.name} has no C_comp; the die counts as free of capacitance.`);
  for (const { name: submodel, mode } of model.submodels)
    notes.push(`Submodel ${submodel} (${mode}) is not simulated.`);
  const parts: Part[] = [];
  if (capacitance) parts.push({ name: `${name} die`, kind: "C", a: node, b: "0", value: capacitance });
  parts.push(...clampParts(tables, name, node), ...terminators(model, corner, tables.supply, name, node));
  return { parts, supply: tables.supply, notes };
}

function terminators(
  model: IbisModel,
  corner: IbisCorner,
  supply: number,
  name: string,
  node: string,
): Part[] {
  const { rgnd, rpower, rac, cac } = model.terminator;
  const toGround = byProcess(rgnd, corner);
  const toPower = byProcess(rpower, corner);
  const series = byProcess(rac, corner);
  const across = byLoad(cac, corner);
  const parts: Part[] = [];
  if (toGround !== null && toGround > 0)
    parts.push({ name: `${name} Rgnd`, kind: "R", a: node, b: "0", value: toGround });
  if (toPower !== null && toPower > 0)
    // A resistor to the supply, as a straight table in volts of the node: no rail has to be added.
    parts.push({
      name: `${name} Rpower`,
      kind: "iv",
      a: node,
      b: "0",
      points: [
        [supply - 1, -1 / toPower],
        [supply + 1, 1 / toPower],
      ],
    });
  if (series !== null && across !== null && across > 0) {
    const middle = `${node} ${name} Rac`;
    parts.push({ name: `${name} Rac`, kind: "R", a: node, b: middle, value: Math.max(0, series) });
    parts.push({ name: `${name} Cac`, kind: "C", a: middle, b: "0", value: across });
  }
  return parts;
}

/** The package between a pin and its die [Ω, H, F]: the pin's own values, else the component's. Null: not known. */
export function ibisPackage(
  component: IbisComponent,
  pin: string,
  corner: IbisCorner,
): { resistance: number | null; inductance: number | null; capacitance: number | null } {
  const own = component.pins.find((entry) => entry.pin === pin);
  const of = (field: "resistance" | "inductance" | "capacitance") =>
    own?.[field] ?? byLoad(component.package[field], corner);
  return { resistance: of("resistance"), inductance: of("inductance"), capacitance: of("capacitance") };
}
