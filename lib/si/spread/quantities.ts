import type { LineParameters } from "../cross-section";
import { DomainError } from "../errors";

/** Impedances whose spread is told; a single line has one, a pair differential and common, an equal pair all four. */
export type SpreadQuantity = "single" | "differential" | "odd" | "even" | "common";

/** [Ω] */
export type Impedances = Partial<Record<SpreadQuantity, number>>;

/** @throws DomainError where the solver gave no positive number */
export function impedancesOf({ single, pair }: LineParameters): Impedances {
  const found: Impedances = single
    ? { single: single.impedance }
    : pair
      ? {
          differential: pair.differential,
          common: pair.common,
          ...(pair.odd && { odd: pair.odd.impedance }),
          ...(pair.even && { even: pair.even.impedance }),
        }
      : {};
  const values = Object.values(found);
  if (values.length === 0 || values.some((value) => !(value > 0 && Number.isFinite(value)))) {
    throw new DomainError("The cross-section gives no impedance within these tolerances.", "section");
  }
  return found;
}
