import type { IbisRamp, IbisWaveform, Slope, Triple } from "./document";
import { excerpt } from "./problem";
import { split, type BlockReader } from "./rows";
import type { IbisLine } from "./scan";

const DEFAULT_LOAD = 50;
const columns = ["typ", "min", "max"] as const;
const FIXTURE = new Set([
  "r_fixture",
  "v_fixture",
  "v_fixture_min",
  "v_fixture_max",
  "c_fixture",
  "l_fixture",
  "r_dut",
  "l_dut",
  "c_dut",
]);

export function readRamp(reader: BlockReader): IbisRamp {
  const none = () => ({ typ: null, min: null, max: null });
  const ramp: IbisRamp = { line: reader.block.line, rise: none(), fall: none(), load: DEFAULT_LOAD };
  for (const { text, number: line } of reader.block.lines) {
    const [word = "", ...cells] = split(text.replace(/\s*\/\s*/g, "/"));
    const name = word.toLowerCase();
    if (name === "r_load") {
      const load = reader.number(cells[0], line);
      if (load !== null && load > 0) ramp.load = load;
      else reader.refuse(line, `The load must be a resistance above zero; ${DEFAULT_LOAD} Ω was taken.`);
    } else if (name === "dv/dt_r" || name === "dv/dt_f") {
      const edge = name === "dv/dt_r" ? ramp.rise : ramp.fall;
      columns.forEach((column, i) => (edge[column] = readSlope(reader, cells[i], line)));
      if (!edge.typ) reader.refuse(line, "The typical slope is missing. Write it as 1.65/0.91n.");
    } else reader.warn(line, `'${excerpt(word)}' is not known here; the line was left out.`);
  }
  return ramp;
}

/** "1.65/0.91n" */
function readSlope(reader: BlockReader, cell: string | undefined, line: number): Slope | null {
  if (cell === undefined || /^na$/i.test(cell)) return null;
  const [swing, time] = cell.split("/");
  const volts = reader.number(swing, line);
  const seconds = reader.number(time, line);
  if (volts !== null && seconds !== null && volts > 0 && seconds > 0) return { volts, seconds };
  return reader.refuse(
    line,
    `'${excerpt(cell)}' is no slope. Write the 20–80 % swing over its time, such as 1.65/0.91n.`,
  );
}

export function readWaveform(reader: BlockReader, edge: "rise" | "fall"): IbisWaveform | null {
  const { block } = reader;
  const values: Record<string, { value: number; line: number }> = {};
  const rows: IbisLine[] = [];
  for (const line of block.lines) {
    const [word = "", cell] = split(line.text);
    const name = word.toLowerCase();
    if (FIXTURE.has(name)) {
      const value = reader.number(cell, line.number);
      if (value !== null) values[name] = { value, line: line.number };
    } else if (/^[a-z]/i.test(word))
      reader.warn(line.number, `'${excerpt(word)}' is not known here; the line was left out.`);
    else rows.push(line);
  }
  const table = reader.table(rows, "time");
  if (table.length < 2)
    return reader.refuse(block.line, "The waveform has fewer than two rows; it was left out.");
  const resistance = values.r_fixture?.value ?? NaN;
  if (!(resistance > 0))
    return reader.refuse(
      block.line,
      "R_fixture is missing or not above zero, so the waveform says nothing; it was left out.",
    );
  if (!values.v_fixture)
    return reader.refuse(block.line, "V_fixture is missing, so the waveform says nothing; it was left out.");
  const volts = values.v_fixture;
  const fixture: Triple = {
    typ: volts.value,
    // The standard: the typical voltage holds where no other is given.
    min: values.v_fixture_min?.value ?? volts.value,
    max: values.v_fixture_max?.value ?? volts.value,
    line: volts.line,
  };
  const hasPackage = ["r_dut", "l_dut", "c_dut"].some((name) => (values[name]?.value ?? 0) !== 0);
  return {
    line: block.line,
    edge,
    resistance,
    fixture,
    capacitance: Math.max(0, values.c_fixture?.value ?? 0),
    inductance: Math.max(0, values.l_fixture?.value ?? 0),
    hasPackage,
    rows: table,
  };
}
