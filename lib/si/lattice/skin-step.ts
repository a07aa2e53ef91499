import type { Circuit } from "./circuit";
import { erfc, skinRamp } from "./skin-fit";

/** Share of the swing by which a chord may miss the curve that skin loss makes of a corner. */
const MISS = { live: 1.5e-3, standard: 6e-4, reference: 1.5e-4 } as const;
/** A jump of a source asks for steps far finer than its edge; beyond so many, the last 1.5 steps take what is left. */
const MOST_FOR_A_JUMP = 60_000;
const SMALLEST = 1e-3;
/** Passes through the net after which little is left to add up, and steps that are enough for it. */
const MOST_PASSES = 40;
const MOST = 40_000;
/** Beyond so many skin², the tail after a jump is as good as straight. */
const SOON = 3000;

/**
 * The largest step whose chords follow what skin loss makes of the sources' corners, through every line.
 *
 * @param ramp    the sources' shortest edge [s]; Infinity: none
 * @param wanted  what everything else asks for [s]
 * @returns at most `wanted`
 */
export function skinStep(
  circuit: Circuit,
  until: number,
  accuracy: keyof typeof MISS,
  { ramp, jumps, wanted }: { ramp: number; jumps: boolean; wanted: number },
): number {
  let step = wanted;
  const passes = Math.min(MOST_PASSES, until / circuit.lines.reduce((sum, { delay }) => sum + delay, 0));
  for (const { skin } of circuit.lines) {
    if (skin === 0) continue;
    const unit = skin * skin;
    if (Number.isFinite(ramp)) {
      const allowed = (MISS[accuracy] * ramp) / unit;
      let own = largest(chordOfRamp, allowed);
      // A corner rounded off within one step is a little late at every pass, which adds up.
      if (own > 1) own = Math.max(1, largest(chordOfRamp, allowed / (1 + passes / 2)), until / MOST / unit);
      step = Math.min(step, unit * own);
    }
    // Loss that is over within the first step leaves the jump a jump.
    if (jumps && wanted < unit * SOON)
      step = Math.min(step, Math.max(unit * largest(chordOfStep, MISS[accuracy]), until / MOST_FOR_A_JUMP));
  }
  return step;
}

/** The largest step [skin²] whose chord misses by no more than `allowed`; `chord` grows with the step. */
function largest(chord: (step: number) => number, allowed: number): number {
  let low = SMALLEST;
  if (chord(low) > allowed) return low;
  let high = 1e12;
  if (chord(high) <= allowed) return high;
  while (high / low > 1.05) {
    const middle = Math.sqrt(low * high);
    if (chord(middle) <= allowed) low = middle;
    else high = middle;
  }
  return low;
}

/** Largest gap between the ramp's answer and its chords [skin²]. */
function chordOfRamp(step: number): number {
  return chords(step, (tau) => skinRamp(1, tau));
}

/** The same of the step's answer. */
function chordOfStep(step: number): number {
  return chords(step, (tau) => (tau > 0 ? erfc(0.5 / Math.sqrt(tau)) : 0));
}

function chords(step: number, answer: (tau: number) => number): number {
  const last = Math.max(2, Math.min(400, Math.ceil(1 / step)));
  let worst = 0;
  for (let n = 0; n < last; n++) {
    const middle = (n + 0.5) * step;
    const miss = answer(middle) - (answer(n * step) + answer((n + 1) * step)) / 2;
    worst = Math.max(worst, Math.abs(miss));
  }
  return worst;
}
