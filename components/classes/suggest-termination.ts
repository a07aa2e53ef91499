import type { StoredModel } from "@/lib/schemas/model";
import { netClassDoc, type NetClassDoc, type TerminationDoc } from "@/lib/schemas/net-class";
import { formatSi, nearestESeries, type Quantity, toSi } from "@/lib/si/units";

export type Scheme = TerminationDoc["scheme"];

export interface Suggestion {
  /** The values to take, where there are any. */
  values: Partial<Pick<TerminationDoc, "resistance" | "resistanceLow">> | null;
  /** How it comes about, or why there is none. */
  words: string;
}

type Subject = Pick<NetClassDoc, "targetImpedance" | "driverModelLineageId">;

/**
 * The standard (E24) value that a scheme asks for: series Z0 − typical driver resistance; parallel, RC and across a
 * pair Z0; Thevenin twice Z0 to each rail, which is Z0 in parallel and rests in the middle.
 */
export function suggestTermination(
  scheme: Scheme,
  subject: Subject,
  models: readonly StoredModel[],
): Suggestion | null {
  if (scheme === "none") return null;
  if (!subject.targetImpedance)
    return { values: null, words: "Give a target impedance to see the value that fits it." };
  const line = toSi(subject.targetImpedance, "resistance");
  const z = formatSi(line, "resistance", { digits: 3 });
  if (scheme === "series") {
    const model = models.find(({ lineageId }) => lineageId === subject.driverModelLineageId);
    if (!model?.driver)
      return { values: null, words: "Choose a driver model for this class to see the value that fits it." };
    const driver = toSi(model.driver.resistance.typical, "resistance");
    const r = formatSi(driver, "resistance", { digits: 3 });
    if (driver >= line)
      return {
        values: null,
        words: `The driver’s ${r} is not below the line’s ${z}: no series resistor helps.`,
      };
    const standard = ohms(line - driver);
    const wanted = formatSi(line - driver, "resistance", { digits: 3 });
    return {
      values: { resistance: standard },
      words: `${z} − ${r} typical driver = ${wanted}; nearest E24: ${standard.value} Ω`,
    };
  }
  if (scheme === "thevenin") {
    const each = ohms(2 * line);
    return {
      values: { resistance: each, resistanceLow: each },
      words: `Twice ${z} to each rail is ${z} in parallel; nearest E24: ${each.value} Ω`,
    };
  }
  const standard = ohms(line);
  return { values: { resistance: standard }, words: `Ends the ${z} line; nearest E24: ${standard.value} Ω` };
}

/** A termination of another scheme: the fields that do not apply to it are empty, the others keep their values. */
export function withScheme(present: TerminationDoc, scheme: Scheme): TerminationDoc {
  const has = fieldsOf(scheme);
  return {
    scheme,
    resistance: has.includes("resistance") ? present.resistance : null,
    resistanceLow: has.includes("resistanceLow") ? present.resistanceLow : null,
    capacitance: has.includes("capacitance") ? present.capacitance : null,
    voltage: has.includes("voltage") ? present.voltage : null,
  };
}

export function fieldsOf(scheme: Scheme): readonly Exclude<keyof TerminationDoc, "scheme">[] {
  switch (scheme) {
    case "none":
      return [];
    case "series":
    case "differential":
      return ["resistance"];
    case "parallel":
      return ["resistance", "voltage"];
    case "thevenin":
      return ["resistance", "resistanceLow"];
    case "rc":
      return ["resistance", "capacitance"];
  }
}

export const emptyTermination: TerminationDoc = netClassDoc.shape.termination.parse(undefined);

function ohms(wanted: number): Quantity {
  const { value } = nearestESeries(wanted, "E24");
  return { value: String(Number(value.toPrecision(2))), unit: "Ω" };
}
