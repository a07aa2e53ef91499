import { portIndex, type PortData } from "./port-data";

export interface PortFigures {
  /** largest singular value of S over all frequencies [1]; above 1 the data give more power than they get */
  gain: number;
  /** where that is [Hz] */
  gainAt: number;
  /** largest |Sij − Sji| [1]; 0 for a network of ordinary materials */
  nonReciprocity: number;
  nonReciprocityAt: number;
}

const MOST_TURNS = 200;

/**
 * How passive and how reciprocal measured data are.
 * @returns the singular value by power iteration on SᴴS, to 1e-9 (to 1e-4 where two nearly agree, never above the truth)
 */
export function portFigures(data: PortData): PortFigures {
  const { ports, frequencies, values } = data;
  const found: PortFigures = { gain: 0, gainAt: 0, nonReciprocity: 0, nonReciprocityAt: 0 };
  for (let k = 0; k < frequencies.length; k++) {
    const gain = largestSingularValue(values, ports, k);
    if (gain > found.gain) [found.gain, found.gainAt] = [gain, frequencies[k]!];
    for (let i = 0; i < ports; i++)
      for (let j = i + 1; j < ports; j++) {
        const p = portIndex(ports, k, i, j);
        const q = portIndex(ports, k, j, i);
        const apart = Math.hypot(values[p]! - values[q]!, values[p + 1]! - values[q + 1]!);
        if (apart > found.nonReciprocity)
          [found.nonReciprocity, found.nonReciprocityAt] = [apart, frequencies[k]!];
      }
  }
  return found;
}

function largestSingularValue(s: Float64Array, ports: number, k: number): number {
  // A start that no symmetry of the ports makes blind.
  let re = Float64Array.from({ length: ports }, (_, i) => 1 + 0.37 * i);
  let im = Float64Array.from({ length: ports }, (_, i) => 0.21 * (i % 3));
  let gain = 0;
  for (let turn = 0; turn < MOST_TURNS; turn++) {
    const size = norm(re, im);
    if (size === 0) return 0;
    const out = times(s, ports, k, re, im, size, false);
    const next = norm(out.re, out.im);
    if (Math.abs(next - gain) <= 1e-12 * next && turn > 2) return next;
    gain = next;
    ({ re, im } = times(s, ports, k, out.re, out.im, 1, true));
  }
  return gain;
}

/** S x / size, or Sᴴ x. */
function times(
  s: Float64Array,
  ports: number,
  k: number,
  xr: Float64Array,
  xi: Float64Array,
  size: number,
  isAdjoint: boolean,
): { re: Float64Array<ArrayBuffer>; im: Float64Array<ArrayBuffer> } {
  const re = new Float64Array(ports);
  const im = new Float64Array(ports);
  for (let i = 0; i < ports; i++)
    for (let j = 0; j < ports; j++) {
      const at = isAdjoint ? portIndex(ports, k, j, i) : portIndex(ports, k, i, j);
      const a = s[at]!;
      const b = isAdjoint ? -s[at + 1]! : s[at + 1]!;
      re[i] = re[i]! + (a * xr[j]! - b * xi[j]!) / size;
      im[i] = im[i]! + (a * xi[j]! + b * xr[j]!) / size;
    }
  return { re, im };
}

function norm(re: Float64Array, im: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < re.length; i++) sum += re[i]! * re[i]! + im[i]! * im[i]!;
  return Math.sqrt(sum);
}
