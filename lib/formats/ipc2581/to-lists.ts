import { writeDelimited } from "../delimited/write";
import { metresIn } from "./board-unit";
import type { BoardFile, BoardUnit } from "./document";
import type { BoardNeighbour } from "./neighbours";

/** Digits behind the point, by unit: a nanometre and finer. */
const DIGITS: Readonly<Record<BoardUnit, number>> = { in: 8, mm: 6, µm: 3 };

/** The board's routed sections as a section list, in the file's own unit. */
export function sectionListOf(board: Pick<BoardFile, "nets" | "unit">): string {
  const said = writer(board.unit);
  const lengths = ["width", "length", "x1", "y1", "x2", "y2"].map((name) => `${name}_${board.unit}`);
  return writeDelimited([
    ["net", "from", "to", "layer", ...lengths],
    ...board.nets.flatMap(({ name, sections }) =>
      sections.map(({ from, to, layer, width_m, length_m, path }) => [
        name,
        from,
        to,
        layer,
        ...[width_m, length_m, path[0], path[1], path.at(-2), path.at(-1)].map((value) => said(value ?? 0)),
      ]),
    ),
  ]);
}

/** The board's parts as a parts list. */
export function partsListOf({ parts }: Pick<BoardFile, "parts">): string {
  return writeDelimited([
    ["reference", "part number", "value", "pins"],
    ...parts.map(({ reference, partNumber, value, pins }) => [reference, partNumber, value, pinsOf(pins)]),
  ]);
}

/** A lone number in a parts list is a count of pins, so a part whose only pin has such a name gives none. */
function pinsOf(pins: readonly string[]): string {
  const [only] = pins;
  return pins.length === 1 && only !== undefined && only !== "1" && /^\d+$/.test(only) ? "" : pins.join(" ");
}

/** Stretches side by side as a neighbour list, in the file's own unit. */
export function neighbourListOf(rows: readonly BoardNeighbour[], unit: BoardUnit): string {
  const said = writer(unit);
  return writeDelimited([
    ["net", "neighbour", "layer", `gap_${unit}`, `parallel length_${unit}`],
    ...rows.map(({ net, neighbour, layer, gap_m, parallel_m }) => [
      net,
      neighbour,
      layer,
      said(gap_m),
      said(parallel_m),
    ]),
  ]);
}

function writer(unit: BoardUnit): (metres: number) => string {
  const one = metresIn(unit);
  return (metres) => {
    const text = (metres / one).toFixed(DIGITS[unit]).replace(/\.?0+$/, "");
    return text === "-0" ? "0" : text;
  };
}
