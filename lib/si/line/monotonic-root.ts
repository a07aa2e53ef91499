import { DomainError, NotConvergedError } from "../errors";

/** Value of a function that may have none at the ends of its range. */
export type Evaluate = (x: number) => number;

export interface Bracket {
  low: { x: number; value: number };
  high: { x: number; value: number };
  evaluations: number;
}

const SHRINK_STEPS = 40;

/**
 * Evaluates both ends of [min, max]; an end where the function has no value (DomainError) is drawn inward by halving
 * the logarithmic distance until it has one, so that what is reported as reachable can be reached.
 *
 * @throws the function's own DomainError where it has no value anywhere that was tried
 */
export function bracketEnds(evaluate: Evaluate, min: number, max: number): Bracket {
  let evaluations = 0;
  const attempt = (x: number): number | DomainError => {
    evaluations += 1;
    try {
      return evaluate(x);
    } catch (error) {
      if (error instanceof DomainError) return error;
      throw error;
    }
  };
  const valueAtMin = attempt(min);
  const valueAtMax = attempt(max);
  const anchor =
    typeof valueAtMax === "number"
      ? max
      : typeof valueAtMin === "number"
        ? min
        : firstInside(attempt, min, max);
  if (anchor === null)
    throw valueAtMin instanceof DomainError
      ? valueAtMin
      : new DomainError("Nothing can be computed here.", "min");
  const end = (x: number, value: number | DomainError): { x: number; value: number } => {
    if (typeof value === "number") return { x, value };
    let bad = x;
    let good = { x: anchor, value: Number.NaN };
    for (let step = 0; step < SHRINK_STEPS && Math.abs(Math.log(good.x / bad)) > 1e-6; step++) {
      const middle = Math.sqrt(bad * good.x);
      const got = attempt(middle);
      if (typeof got === "number") good = { x: middle, value: got };
      else bad = middle;
    }
    return Number.isNaN(good.value) ? { x: anchor, value: evaluate(anchor) } : good;
  };
  return { low: end(min, valueAtMin), high: end(max, valueAtMax), evaluations };
}

/**
 * Root of a monotonic function in ln x by regula falsi with halving of the retained end (Illinois), which keeps its
 * bracket and converges faster than bisection.
 *
 * @param evaluate  function whose sign differs at the ends of the bracket
 * @returns x with |f(x)| ≤ tolerance, and how often the function was evaluated
 * @throws NotConvergedError after 200 evaluations
 */
export function monotonicRoot(
  evaluate: Evaluate,
  bracket: Bracket,
  tolerance: number,
): { x: number; residual: number; evaluations: number } {
  let { low, high } = bracket;
  let side = 0;
  for (let evaluations = 0; evaluations < 200; evaluations++) {
    if (Math.abs(low.value) <= tolerance) return { x: low.x, residual: low.value, evaluations };
    if (Math.abs(high.value) <= tolerance) return { x: high.x, residual: high.value, evaluations };
    const logLow = Math.log(low.x);
    const logHigh = Math.log(high.x);
    if (logHigh - logLow < 1e-15) return { x: low.x, residual: low.value, evaluations };
    let step = (logLow * high.value - logHigh * low.value) / (high.value - low.value);
    if (!(step > logLow && step < logHigh)) step = (logLow + logHigh) / 2;
    const x = Math.exp(step);
    const value = evaluate(x);
    if (Math.abs(value) <= tolerance) return { x, residual: value, evaluations: evaluations + 1 };
    if (value > 0 === high.value > 0) {
      high = { x, value };
      if (side === 1) low = { ...low, value: low.value / 2 };
      side = 1;
    } else {
      low = { x, value };
      if (side === -1) high = { ...high, value: high.value / 2 };
      side = -1;
    }
  }
  throw new NotConvergedError("The search for the width did not settle.", Math.abs(low.value), 200);
}

function firstInside(attempt: (x: number) => number | DomainError, min: number, max: number): number | null {
  for (let part = 1; part < 16; part++) {
    const x = min * (max / min) ** (part / 16);
    if (typeof attempt(x) === "number") return x;
  }
  return null;
}
