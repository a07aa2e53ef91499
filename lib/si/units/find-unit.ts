import type { Dimension } from "./quantity";
import { unitTable, type UnitDefinition } from "./unit-table";

/** Dimensions whose units are also accepted: a class's rate is a clock frequency or a bit rate, both 1/s. */
const alsoAccepted: Partial<Record<Dimension, Dimension>> = { frequency: "bitRate", bitRate: "frequency" };

const exact = new Map<string, UnitDefinition>();
const folded = new Map<string, UnitDefinition>();
const byName = new Map<string, UnitDefinition>();
for (const entry of unitTable) {
  if (!byName.has(entry.unit)) byName.set(entry.unit, entry);
  for (const name of [entry.unit, ...entry.aliases]) setOnce(exact, key(entry.dimension, name), entry);
  for (const name of entry.folded) setOnce(folded, key(entry.dimension, name), entry);
}

/**
 * The unit of `dimension` that `text` names, or undefined.
 * Case counts (mΩ is not MΩ), except that text all in one case is matched where only one reading makes sense.
 */
export function findUnit(text: string, dimension: Dimension): UnitDefinition | undefined {
  const name = normaliseUnitText(text);
  const own = lookUp(name, dimension);
  const other = alsoAccepted[dimension];
  return own ?? (other ? lookUp(name, other) : undefined);
}

/** The unit of that canonical name ("mil", "pF"), whatever its dimension, or undefined. */
export function findUnitByName(text: string): UnitDefinition | undefined {
  const name = normaliseUnitText(text);
  const known = byName.get(name);
  if (known) return known;
  const matches = unitTable.filter((entry) => entry.aliases.includes(name));
  return matches.length === 1 ? matches[0] : undefined;
}

/** Names of the units of a dimension, as shown. */
export function unitsOf(dimension: Dimension): string[] {
  return unitTable.filter((entry) => entry.dimension === dimension).map((entry) => entry.unit);
}

function lookUp(name: string, dimension: Dimension): UnitDefinition | undefined {
  const found = exact.get(key(dimension, name));
  if (found) return found;
  const lower = name.toLowerCase();
  const oneCase =
    name === lower ||
    name === name.toUpperCase() ||
    name.replace(/µ/g, "") === name.replace(/µ/g, "").toUpperCase();
  return oneCase ? folded.get(key(dimension, lower)) : undefined;
}

/** One spelling of micro (µ) and ohm (Ω); white space single; "um" and "uF" are µm and µF. */
function normaliseUnitText(text: string): string {
  return text
    .trim()
    .replace(/\s+/gu, " ")
    .replace(/\u03bc/g, "µ")
    .replace(/\u2126/g, "Ω")
    .replace(/^[uU](?=([mMsSFfHhVA])?$)/, "µ")
    .replace(/^V\/us$/, "V/µs");
}

function key(dimension: Dimension, name: string): string {
  return `${dimension} ${name}`;
}

function setOnce(map: Map<string, UnitDefinition>, name: string, entry: UnitDefinition): void {
  if (!map.has(name)) map.set(name, entry);
}
