import type { DriverModel, ReceiverModel } from "@/lib/si/path/types";
import type { StoredModel } from "@/lib/schemas/model";
import type { SiValues } from "./si-values";

export interface SiModel {
  driver: DriverModel | null;
  receiver: ReceiverModel | null;
}

/** A stored model in SI units. */
export function siModel(model: StoredModel, si: SiValues): SiModel {
  const assumed = model.origin === "assumed";
  const { driver, receiver } = model;
  return {
    driver: driver && {
      name: model.name,
      vdd: si.of(driver.vdd, "voltage"),
      resistance: {
        slow: si.of(driver.resistance.slow, "resistance"),
        typical: si.of(driver.resistance.typical, "resistance"),
        fast: si.of(driver.resistance.fast, "resistance"),
      },
      riseTime: {
        slow: si.of(driver.riseTime.slow, "time"),
        typical: si.of(driver.riseTime.typical, "time"),
        fast: si.of(driver.riseTime.fast, "time"),
      },
      capacitance: si.orNull(driver.capacitance, "capacitance"),
      assumed,
    },
    receiver: receiver && {
      name: model.name,
      vdd: si.of(receiver.vdd, "voltage"),
      capacitance: {
        min: si.of(receiver.capacitance.min, "capacitance"),
        typical: si.of(receiver.capacitance.typical, "capacitance"),
        max: si.of(receiver.capacitance.max, "capacitance"),
      },
      vil: si.orNull(receiver.vil, "voltage"),
      vih: si.orNull(receiver.vih, "voltage"),
      vilAc: si.orNull(receiver.vilAc, "voltage"),
      vihAc: si.orNull(receiver.vihAc, "voltage"),
      vmeas: si.orNull(receiver.vmeas, "voltage"),
      maxAbove: si.orNull(receiver.maxAbove, "voltage"),
      maxBelow: si.orNull(receiver.maxBelow, "voltage"),
      assumed,
    },
  };
}

/** The class's own driver at the class's edge: its typical edge is `edge`, slow and fast keep their ratio to it. */
export function withEdge(driver: DriverModel, edge: number | null): DriverModel {
  if (edge === null) return driver;
  const scale = edge / driver.riseTime.typical;
  const { slow, fast } = driver.riseTime;
  return { ...driver, riseTime: { slow: slow * scale, typical: edge, fast: fast * scale } };
}
