import { spawnSync } from "node:child_process";
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { simulate, type Accuracy, type Network } from "@/lib/si";
import type { BenchFigure, BenchSection } from "../section";
import { mixedNet, pointToPointNet, sequence, type BenchNet } from "./mixed-nets";

const PS = 1e-12;
const COUNT = 40;
/** The circuit simulator's largest steps: the finest is taken for the truth, the others are timed. */
const TRUTH = 0.5 * PS;
const STEPS = [20 * PS, 8 * PS, 3 * PS];

/**
 * The lattice beside a general-purpose circuit simulator on the same nets in one run. ngspice runs in its best batch
 * mode, all nets side by side in one circuit, its own analysis time without start or parsing; its error is against its
 * own finest run, which favours it. The ratio is at the lattice's error (95th percentile over nets and receivers).
 */
export const besideNgspice: BenchSection = {
  title: "Beside ngspice, at equal error",
  run: () => {
    if (spawnSync("ngspice", ["--version"]).status !== 0)
      return [{ what: "ngspice is not here, so nothing is compared", value: 0, unit: "" }];
    const random = sequence(11);
    const mixed: BenchNet[] = [];
    while (mixed.length < COUNT) {
      const net = mixedNet(random);
      // Its coupled lines are made of other elements, so that the comparison would not be of the same thing.
      if (!net.network.sections.some(({ kind }) => kind === "pair")) mixed.push(net);
    }
    const plain = Array.from({ length: COUNT }, () => pointToPointNet(random));
    return [...compare("mixed", mixed, 30), ...compare("point to point", plain, 100)];
  },
};

type Waves = { time: Float64Array; volts: Float64Array }[];

function compare(what: string, nets: readonly BenchNet[], goal: number): BenchFigure[] {
  const until = Math.max(...nets.map((net) => net.until));
  const truth = runNgspice(nets, until, TRUTH).waves;
  const theirs = STEPS.map((step) => {
    const { waves, seconds } = runNgspice(nets, until, step);
    return { error: percentile(truth, waves), ms: (1e3 * seconds) / nets.length };
  });
  const figures: BenchFigure[] = theirs.map(({ error, ms }, i) => ({
    what: `${what}, ngspice, steps up to ${STEPS[i]! / PS} ps, a net`,
    value: ms,
    unit: "ms",
    note: `error ${(100 * error).toFixed(3)} %`,
  }));
  for (const accuracy of ["live", "standard", "reference"] as const) {
    const own = runLattice(nets, until, accuracy);
    const error = percentile(truth, own.waves);
    figures.push({
      what: `${what}, lattice, ${accuracy}, a net`,
      value: own.ms,
      unit: "ms",
      note: `error ${(100 * error).toFixed(3)} %`,
    });
    figures.push({
      what: `${what}, times faster at ${accuracy}'s error`,
      value: timeAt(theirs, error) / own.ms,
      unit: "×",
      goal,
    });
  }
  return figures;
}

/** Its time at an error, by a straight line through logarithms of its nearest two runs. */
function timeAt(runs: readonly { error: number; ms: number }[], error: number): number {
  const order = [...runs].sort((a, b) => a.error - b.error);
  const i = Math.min(order.length - 2, Math.max(0, order.findIndex((run) => run.error > error) - 1));
  const one = order[i]!;
  const two = order[i + 1]!;
  const slope = Math.log(two.ms / one.ms) / Math.log(two.error / one.error);
  // Beyond its runs nothing is claimed that was not measured.
  const within = Math.min(order[order.length - 1]!.error, Math.max(order[0]!.error, error));
  return one.ms * Math.exp(slope * Math.log(within / one.error));
}

function runLattice(
  nets: readonly BenchNet[],
  until: number,
  accuracy: Accuracy,
): { waves: Waves; ms: number } {
  const run = () => nets.map(({ network }) => simulate(network, { until, accuracy }));
  for (let k = 0; k < 20; k++) run();
  let best = Infinity;
  for (let k = 0; k < 15; k++) {
    const start = process.cpuUsage();
    run();
    const { user, system } = process.cpuUsage(start);
    best = Math.min(best, (user + system) / 1e3 / nets.length);
  }
  const waves = run().flatMap(({ time, voltage }, i) =>
    nets[i]!.network.probes.map(({ name }) => ({ time, volts: voltage[name]! })),
  );
  return { waves, ms: best };
}

/** 95th percentile over all receivers of the largest miss, as a share of the source's swing. */
function percentile(truth: Waves, waves: Waves): number {
  const misses = truth.map((one, i) => miss(one, waves[i]!) / 3.3).sort((a, b) => a - b);
  return misses[Math.floor(0.95 * (misses.length - 1))]!;
}

