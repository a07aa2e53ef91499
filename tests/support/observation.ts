import type { Observation } from "@/lib/si/rules/rule";
import { driverModel, pointToPoint, receiverModel } from "./resolved-path";

/** A rising edge that settles without ringing, to change one thing of. */
export function observation(over: Partial<Observation> = {}): Observation {
  const driver = driverModel(50, 1e-9);
  const receiver = receiverModel();
  const path = pointToPoint(driver, 50, 1e-9, {}, receiver);
  const [driverPin] = path.drivers;
  const [receiverPin] = path.receivers;
  if (!driverPin || !receiverPin) throw new Error("the fixture has two pins");
  return {
    path,
    corner: { driver: "typical", impedance: "nominal" },
    edge: "rise",
    driverPin,
    driver,
    receiverPin,
    receiver,
    low: 0,
    high: 3.3,
    max: 3.3,
    maxTime: 2e-9,
    min: 0,
    minTime: 0,
    window: 40e-9,
    windowIsBit: true,
    firstThreshold: 1.2e-9,
    measCrossing: 1.5e-9,
    sourceCrossing: 0.5e-9,
    settled: 1.9e-9,
    ringbackMargin: 1.3,
    ringbackTime: null,
    ...over,
  };
}
