import type { DriverModel, PathSection, ReceiverModel, ResolvedPath } from "@/lib/si/path/types";

const same = <T>(value: T) => ({ slow: value, typical: value, fast: value });

/** A driver alike at all speeds; `ramp` is its 0–100 % time [s]. */
export function driverModel(resistance: number, ramp: number, over: Partial<DriverModel> = {}): DriverModel {
  return {
    name: `D${resistance}`,
    vdd: 3.3,
    resistance: same(resistance),
    riseTime: same(0.8 * ramp),
    capacitance: null,
    assumed: false,
    ...over,
  };
}

export function receiverModel(over: Partial<ReceiverModel> = {}): ReceiverModel {
  return {
    name: "IN",
    vdd: 3.3,
    capacitance: { min: 0, typical: 0, max: 0 },
    vil: 0.8,
    vih: 2.0,
    vilAc: null,
    vihAc: null,
    vmeas: null,
    maxAbove: null,
    maxBelow: null,
    assumed: false,
    ...over,
  };
}

export function section(
  a: string,
  b: string,
  ohms: number,
  delay: number,
  over: Partial<PathSection> = {},
): PathSection {
  return {
    id: `${a}-${b}`,
    net: "NET",
    a,
    b,
    layer: "L1",
    width: 0.15e-3,
    length: delay / 6e-9,
    impedance: { low: ohms, nominal: ohms, high: ohms },
    delayPerMeter: 6e-9,
    method: "typed",
    missing: null,
    ...over,
  };
}

/** One driver U1.1, one line, one receiver U2.1. */
export function pointToPoint(
  driver: DriverModel,
  ohms: number,
  delay: number,
  over: Partial<ResolvedPath> = {},
  receiver = receiverModel(),
): ResolvedPath {
  return {
    id: "net-1",
    name: "NET",
    nets: [{ lineageId: "net-1", name: "NET" }],
    className: "Data",
    classLineageId: "class-1",
    signal: "data",
    bitTime: 40e-9,
    target: { ohms, tolerance: 0.1, kind: "single" },
    sections: [section("U1.1", "U2.1", ohms, delay)],
    parts: [],
    rails: [],
    drivers: [{ pin: "U1.1", node: "U1.1", net: "NET", driver, receiver: null }],
    receivers: [{ pin: "U2.1", node: "U2.1", net: "NET", driver: null, receiver }],
    viaCount: 0,
    neighbours: [],
    geometryKnown: false,
    termination: { scheme: "none", resistance: null, resistanceLow: null, capacitance: null, voltage: null },
    flightTimeMax: null,
    spacing: null,
    missing: [],
    limits: {},
    ...over,
  };
}
