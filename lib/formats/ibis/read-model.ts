import { modelTypes, type IbisModel, type IvTableName, type ModelType, type Triple } from "./document";
import { excerpt } from "./problem";
import { readRamp, readWaveform } from "./read-edges";
import { split, type BlockReader } from "./rows";

const LEVELS = new Set(["vinl", "vinh", "vmeas", "cref", "rref", "vref", "rref_diff", "cref_diff"]);
const TABLES: Readonly<Record<string, IvTableName>> = {
  pulldown: "pulldown",
  pullup: "pullup",
  "gnd clamp": "gndClamp",
  "power clamp": "powerClamp",
};
const REFERENCES: Readonly<Record<string, IvTableName>> = {
  "pullup reference": "pullup",
  "pulldown reference": "pulldown",
  "power clamp reference": "powerClamp",
  "gnd clamp reference": "gndClamp",
};
const TYPE_BY_WORD = new Map(Object.keys(modelTypes).map((type) => [type.toLowerCase(), type as ModelType]));
const THRESHOLD_WORDS = new Set(["reference_supply"]);

export function newModel(reader: BlockReader): IbisModel {
  const { rest, line } = reader.block;
  const name = rest.split(/\s+/)[0] ?? "";
  if (name === "")
    reader.refuse(line, "The model has no name, so no pin can use it. Write it beside the keyword.");
  const model: IbisModel = {
    name,
    line,
    type: "I/O",
    polarity: null,
    enable: null,
    levels: {},
    capacitance: null,
    splitCapacitance: [],
    voltageRange: null,
    temperatureRange: null,
    references: {},
    tables: {},
    terminator: {},
    ramp: null,
    waveforms: [],
    spec: {},
    thresholds: {},
    submodels: [],
  };
  let hasType = false;
  for (const { text, number } of reader.block.lines)
    hasType = readOwn(model, reader, text, number) || hasType;
  if (!hasType)
    reader.refuse(
      line,
      "Model_type is missing or not one of the standard's; it was taken as I/O. Write it below the name.",
    );
  return model;
}

/** One line below [Model]. @returns whether it gave the type */
function readOwn(model: IbisModel, reader: BlockReader, text: string, line: number): boolean {
  const [word = "", ...cells] = split(text);
  const name = word.toLowerCase();
  const value = (cells[0] ?? "").toLowerCase();
  if (name === "model_type") {
    const type = TYPE_BY_WORD.get(value);
    if (type) model.type = type;
    return type !== undefined;
  }
  if (name === "polarity") model.polarity = value === "inverting" ? "inverting" : "non-inverting";
  else if (name === "enable") model.enable = value === "active-low" ? "active-low" : "active-high";
  else if (name === "c_comp") model.capacitance = reader.triple(cells, line);
  else if (/^c_comp_(pullup|pulldown|power_clamp|gnd_clamp)$/.test(name)) {
    const part = reader.triple(cells, line);
    if (part) model.splitCapacitance.push(part);
  } else if (LEVELS.has(name)) {
    const level = reader.number(cells[0], line);
    if (level === null) reader.refuse(line, `${word} has no value. Write one, or remove the line.`);
    else model.levels[name] = { value: level, line };
  } else reader.warn(line, `'${excerpt(word)}' is not known here; the line was left out.`);
  return false;
}

/** Blocks inside a model. @returns false where the keyword is none of its own */
export function readModelBlock(model: IbisModel, reader: BlockReader): boolean {
  const { keyword, line, lines } = reader.block;
  const table = TABLES[keyword];
  const reference = REFERENCES[keyword];
  if (table) {
    const rows = reader.table(lines, "voltage");
    if (model.tables[table]) reader.warn(line, "The table is given twice; the first was kept.");
    else if (rows.length < 2) reader.refuse(line, "The table has fewer than two rows; it was left out.");
    else model.tables[table] = { line, rows };
  } else if (reference) assign(reader.ownTriple(), (value) => (model.references[reference] = value));
  else if (keyword === "voltage range") assign(reader.ownTriple(), (value) => (model.voltageRange = value));
  else if (keyword === "temperature range")
    assign(reader.ownTriple(), (value) => (model.temperatureRange = value));
  else if (keyword === "rgnd" || keyword === "rpower" || keyword === "rac" || keyword === "cac")
    assign(reader.ownTriple(), (value) => (model.terminator[keyword] = value));
  else if (keyword === "ramp") model.ramp = readRamp(reader);
  else if (keyword === "rising waveform" || keyword === "falling waveform") {
    const waveform = readWaveform(reader, keyword === "rising waveform" ? "rise" : "fall");
    if (waveform) model.waveforms.push(waveform);
  } else if (keyword === "model spec") readSpec(model, reader);
  else if (keyword === "receiver thresholds") readThresholds(model, reader);
  else if (keyword === "add submodel") readSubmodels(model, reader);
  else return false;
  return true;
}

function assign(value: Triple | null, take: (value: Triple) => void): void {
  if (value) take(value);
}

function readSpec(model: IbisModel, reader: BlockReader): void {
  for (const { text, number } of reader.block.lines) {
    const [name = "", ...cells] = split(text);
    const value = reader.triple(cells, number);
    if (value) model.spec[name.toLowerCase()] = value;
  }
}

function readThresholds(model: IbisModel, reader: BlockReader): void {
  for (const { text, number: line } of reader.block.lines) {
    const [word = "", cell] = split(text);
    const name = word.toLowerCase();
    if (THRESHOLD_WORDS.has(name)) continue;
    const value = reader.number(cell, line);
    if (value === null) reader.refuse(line, `${excerpt(word)} has no value. Write one, or remove the line.`);
    else model.thresholds[name] = { value, line };
  }
}

function readSubmodels(model: IbisModel, reader: BlockReader): void {
  for (const { text, number: line } of reader.block.lines) {
    const [name = "", mode = "All"] = text.split(/\s+/);
    model.submodels.push({ name, mode, line });
    reader.warn(
      line,
      `Submodel ${excerpt(name)} acts in mode ${excerpt(mode)}; it is known but not simulated. The model is used without it.`,
    );
  }
}
