import { toSi } from "@/lib/si/units";
import type { BoardUnit } from "./document";
import { BoardFileError } from "./errors";

const UNITS: Readonly<Record<string, BoardUnit>> = {
  INCH: "in",
  INCHES: "in",
  MILLIMETER: "mm",
  MILLIMETRE: "mm",
  MM: "mm",
  MICRON: "µm",
  MICROMETER: "µm",
};

/** The unit that an attribute `units` names. @throws BoardFileError where it is none of the standard's */
export function readUnit(
  text: string | undefined,
  element: string,
  line: number,
): { name: BoardUnit; metres: number } {
  const name = UNITS[(text ?? "").trim().toUpperCase()];
  if (!name)
    throw new BoardFileError(
      "units",
      text === undefined
        ? `Line ${line}: ${element} does not say its units. Export the file with units INCH, MILLIMETER or MICRON.`
        : `Line ${line}: the units '${text.slice(0, 40)}' of ${element} are not known. Export the file in INCH, MILLIMETER or MICRON.`,
      line,
    );
  return { name, metres: metresIn(name) };
}

/** Metres in one of a unit. */
export function metresIn(unit: BoardUnit): number {
  return toSi({ value: "1", unit }, "length");
}
