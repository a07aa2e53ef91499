import { DomainError } from "../errors";

export interface ImpedanceTarget {
  kind: "single" | "differential" | "common";
  ohms: number;
}

/** What a closed form and a field solution have in common. */
interface Impedances {
  single?: { impedance: number };
  pair?: { differential: number; common: number };
}

/**
 * The impedance of that kind [Ω].
 * @throws DomainError where the line has none: a single impedance of a pair, a differential one of a single trace
 */
export function impedanceOf(line: Impedances, kind: ImpedanceTarget["kind"]): number {
  const value = kind === "single" ? line.single?.impedance : line.pair?.[kind];
  if (value === undefined) {
    throw new DomainError(
      `A ${line.pair ? "pair" : "single trace"} has no ${kind} impedance.`,
      "target.kind",
    );
  }
  return value;
}
