import { portIndex, type PortData } from "@/lib/si/ports";
import { TouchstoneError, type NumberFormat, type ParameterKind, type TouchstoneProblem } from "./document";
import type { Head } from "./head";
import type { Scanned } from "./scan";

const NOISE_NUMBERS = 5;

/** The numbers as matrices over frequency. @throws TouchstoneError where they do not come out even */
export function readMatrices(scanned: Scanned, head: Head, problems: TouchstoneProblem[]): PortData {
  const { numbers, options } = scanned;
  const { ports, matrix } = head;
  const places = placesOf(head);
  const record = 1 + 2 * places.length;
  const end = head.version === "1" && ports === 2 ? noiseStart(scanned, record, problems) : numbers.length;
  const count = Math.floor(end / record);
  if (count * record !== end)
    throw new TouchstoneError(
      lineOf(scanned, count * record),
      `The last record has ${end - count * record} of the ${record} numbers that ${ports} ports need. See whether the file was cut off, or has another number of ports.`,
    );
  if (head.frequencies !== null && head.frequencies !== count)
    problems.push({
      severity: "warning",
      line: lineOf(scanned, 0),
      reason: `The file promises ${head.frequencies} frequencies and holds ${count}; those were read.`,
    });
  const data: PortData = {
    ports,
    frequencies: new Float64Array(count),
    references: head.references,
    values: new Float64Array(count * ports * ports * 2),
  };
  for (let k = 0; k < count; k++) {
    const from = k * record;
    const frequency = numbers[from]! * options.scale;
    if (frequency < 0 || (k > 0 && !(frequency > data.frequencies[k - 1]!)))
      throw new TouchstoneError(
        lineOf(scanned, from),
        "The frequency does not rise here. Frequencies go up from zero, each once; put the records in order.",
      );
    data.frequencies[k] = frequency;
    places.forEach(([row, column], i) => {
      const [re, im] = complex(options.format, numbers[from + 1 + 2 * i]!, numbers[from + 2 + 2 * i]!);
      const scale = unscaled(options.kind, head.version, options.resistance, row, column);
      put(data, portIndex(ports, k, row, column), re * scale, im * scale);
      if (matrix !== "full" && row !== column)
        put(data, portIndex(ports, k, column, row), re * scale, im * scale);
    });
  }
  return data;
}

function placesOf({ ports, matrix, isTransposed }: Head): [row: number, column: number][] {
  const places: [number, number][] = [];
  for (let row = 0; row < ports; row++)
    for (let column = 0; column < ports; column++)
      if (matrix === "full" || (matrix === "lower" ? column <= row : column >= row))
        places.push(isTransposed ? [column, row] : [row, column]);
  // A triangle of a two-port has one off-diagonal entry, which stands for both.
  return places;
}

function put(data: PortData, at: number, re: number, im: number): void {
  data.values[at] = re;
  data.values[at + 1] = im;
}

function complex(format: NumberFormat, a: number, b: number): [re: number, im: number] {
  if (format === "RI") return [a, b];
  const size = format === "MA" ? a : 10 ** (a / 20);
  const angle = (b * Math.PI) / 180;
  return [size * Math.cos(angle), size * Math.sin(angle)];
}

/** Version 1 counts Z in the reference, Y in its inverse, and the parts of G and H likewise. */
function unscaled(
  kind: ParameterKind,
  version: Head["version"],
  ohms: number,
  row: number,
  column: number,
): number {
  if (version !== "1" || kind === "S") return 1;
  if (kind === "Z") return ohms;
  if (kind === "Y") return 1 / ohms;
  if (row !== column) return 1;
  return (kind === "H") === (row === 0) ? ohms : 1 / ohms;
}

/** Noise data follow a two-port's where the frequency falls back; they are left out. */
function noiseStart(scanned: Scanned, record: number, problems: TouchstoneProblem[]): number {
  const { starts, numbers } = scanned;
  for (const [i, { at, line }] of starts.entries()) {
    const length = (starts[i + 1]?.at ?? numbers.length) - at;
    if (at === 0 || at % record !== 0 || length !== NOISE_NUMBERS) continue;
    if (numbers[at]! > numbers[at - record]!) continue;
    problems.push({ severity: "notice", line, reason: "Noise data from here on; they are not used." });
    return at;
  }
  return numbers.length;
}

function lineOf({ starts }: Scanned, at: number): number {
  let line = 1;
  for (const start of starts) {
    if (start.at > at) break;
    line = start.line;
  }
  return line;
}
