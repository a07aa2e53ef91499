import type { LinearPart, LineSection, Network } from "../network/types";
import type { Corner, DriverSpeed } from "../rules/types";
import { coupledBias, couplingTime, joinNodes } from "./coupling";
import { dcLevels, type DcResistor } from "./levels";
import { chainLines, type PathLine } from "./lines";
import { NodeMap } from "./node-map";
import { PathTrace, sourceResistors } from "./trace";
import type { DriverModel, PathPin, ReceiverModel, ResolvedPath } from "./types";
import { watchWindow } from "./window";

/** A linear ramp's 10–90 % time is 0.8 of its whole. */
export const RAMP_SHARE = 0.8;

const SEVERAL_LINES_GAIN = 0.5;
/** Pieces this many times shorter than the fast edge are no lines of their own. */
const NEGLIGIBLE = 200;

export interface PathProbe {
  pin: PathPin;
  receiver: ReceiverModel;
  node: string;
  /** one way from the driver [s] */
  delay: number;
  /** V added to what is simulated: where a coupling capacitor blocks the DC level, bias − middle of the swing */
  offset: number;
  /** DC levels by driver speed [V], offset included */
  levels: Record<DriverSpeed, { low: number; high: number }>;
}

/** One corner of a path, ready to simulate: the network belongs to the PathNetwork and is refilled for the next corner. */
export interface CornerNetwork {
  network: Network;
  until: number;
  windowIsBit: boolean;
  /** 0–100 % time of the source ramp, which starts at t = 0 [s] */
  ramp: number;
}

/**
 * A path with one of its pins driving, as a network whose corner values are filled in place: the topology is worked
 * out once for nine corners.
 *
 * Slow: weak driver, long edge and the receivers' largest capacitance (latest arrival). Fast: strong driver, short edge
 * and the smallest capacitance (it softens the edge least, so it rings hardest). Impedances of all sections move
 * together. The source rises from 0 V to the driver's supply; the falling edge of a linear network is its mirror:
 * v_fall = V_hi + V_lo − v_rise, whatever the rails.
 */
export class PathNetwork {
  readonly probes: PathProbe[] = [];
  readonly lines: PathLine[];
  /** longest one-way delay to a probe [s] */
  readonly delay: number;
  private readonly network: Network;
  private readonly sections: LineSection[] = [];
  private readonly loads: { part: LinearPart; farads: Record<DriverSpeed, number> }[] = [];
  private readonly ramp: { time: number[]; value: number[] };
  private readonly driver: DriverModel;
  /** resistors between the driver and the main line [Ω] */
  private readonly sourceSeries: number;
  private readonly driverNode: string;
  private readonly nodes: NodeMap;

  constructor(
    private readonly path: ResolvedPath,
    readonly driverPin: PathPin,
    driver: DriverModel,
  ) {
    this.driver = driver;
    const trace = new PathTrace(path, driverPin.node);
    const listening = path.receivers.filter((pin) => pin.node !== driverPin.node && pin.receiver !== null);
    const delays = listening.map((pin) => trace.to(pin.node).delay ?? 0);
    this.delay = Math.max(0, ...delays);
    const farthest = listening[delays.indexOf(this.delay)];
    this.sourceSeries = farthest
      ? sourceResistors(trace.to(farthest.node)).reduce((sum, part) => sum + (part.value ?? 0), 0)
      : 0;
    const coupling = couplingTime(path, driver);
    this.nodes = joinNodes(path, coupling);
    const kept = new Set([...path.drivers, ...path.receivers].map((pin) => this.nodes.find(pin.node)));
    for (const part of path.parts) kept.add(this.nodes.find(part.a)).add(this.nodes.find(part.b));
    const chained = chainLines(path.sections, this.nodes, kept, driver.riseTime.fast / NEGLIGIBLE);
    this.lines = chained.lines;
    const rails = new Map(path.rails.map((rail) => [this.nodes.find(rail.node), rail.volts]));
    this.driverNode = this.nodes.find(driverPin.node);
    this.ramp = { time: [0, 1e-12], value: [0, driver.vdd] };
    this.network = {
      rails: [...rails].map(([node, volts]) => ({ name: node, node, volts })),
      drivers: [
        {
          name: driverPin.pin,
          kind: "thevenin",
          node: this.driverNode,
          resistance: 0,
          wave: { kind: "pwl", ...this.ramp },
        },
      ],
      sections: this.sections,
      parts: [],
      probes: [],
    };
    this.addLines();
    this.addParts();
    this.addLoads(listening);
    for (const { node, farads } of chained.lumps)
      this.addLoad(node, { slow: farads, typical: farads, fast: farads });
    this.addProbes(listening, delays, coupling);
  }

  /** Fills the network with one corner's values. The same object each time. */
  at(corner: Corner): CornerNetwork {
    const ramp = this.driver.riseTime[corner.driver] / RAMP_SHARE;
    this.lines.forEach((line, i) => {
      const section = this.sections[i];
      if (section) section.impedance = line.impedance[corner.impedance];
    });
    for (const { part, farads } of this.loads) part.value = farads[corner.driver];
    const source = this.network.drivers[0];
    if (source?.kind === "thevenin") source.resistance = this.driver.resistance[corner.driver];
    this.ramp.time[1] = ramp;
    const line = this.lines[0]?.impedance[corner.impedance] ?? 50;
    const { until, isBit } = watchWindow({
      ramp,
      delay: this.delay,
      allDelays: this.lines.reduce((sum, entry) => sum + entry.delay, 0),
      roundTripGain: this.roundTripGain(corner),
      timeConstants: this.timeConstants(corner, line),
      bitTime: this.path.bitTime,
    });
    return { network: this.network, until, windowIsBit: isBit, ramp };
  }

