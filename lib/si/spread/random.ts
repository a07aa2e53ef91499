/**
 * A seeded generator: the same seed gives the same numbers on every machine.
 * @param seed  any number; its integer part, modulo 2³², counts
 * @returns a function that gives the next number in [0, 1), of 32 bits
 * @see D. Blackman, S. Vigna, "Scrambled linear pseudorandom number generators", ACM Trans. Math. Softw. 47, 2021
 *   (xoshiro128**), its state filled by SplitMix32
 */
export function randomNumbers(seed: number): () => number {
  let mix = Math.trunc(seed) >>> 0;
  const split = () => {
    mix = (mix + 0x9e3779b9) >>> 0;
    let z = mix;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    return (z ^ (z >>> 16)) >>> 0;
  };
  return xoshiro([split(), split(), split(), split()]);
}

/** xoshiro128** from a given state of four 32-bit words, not all zero. */
export function xoshiro(state: [number, number, number, number]): () => number {
  let [a, b, c, d] = state;
  const rotate = (x: number, k: number) => (x << k) | (x >>> (32 - k));
  return () => {
    const result = Math.imul(rotate(Math.imul(b, 5), 7), 9) >>> 0;
    const t = b << 9;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= t;
    d = rotate(d, 11);
    return result / 2 ** 32;
  };
}
