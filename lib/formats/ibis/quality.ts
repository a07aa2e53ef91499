import { doubleCountedClamps } from "./quality-clamps";
import { endPoints, rampSwing, weightsInRange } from "./quality-edges";
import { monotonicTables, tableRange } from "./quality-tables";
import type { IbisDocument, IbisModel } from "./document";
import { isEcl, modelTypes } from "./document";

export type IbisQualityCheck =
  | "missing value"
  | "missing corner"
  | "order of corners"
  | "falling table"
  | "short table"
  | "end points"
  | "ramp"
  | "switching weights"
  | "double-counted clamp"
  | "not simulated";

/** error: the model cannot be simulated so; warning: its results are doubtful; notice: worth knowing. */
export interface IbisFinding {
  check: IbisQualityCheck;
  severity: "error" | "warning" | "notice";
  model: string;
  line: number;
  /** what, how much, and the way out, in sentences */
  reason: string;
}

/** How far every model of a file can be trusted, worst first within each model. */
export function ibisQuality(document: IbisDocument): IbisFinding[] {
  const rank = { error: 0, warning: 1, notice: 2 };
  return document.models.flatMap((model) =>
    modelQuality(model).toSorted((a, b) => rank[a.severity] - rank[b.severity] || a.line - b.line),
  );
}

function modelQuality(model: IbisModel): IbisFinding[] {
  return [
    ...missingValues(model),
    ...missingCorners(model),
    ...orderOfCorners(model),
    ...monotonicTables(model),
    ...tableRange(model),
    ...doubleCountedClamps(model),
    ...endPoints(model),
    ...rampSwing(model),
    ...weightsInRange(model),
    ...model.submodels.map(({ name, line }): IbisFinding => ({
      check: "not simulated",
      severity: "warning",
      model: model.name,
      line,
      reason: `Submodel ${name} changes this pin's tables and is not simulated. Judge such nets by hand.`,
    })),
  ];
}

function missingValues(model: IbisModel): IbisFinding[] {
  const found: IbisFinding[] = [];
  const miss = (severity: IbisFinding["severity"], what: string, effect: string) =>
    found.push({
      check: "missing value",
      severity,
      model: model.name,
      line: model.line,
      reason: `${what} ${effect}`,
    });
  const { drives, receives } = modelTypes[model.type];
  const isSeries = model.type.startsWith("Series");
  if (model.type.endsWith("_diff"))
    miss(
      "error",
      "The model is described in another language only.",
      "It is not simulated; choose one with tables.",
    );
  if (!model.capacitance && model.splitCapacitance.length === 0 && !isSeries)
    miss(
      "warning",
      "C_comp is missing;",
      "the die counts as free of capacitance. Add it from the data sheet.",
    );
  if (!model.voltageRange && !(model.references.pullup && model.references.powerClamp) && !isSeries)
    miss("error", "[Voltage Range] is missing,", "so the supply is not known. Add it.");
  if (drives && !model.type.endsWith("_diff")) {
    const pullsUp = !/open_(drain|sink)/i.test(model.type);
    const pullsDown = !/open_source/i.test(model.type);
    if (pullsUp && !model.tables.pullup)
      miss("error", "[Pullup] is missing,", "so the pin cannot drive high. Add it.");
    if (pullsDown && !model.tables.pulldown)
      miss("error", "[Pulldown] is missing,", "so the pin cannot drive low. Add it.");
    if (!model.ramp && model.waveforms.length === 0)
      miss("error", "There is neither [Ramp] nor a waveform,", "so the edge's speed is not known. Add one.");
    else if (!model.ramp) miss("notice", "[Ramp] is missing;", "the waveforms stand in for it.");
    else if (model.waveforms.length === 0)
      miss("notice", "There are no waveforms;", "the edge's shape is a smooth step as fast as the ramp.");
    if (!model.levels.vmeas && !model.spec.vmeas)
      miss(
        "notice",
        "Vmeas is missing;",
        "timing of this driver has no reference level. Add it from the data sheet.",
      );
  }
  if (receives && !isEcl(model.type) && model.type !== "Terminator") {
    const has = (name: string) => model.levels[name] ?? model.spec[name] ?? model.thresholds[`${name}_dc`];
    if (!has("vinl") || !has("vinh"))
      miss(
        "warning",
        "Vinl or Vinh is missing;",
        "rules on levels have no data here. Add both from the data sheet.",
      );
  }
  return found;
}

function missingCorners(model: IbisModel): IbisFinding[] {
  const lacking: string[] = [];
  const triple = (name: string, value: { min: unknown; max: unknown } | null | undefined) => {
    if (value && (value.min === null || value.max === null)) lacking.push(name);
  };
  triple("C_comp", model.capacitance);
  triple("[Voltage Range]", model.voltageRange);
  for (const [name, data] of Object.entries(model.tables))
    if (
      data.rows.filter((row) => row.min !== null).length < 2 ||
      data.rows.filter((row) => row.max !== null).length < 2
    )
      lacking.push(`the ${TABLE_WORDS[name] ?? name} table`);
  if (model.ramp && [model.ramp.rise, model.ramp.fall].some(({ min, max }) => !min || !max))
    lacking.push("[Ramp]");
  if (
    model.waveforms.some(
      ({ rows }) => rows.every((row) => row.min === null) || rows.every((row) => row.max === null),
    )
  )
    lacking.push("a waveform");
  if (lacking.length === 0) return [];
  return [
    {
      check: "missing corner",
      severity: "warning",
      model: model.name,
      line: model.line,
      reason: `Minimum or maximum is NA for ${lacking.join(", ")}. The typical values stand in, so slow and fast are nearer to typical than the part is.`,
    },
  ];
}

const TABLE_WORDS: Readonly<Record<string, string>> = {
  pullup: "pullup",
  pulldown: "pulldown",
  gndClamp: "ground clamp",
  powerClamp: "power clamp",
};

function orderOfCorners(model: IbisModel): IbisFinding[] {
  const found: IbisFinding[] = [];
  const ordered = { C_comp: model.capacitance, "[Voltage Range]": model.voltageRange };
  for (const [name, value] of Object.entries(ordered)) {
    if (!value || value.typ === null) continue;
    const { min, typ, max } = value;
    if ((min === null || min <= typ) && (max === null || typ <= max)) continue;
    found.push({
      check: "order of corners",
      severity: "warning",
      model: model.name,
      line: value.line,
      reason: `The minimum of ${name} is above its typical value, or its maximum below. It goes by size; put the columns in order.`,
    });
  }
  return found;
}
