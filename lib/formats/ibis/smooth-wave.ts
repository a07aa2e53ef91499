/** A table of volts over time with a slope everywhere: a monotone cubic through its points. */
export interface SmoothWave {
  start: number;
  end: number;
  /** [V] and [V/s] */
  at(time: number): { volts: number; slope: number };
}

/**
 * Monotone piecewise cubic; constant outside. Keeps the points and adds no extremum of its own.
 * @see F. N. Fritsch, J. Butland, "A method for constructing local monotone piecewise cubic interpolants", SIAM J. Sci.
 *   Stat. Comput. 5, 1984, p. 300 (the weighted harmonic mean of slopes)
 */
export function smoothWave(points: readonly [time: number, volts: number][]): SmoothWave {
  const n = points.length;
  const t = points.map(([x]) => x);
  const v = points.map(([, y]) => y);
  const chord = t.slice(1).map((x, i) => (v[i + 1]! - v[i]!) / (x - t[i]!));
  const slope = t.map((_, i) => {
    const before = chord[i - 1];
    const after = chord[i];
    if (before === undefined || after === undefined || before * after <= 0) return 0;
    const h0 = t[i]! - t[i - 1]!;
    const h1 = t[i + 1]! - t[i]!;
    const w0 = 2 * h1 + h0;
    const w1 = h1 + 2 * h0;
    return (w0 + w1) / (w0 / before + w1 / after);
  });
  let k = 0;
  return {
    start: t[0]!,
    end: t[n - 1]!,
    at(time) {
      if (time <= t[0]!) return { volts: v[0]!, slope: 0 };
      if (time >= t[n - 1]!) return { volts: v[n - 1]!, slope: 0 };
      // Asked in order of time; a step back starts from the front.
      if (t[k]! > time) k = 0;
      while (t[k + 1]! <= time) k++;
      const h = t[k + 1]! - t[k]!;
      const u = (time - t[k]!) / h;
      const [a, b] = [v[k]!, v[k + 1]!];
      const [c, d] = [slope[k]! * h, slope[k + 1]! * h];
      const volts = a + u * (c + u * (3 * (b - a) - 2 * c - d + u * (2 * (a - b) + c + d)));
      const rate = (c + u * (2 * (3 * (b - a) - 2 * c - d) + 3 * u * (2 * (a - b) + c + d))) / h;
      return { volts, slope: rate };
    },
  };
}

/** Share of a smooth step's time that its 20–80 % piece takes: 3u² − 2u³ = 0.2 at u = 0.287141. */
const PIECE = 1 - 2 * 0.28714074;

/** A step from one voltage to another, 3u² − 2u³, whose 20–80 % piece takes `time` [s]. */
export function smoothStep(from: number, to: number, time: number): SmoothWave {
  const whole = time / PIECE;
  return {
    start: 0,
    end: whole,
    at(t) {
      const u = Math.min(1, Math.max(0, t / whole));
      return {
        volts: from + (to - from) * u * u * (3 - 2 * u),
        slope: u > 0 && u < 1 ? ((to - from) * 6 * u * (1 - u)) / whole : 0,
      };
    },
  };
}
