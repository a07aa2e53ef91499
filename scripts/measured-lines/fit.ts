import {
  cascade,
  chainFromScattering,
  invertChain,
  scatteringFromChain,
  type TwoPortChain,
} from "../../lib/si";
import { boardLine, lineChain, BOARD, type Dielectric } from "./board";
import { launchChain, mirrored, type Launch } from "./launch";
import { leastSquares } from "./least-squares";
import { thinned, type Measurements } from "./measurement";

/** Both straight lines differ by this length [m]. */
const DIFFERENCE = 0.1;
const SHORT = 0.1;
const LONG = 0.2;

export interface BoardFit {
  dielectric: Dielectric;
  launch: Launch;
  /** what is left: rms of attenuation [dB/m], of phase [share], and of all S entries of both lines */
  misses: { attenuation: number; phase: number; scattering: number };
}

/**
 * Dk, Df and launch from the two straight lines, once.
 *
 * M₂ M₁⁻¹ = X T(100 mm) X⁻¹ with the launch X: its trace 2 cosh γl holds the line alone, which gives Dk and Df. With the
 * line known, the launch follows from the scattering parameters of both.
 */
export function fitBoard({ short, long }: Pick<Measurements, "short" | "long">): BoardFit {
  const line = measuredLine(short, long);
  const dielectric = fitDielectric(line);
  const launch = fitLaunch(short, long, dielectric);
  return {
    dielectric,
    launch,
    misses: {
      ...lineMisses(line, dielectric),
      scattering: rms(launchResiduals(short, long, dielectric)(asList(launch))),
    },
  };
}

interface MeasuredLine {
  frequencies: number[];
  attenuation: number[];
  phase: number[];
}

/** γ of the difference of the two lines, its phase unwrapped from below. */
function measuredLine(short: Measurements["short"], long: Measurements["long"]): MeasuredLine {
  const { frequencies, values } = cascade(chainFromScattering(long), invertChain(chainFromScattering(short)));
  const line: MeasuredLine = { frequencies: [], attenuation: [], phase: [] };
  const perHertz = (2 * Math.PI * DIFFERENCE * Math.sqrt(3.4)) / 299_792_458;
  let before = 0;
  frequencies.forEach((f, k) => {
    const [re, im] = [
      (values[8 * k]! + values[8 * k + 6]!) / 2,
      (values[8 * k + 1]! + values[8 * k + 7]!) / 2,
    ];
    const { size, angle } = exponential(re, im);
    const expected = k === 0 ? f * perHertz : before + (f - frequencies[k - 1]!) * perHertz;
    before = angle + 2 * Math.PI * Math.round((expected - angle) / (2 * Math.PI));
    line.frequencies.push(f);
    line.attenuation.push(Math.log(size) / DIFFERENCE);
    line.phase.push(before / DIFFERENCE);
  });
  return line;
}

/** e^γl, the larger root of x + 1/x = 2 cosh γl. */
function exponential(re: number, im: number): { size: number; angle: number } {
  const [a, b] = [re * re - im * im - 1, 2 * re * im];
  const modulus = Math.hypot(a, b);
  const x = Math.sqrt((modulus + a) / 2);
  const y = Math.sqrt(Math.max(0, (modulus - a) / 2)) * (b < 0 ? -1 : 1);
  const sign = (re + x) ** 2 + (im + y) ** 2 >= 1 ? 1 : -1;
  const [p, q] = [re + sign * x, im + sign * y];
  return { size: Math.hypot(p, q), angle: Math.atan2(q, p) };
}

/** Below, the difference is too short to measure; above, the launches are no longer alike. */
const FROM = 0.2e9;
const TO = 6e9;

function fitDielectric(line: MeasuredLine): Dielectric {
  const [er = 0, tanD = 0] = leastSquares(
    ([er = 0, tanD = 0]) => {
      const { attenuation, phase } = lineResiduals(line, { er, tanD });
      return Float64Array.from([
        ...phase.map((miss) => miss / 0.005),
        ...attenuation.map((miss) => miss / 0.05),
      ]);
    },
    [4.4, 0.02],
    [0.1, 0.005],
  );
  return { er, tanD };
}

function lineResiduals(
  line: MeasuredLine,
  dielectric: Dielectric,
): { attenuation: number[]; phase: number[] } {
  const at = boardLine(BOARD.width, dielectric);
  const used = [...line.frequencies.keys()].filter(
    (k) => k % 20 === 0 && line.frequencies[k]! >= FROM && line.frequencies[k]! <= TO,
  );
  return {
    attenuation: used.map((k) => at(line.frequencies[k]!).attenuation / line.attenuation[k]! - 1),
    phase: used.map((k) => at(line.frequencies[k]!).phase / line.phase[k]! - 1),
  };
}

function lineMisses(line: MeasuredLine, dielectric: Dielectric): { attenuation: number; phase: number } {
  const { attenuation, phase } = lineResiduals(line, dielectric);
  return { attenuation: rms(attenuation), phase: rms(phase) };
}

function fitLaunch(short: Measurements["short"], long: Measurements["long"], dielectric: Dielectric): Launch {
  const [delay = 0, capacitance = 0, inductance = 0, loss = 0] = leastSquares(
    launchResiduals(short, long, dielectric),
    asList({ delay: 30e-12, capacitance: 0.1e-12, inductance: 0.1e-9, loss: 0.05 }),
    [5e-12, 0.05e-12, 0.05e-9, 0.02],
  );
  return { delay, capacitance, inductance, loss };
}

function asList({ delay, capacitance, inductance, loss }: Launch): number[] {
  return [delay, capacitance, inductance, loss];
}

function launchResiduals(short: Measurements["short"], long: Measurements["long"], dielectric: Dielectric) {
  const lines = [
    { data: thinned(short, 29, 0.05e9, TO), length: SHORT },
    { data: thinned(long, 29, 0.05e9, TO), length: LONG },
  ];
  const line = boardLine(BOARD.width, dielectric);
  const chains = lines.map(({ data, length }) => lineChain(line, length, data.frequencies));
  return ([delay = 0, capacitance = 0, inductance = 0, loss = 0]: readonly number[]): Float64Array =>
    Float64Array.from(
      lines.flatMap(({ data }, i) => {
        const launch = launchChain({ delay, capacitance, inductance, loss }, data.frequencies);
        const { values } = scatteringFromChain(between(launch, chains[i]!), 50, 50);
        return Array.from(values, (value, k) => value - data.values[k]!);
      }),
    );
}

/** A line between two launches that face each other. */
export function between(launch: TwoPortChain, line: TwoPortChain): TwoPortChain {
  return cascade(cascade(launch, line), mirrored(launch));
}

function rms(values: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += values[i]! ** 2;
  return Math.sqrt(sum / values.length);
}