function miss(truth: Waves[number], { time, volts }: Waves[number]): number {
  let i = 0;
  let worst = 0;
  const end = Math.min(truth.time[truth.time.length - 1]!, time[time.length - 1]!);
  for (let k = 0; k < truth.time.length; k++) {
    const t = truth.time[k]!;
    if (t > end) break;
    while (i + 2 < time.length && time[i + 1]! <= t) i++;
    const v = volts[i]! + ((volts[i + 1]! - volts[i]!) * (t - time[i]!)) / (time[i + 1]! - time[i]!);
    worst = Math.max(worst, Math.abs(v - truth.volts[k]!));
  }
  return worst;
}

function runNgspice(
  nets: readonly BenchNet[],
  until: number,
  step: number,
): { waves: Waves; seconds: number } {
  const folder = mkdtempSync(join(tmpdir(), "lattice-"));
  try {
    const deck = join(folder, "nets.cir");
    const raw = join(folder, "nets.raw");
    writeFileSync(deck, deckOf(nets, until, step));
    const run = spawnSync("ngspice", ["-b", "-r", raw, deck], { encoding: "utf8", maxBuffer: 2 ** 26 });
    const seconds = Number(/Total analysis time \(seconds\) = ([\d.e+-]+)/.exec(run.stdout)?.[1]);
    if (!(seconds > 0))
      throw new Error(`ngspice gave no time: ${run.stdout.slice(-500)}${run.stderr.slice(-500)}`);
    return { waves: readRaw(readFileSync(raw)), seconds };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Every net with its own prefix in one circuit. */
function deckOf(nets: readonly BenchNet[], until: number, step: number): string {
  const lines = ["* nets side by side"];
  const saved: string[] = [];
  nets.forEach(({ network }, i) => {
    elements(network, `x${i}`, lines);
    for (const { node } of network.probes) saved.push(`v(${nodeName(node, `x${i}`)})`);
  });
  lines.push(
    ".model dclamp D(IS=1e-14 N=1.05 RS=5)",
    ".options reltol=1e-4 method=trap acct",
    `.save ${saved.join(" ")}`,
    `.tran ${step} ${until} 0 ${step}`,
    ".end",
  );
  return lines.join("\n");
}

function nodeName(node: string, prefix: string): string {
  return node === "0" ? "0" : `${prefix}${node}`;
}

function elements({ rails, drivers, sections, parts }: Network, x: string, lines: string[]): void {
  const n = (node: string) => nodeName(node, x);
  for (const rail of rails) lines.push(`V${x}${rail.name} ${n(rail.node)} 0 ${rail.volts}`);
  for (const driver of drivers) {
    if (driver.kind !== "thevenin" || driver.wave.kind !== "pwl") continue;
    const points = driver.wave.time.map(
      (t, k) => `${t} ${driver.wave.kind === "pwl" ? driver.wave.value[k] : 0}`,
    );
    lines.push(`V${x}${driver.name} ${x}src 0 PWL(${points.join(" ")})`);
    lines.push(`R${x}${driver.name} ${x}src ${n(driver.node)} ${driver.resistance}`);
  }
  for (const section of sections)
    if (section.kind === "line")
      lines.push(
        `T${x}${section.name} ${n(section.a)} 0 ${n(section.b)} 0 Z0=${section.impedance} TD=${section.delay} REL=1e6 ABS=1e6`,
      );
  for (const part of parts) {
    if (part.kind === "diode") lines.push(`D${x}${part.name} ${n(part.a)} ${n(part.b)} dclamp`);
    else if (part.kind !== "iv")
      lines.push(`${part.kind}${x}${part.name} ${n(part.a)} ${n(part.b)} ${part.value}`);
  }
}

/** A binary raw file of real numbers: a header in text, then time and all saved voltages point after point. */
function readRaw(file: Buffer): Waves {
  const mark = "Binary:\n";
  const at = file.indexOf(mark);
  const header = file.subarray(0, at).toString("latin1");
  const variables = Number(/No\. Variables: (\d+)/.exec(header)?.[1]);
  const points = Number(/No\. Points: (\d+)/.exec(header)?.[1]);
  const bytes = file.subarray(at + mark.length);
  const time = new Float64Array(points);
  const waves: Waves = Array.from({ length: variables - 1 }, () => ({
    time,
    volts: new Float64Array(points),
  }));
  for (let k = 0; k < points; k++) {
    time[k] = bytes.readDoubleLE(8 * k * variables);
    waves.forEach(({ volts }, v) => (volts[k] = bytes.readDoubleLE(8 * (k * variables + v + 1))));
  }
  return waves;
}
