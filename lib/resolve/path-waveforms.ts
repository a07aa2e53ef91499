import { DomainError } from "@/lib/si/errors";
import { simulate, type SectionWaves } from "@/lib/si/lattice/simulate";
import type { Network } from "@/lib/si/network/types";
import { PathNetwork, type PathProbe } from "@/lib/si/path/network";
import { cannotSimulate } from "@/lib/si/path/simulable";
import type { PathPin, ReceiverModel, ResolvedPath } from "@/lib/si/path/types";
import type { Corner } from "@/lib/si/rules/types";
import { pathLimits, type PathLimit } from "./path-limits";

export interface WaveformRequest {
  /** the pin that drives; the first driver, if left out */
  driverPin?: string;
  corner: Corner;
  edge: "rise" | "fall";
  /** also the waves at every section's ends, for the voltage along the line */
  waves?: boolean;
}

export interface PathProbeWave {
  pin: string;
  /** "U3.12", or "U1.4, drives" */
  label: string;
  drives: boolean;
  /** as the network names it */
  node: string;
  receiver: ReceiverModel | null;
  /** one way from the driver [s] */
  delay: number;
  /** [V], at the record's times */
  voltage: Float64Array;
}

export interface PathWaveforms {
  /** [s] from the start of the source's edge; a repeated time is a jump */
  time: Float64Array;
  /** the driver first */
  probes: PathProbeWave[];
  /** what the enabled rules allow, as lines on the voltage */
  limits: PathLimit[];
  /** what was simulated, at this corner and edge; the caller's own */
  network: Network;
  /** end of the window that the rules look at [s]; `windowIsBit`: the next edge comes then */
  until: number;
  windowIsBit: boolean;
  /** 0–100 % time of the source [s] */
  ramp: number;
  /** where the driver stands in the network */
  driverNode: string;
  driverPin: string;
  /** how long the copper of each section of the network is [m], by its name */
  lengths: Map<string, number>;
  waves: SectionWaves[] | null;
}

/**
 * What the driver and every receiver of a path see after one edge, with the limits that its rules draw: the picture
 * behind a finding. The same networks, levels and windows as `checkPath`, so that a maximum in it is the finding's.
 *
 * @throws DomainError saying what is missing, where the path cannot be simulated or the pin does not drive
 */
export function pathWaveforms(path: ResolvedPath, request: WaveformRequest): PathWaveforms {
  const { corner, edge } = request;
  const blocked = cannotSimulate(path);
  if (blocked) throw new DomainError(blocked.detail, blocked.input);
  const pin = drivingPin(path, request.driverPin);
  if (!pin.driver) throw new DomainError(`${pin.pin} has no driver model.`, "drivers");
  const prepared = new PathNetwork(path, pin, pin.driver);
  const { network: shared, until, windowIsBit, ramp } = prepared.at(corner);
  const network = structuredClone(shared);
  const source = network.drivers[0];
  if (edge === "fall" && source?.kind === "thevenin" && source.wave.kind === "pwl")
    source.wave.value = [pin.driver.vdd, 0];
  const { time, voltage, waves = null } = simulate(network, { until, waves: request.waves });
  const heard = prepared.probes.map((probe) =>
    probeWave(probe, voltage[probe.pin.pin] ?? new Float64Array(time.length)),
  );
  return {
    time,
    probes: [
      {
        pin: pin.pin,
        label: `${pin.pin}, drives`,
        drives: true,
        node: source?.node ?? pin.node,
        receiver: null,
        delay: 0,
        voltage: voltage["driver"] ?? new Float64Array(time.length),
      },
      ...heard,
    ],
    limits: prepared.probes.flatMap((probe, i) =>
      pathLimits(path, probe, {
        corner,
        edge,
        time,
        voltage: heard[i]?.voltage ?? new Float64Array(0),
        until,
        ramp,
        windowIsBit,
      }),
    ),
    network,
    until,
    windowIsBit,
    ramp,
    driverNode: source?.node ?? pin.node,
    driverPin: pin.pin,
    lengths: new Map(prepared.lines.map((line) => [line.sections[0] ?? "", lengthOf(path, line.sections)])),
    waves,
  };
}

function drivingPin(path: ResolvedPath, name: string | undefined): PathPin {
  const pin = name === undefined ? path.drivers[0] : path.drivers.find((entry) => entry.pin === name);
  if (!pin) throw new DomainError(`${name ?? "No pin"} does not drive ${path.name}.`, "drivers");
  return pin;
}

function probeWave(probe: PathProbe, simulated: Float64Array): PathProbeWave {
  const { pin, receiver, node, delay, offset } = probe;
  return {
    pin: pin.pin,
    label: pin.pin,
    drives: false,
    node,
    receiver,
    delay,
    voltage: offset === 0 ? simulated : simulated.map((volts) => volts + offset),
  };
}

function lengthOf(path: ResolvedPath, ids: readonly string[]): number {
  return path.sections.reduce((sum, section) => (ids.includes(section.id) ? sum + section.length : sum), 0);
}