  private roundTripGain({ driver, impedance }: Corner): number {
    // Steps and branches keep a wave between them: no less than this where there are several lines.
    let gain = this.lines.length > 1 ? SEVERAL_LINES_GAIN : 0;
    const source = this.driver.resistance[driver] + this.sourceSeries;
    for (const line of this.lines) {
      const z = line.impedance[impedance];
      gain = Math.max(gain, Math.abs((source - z) / (source + z)));
    }
    return gain;
  }

  private timeConstants({ driver, impedance }: Corner, line: number): number {
    let farads = 0;
    for (const load of this.loads) farads += load.farads[driver];
    for (const part of this.network.parts)
      if (part.kind === "C" && part.name !== "load") farads += part.value;
    const source = this.driver.resistance[driver] + this.sourceSeries;
    const henries = this.network.parts.reduce((sum, part) => (part.kind === "L" ? sum + part.value : sum), 0);
    const z = this.lines[0]?.impedance[impedance] ?? line;
    return farads * Math.max(source, z) + henries / z;
  }

  private addLines() {
    this.lines.forEach((line, i) => {
      this.sections.push({
        name: line.sections[0] ?? `line ${i}`,
        kind: "line",
        a: line.a,
        b: line.b,
        impedance: line.impedance.nominal,
        delay: line.delay,
      });
    });
  }

  private addParts() {
    for (const part of this.path.parts) {
      const a = this.nodes.find(part.a);
      const b = this.nodes.find(part.b);
      if (a !== b && part.value !== null && part.value > 0)
        this.network.parts.push({ name: part.reference, kind: part.kind, a, b, value: part.value });
    }
  }

  private addLoads(listening: readonly PathPin[]) {
    for (const pin of listening) {
      const c = pin.receiver?.capacitance;
      if (c) this.addLoad(pin.node, { slow: c.max, typical: c.typical, fast: c.min });
    }
    for (const pin of this.path.drivers) {
      // A driver that is off loads the line by its capacitance; one that can also receive is counted above.
      const c = pin.driver?.capacitance ?? 0;
      if (c > 0 && (pin.node === this.driverPin.node || !pin.receiver))
        this.addLoad(pin.node, { slow: c, typical: c, fast: c });
    }
  }

  private addLoad(pinNode: string, farads: Record<DriverSpeed, number>) {
    if (Math.max(farads.slow, farads.typical, farads.fast) <= 0) return;
    const part: LinearPart = {
      name: "load",
      kind: "C",
      a: this.nodes.find(pinNode),
      b: "0",
      value: farads.typical,
    };
    this.network.parts.push(part);
    this.loads.push({ part, farads });
  }

  private addProbes(listening: readonly PathPin[], delays: readonly number[], coupling: number) {
    const wanted = listening.map((pin) => pin.node);
    const levels = {
      slow: this.dc("slow", wanted),
      typical: this.dc("typical", wanted),
      fast: this.dc("fast", wanted),
    };
    listening.forEach((pin, i) => {
      if (!pin.receiver) return;
      const bias = coupledBias(this.path, this.driverPin.node, pin.node, coupling);
      const at = (speed: DriverSpeed) => ({
        low: levels[speed].low[i] ?? 0,
        high: levels[speed].high[i] ?? 0,
      });
      const middle = (at("typical").low + at("typical").high) / 2;
      const offset = bias === null ? 0 : bias - middle;
      const shifted = (speed: DriverSpeed) => ({
        low: at(speed).low + offset,
        high: at(speed).high + offset,
      });
      const node = this.nodes.find(pin.node);
      this.network.probes.push({ name: pin.pin, node });
      this.probes.push({
        pin,
        receiver: pin.receiver,
        node,
        delay: delays[i] ?? 0,
        offset,
        levels: { slow: shifted("slow"), typical: shifted("typical"), fast: shifted("fast") },
      });
    });
    this.network.probes.push({ name: "driver", node: this.driverNode });
  }

  private dc(speed: DriverSpeed, wanted: readonly string[]): { low: number[]; high: number[] } {
    const resistors: DcResistor[] = [];
    const joined = new NodeMap();
    const nodeOf = (node: string) => this.nodes.find(node);
    for (const line of this.lines) joined.join(line.a, line.b);
    for (const part of this.network.parts) {
      if (part.kind === "L") joined.join(part.a, part.b);
      if (part.kind === "R") resistors.push({ a: part.a, b: part.b, ohms: part.value });
    }
    const fixed = new Map(this.network.rails.map((rail) => [rail.node, rail.volts]));
    const ohms = this.driver.resistance[speed];
    if (ohms > 0) resistors.push({ a: "source", b: this.driverNode, ohms });
    else joined.join("source", this.driverNode);
    const nodes = wanted.map(nodeOf);
    const low = dcLevels(resistors, new Map([...fixed, ["source", 0]]), joined, nodes);
    const high = dcLevels(resistors, new Map([...fixed, ["source", this.driver.vdd]]), joined, nodes);
    return { low, high };
  }
}
