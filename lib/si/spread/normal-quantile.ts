/**
 * z with Φ(z) = p.
 * @param p  in (0, 1)
 * @returns z, relative accuracy about 1e-16
 * @see M. J. Wichura, "Algorithm AS 241: The percentage points of the normal distribution", Appl. Statist. 37, 1988
 */
export function normalQuantile(p: number): number {
  const q = p - 0.5;
  if (Math.abs(q) <= 0.425) {
    const r = 0.180625 - q * q;
    return (q * polynomial(CENTRE_A, r)) / polynomial(CENTRE_B, r);
  }
  let r = Math.sqrt(-Math.log(q < 0 ? p : 1 - p));
  let z: number;
  if (r <= 5) {
    r -= 1.6;
    z = polynomial(TAIL_C, r) / polynomial(TAIL_D, r);
  } else {
    r -= 5;
    z = polynomial(FAR_E, r) / polynomial(FAR_F, r);
  }
  return q < 0 ? -z : z;
}

/**
 * Φ(z), the inverse of the above by Newton steps on it.
 * @returns p; accuracy 1e-14 for |z| ≤ 6
 */
export function normalProbability(z: number): number {
  if (z === 0) return 0.5;
  const upper = Math.abs(z);
  let low = 0.5;
  let high = 1 - 1e-16;
  for (let pass = 0; pass < 60; pass++) {
    const middle = (low + high) / 2;
    if (normalQuantile(middle) < upper) low = middle;
    else high = middle;
  }
  const p = (low + high) / 2;
  return z > 0 ? p : 1 - p;
}

function polynomial(coefficients: readonly number[], x: number): number {
  let sum = 0;
  for (let i = coefficients.length - 1; i >= 0; i--) sum = sum * x + coefficients[i]!;
  return sum;
}

const CENTRE_A = [
  3.387132872796366608, 133.14166789178437745, 1971.5909503065514427, 13731.693765509461125,
  45921.953931549871457, 67265.770927008700853, 33430.575583588128105, 2509.0809287301226727,
];
const CENTRE_B = [
  1, 42.313330701600911252, 687.1870074920579083, 5394.1960214247511077, 21213.794301586595867,
  39307.89580009271061, 28729.085735721942674, 5226.495278852545925,
];
const TAIL_C = [
  1.42343711074968357734, 4.6303378461565452959, 5.7694972214606914055, 3.64784832476320460504,
  1.27045825245236838258, 0.24178072517745061177, 0.0227238449892691845833, 7.7454501427834140764e-4,
];
const TAIL_D = [
  1, 2.05319162663775882187, 1.6763848301838038494, 0.68976733498510000455, 0.14810397642748007459,
  0.0151986665636164571966, 5.475938084995344946e-4, 1.05075007164441684324e-9,
];
const FAR_E = [
  6.6579046435011037772, 5.4637849111641143699, 1.7848265399172913358, 0.29656057182850489123,
  0.026532189526576123093, 0.0012426609473880784386, 2.71155556874348757815e-5, 2.01033439929228813265e-7,
];
const FAR_F = [
  1, 0.59983220655588793769, 0.13692988092273580531, 0.0148753612908506148525, 7.868691311456132591e-4,
  1.8463183175100546818e-5, 1.4215117583164458887e-7, 2.04426310338993978564e-15,
];
