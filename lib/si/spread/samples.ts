import { normalProbability, normalQuantile } from "./normal-quantile";
import { randomNumbers } from "./random";
import type { Factor } from "./tolerances";

/** Standard deviation of a factor's distribution ÷ half its range [1]. */
export function relativeSigma({ distribution, sigmas }: Factor): number {
  if (distribution === "uniform") return 1 / Math.sqrt(3);
  // normal cut off at ±k: σ² (1 − 2kφ(k)/(2Φ(k) − 1))
  const density = Math.exp((-sigmas * sigmas) / 2) / Math.sqrt(2 * Math.PI);
  const inside = 2 * normalProbability(sigmas) - 1;
  return Math.sqrt(1 - (2 * sigmas * density) / inside) / sigmas;
}

/**
 * Samples of the factors as shares of half their range, each in [−1, 1].
 *
 * "latin": every factor's range is cut into as many equally likely parts as there are samples, and each part is hit once
 * (M. D. McKay, R. J. Beckman, W. J. Conover, Technometrics 21, 1979, p. 239). "random": independent samples.
 *
 * @returns [sample·factors + factor]
 */
export function drawSamples(
  factors: readonly Factor[],
  count: number,
  seed: number,
  sampling: "latin" | "random",
): Float64Array {
  const next = randomNumbers(seed);
  const n = factors.length;
  const samples = new Float64Array(count * n);
  const order = new Int32Array(count);
  factors.forEach((factor, f) => {
    const low = factor.distribution === "normal" ? normalProbability(-factor.sigmas) : 0;
    for (let i = 0; i < count; i++) order[i] = i;
    if (sampling === "latin") {
      for (let i = count - 1; i > 0; i--) {
        const j = Math.floor(next() * (i + 1));
        const kept = order[i]!;
        order[i] = order[j]!;
        order[j] = kept;
      }
    }
    for (let i = 0; i < count; i++) {
      const u = sampling === "latin" ? (order[i]! + next()) / count : next();
      samples[i * n + f] =
        factor.distribution === "uniform"
          ? 2 * u - 1
          : normalQuantile(Math.min(1 - 1e-16, Math.max(1e-300, low + u * (1 - 2 * low)))) / factor.sigmas;
    }
  });
  return samples;
}
