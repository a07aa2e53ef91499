import type { EdgeRule, Observation } from "../rule";
import {
  millimetres,
  nanoseconds,
  ohms,
  percent,
  picofarads,
  picoseconds,
  reflection,
  volts,
  withArticle,
} from "../words";
import { anatomy, type Anatomy } from "./anatomy";
import { bounceMechanism, isStaticLevel } from "./mechanism";

export interface Explanation {
  mechanism: string;
  cause: string;
}

/** Why a rule's value is what it is at its worst corner: the mechanism and one computed sentence. */
export function explain(rule: EdgeRule, seen: Observation): Explanation {
  const id = rule.definition.id;
  if (rule.family === "timing") return { mechanism: "late arrival", cause: lateArrival(seen) };
  const beyondRail = id === "above-rail" || id === "below-rail";
  if (beyondRail && isStaticLevel(seen)) return { mechanism: "static level", cause: staticLevel(seen) };
  if (rule.family === "level" || (id === "ringback" && isLevelShort(seen)))
    return { mechanism: "level", cause: level(seen, askedVolts(rule, seen)) };
  const found = anatomy(seen.path, seen.driverPin, seen.driver, seen.receiverPin, seen.corner);
  const seenThere = consequence(id, seen);
  if (!found) return { mechanism: "driver mismatch", cause: capital(`${seenThere}.`) };
  const mechanism = bounceMechanism(found);
  return { mechanism, cause: `${reflector(mechanism, found, seen)}; ${seenThere}.` };
}

function reflector(mechanism: string, found: Anatomy, seen: Observation): string {
  if (mechanism === "impedance step" && found.step) {
    const { from, to, toOhms, rho } = found.step;
    return `The line steps from ${ohms(from)} to ${ohms(toOhms)} on ${to.layer} (${millimetres(to.width)} wide for ${millimetres(to.length)}) and reflects ${reflection(rho)}`;
  }
  if (mechanism === "branch" && found.branch) {
    const { arms, ohms: seenOhms, line, rho, node } = found.branch;
    return `At ${node} the ${ohms(line)} line splits into ${arms}, together ${ohms(seenOhms)}, and reflects ${reflection(rho)}`;
  }
  if (mechanism === "capacitive load")
    return `The receivers' ${picofarads(found.load.farads)} on ${withArticle(ohms(found.line))} line takes ${picoseconds((found.line * found.load.farads) / 2)} to charge against ${withArticle(picoseconds(seen.driver.riseTime[seen.corner.driver]))} edge`;
  const one = found.end?.references.length === 1;
  if (mechanism === "end mismatch" && found.end)
    return `${found.end.references.join(" and ")} ${one ? "ends" : "end"} ${withArticle(ohms(found.line))} line with ${ohms(found.end.ohms)} and ${one ? "reflects" : "reflect"} ${reflection(found.rhoEnd)}`;
  const parts = found.seriesParts.map((part) => `${part.reference}'s ${ohms(part.ohms)}`).join(" and ");
  const source = parts
    ? `The driver's ${ohms(found.driverOhms)} and ${parts} make ${ohms(found.source)}`
    : `The driver is ${ohms(found.driverOhms)}`;
  const end = found.end
    ? `the ${ohms(found.end.ohms)} end at ${seen.receiverPin.pin} returns ${reflection(found.rhoEnd)} of it`
    : `the open end at ${seen.receiverPin.pin} returns all of it`;
  return `${source} on ${withArticle(ohms(found.line))} line and ${parts ? "reflect" : "reflects"} ${reflection(found.rhoSource)}; ${end}`;
}

function consequence(rule: string, seen: Observation): string {
  const rising = seen.edge === "rise";
  const at = nanoseconds(rising ? seen.maxTime : seen.minTime);
  const pin = seen.receiverPin.pin;
  if (rule === "above-rail") {
    const rail = `the ${volts(seen.receiver.vdd)} rail`;
    return `the peak at ${at} is ${volts(seen.max)}, ${aside(seen.max - seen.receiver.vdd, "above", "below")} ${rail}`;
  }
  if (rule === "below-rail")
    return `the lowest point at ${at} is ${volts(seen.min)}, ${aside(-seen.min, "below", "above")} the rail`;
  if (rule === "overshoot") {
    const beyond = rising ? seen.max - seen.high : seen.low - seen.min;
    return `${volts(beyond)} beyond the ${volts(rising ? seen.high : seen.low)} level at ${at} is ${percent((100 * beyond) / (seen.high - seen.low))} of the swing`;
  }
  if (rule === "ringback") {
    const threshold = rising
      ? `VIH of ${volts(seen.receiver.vih ?? 0)}`
      : `VIL of ${volts(seen.receiver.vil ?? 0)}`;
    if (seen.ringbackMargin === null)
      return `${pin} never gets across ${threshold} inside ${nanoseconds(seen.window)}`;
    const clear = Math.abs(seen.ringbackMargin);
    return seen.ringbackMargin < 0
      ? `the dip back goes ${volts(clear)} through ${threshold}`
      : `the dip back stays ${volts(clear)} clear of ${threshold}`;
  }
  if (seen.settled === null)
    return `${pin} is still ringing when ${seen.windowIsBit ? "the next edge comes" : "it is no longer watched"}, ${nanoseconds(seen.window)} after the edge`;
  const bit = seen.path.bitTime === null ? "" : ` of ${withArticle(nanoseconds(seen.path.bitTime))} bit`;
  return `${pin} stays within 10 % of its level only after ${nanoseconds(seen.settled)}${bit}`;
}

function staticLevel({ edge, high, low, receiver, receiverPin, driver }: Observation): string {
  return edge === "rise"
    ? `The steady high level at ${receiverPin.pin} is ${volts(high)}, ${volts(high - receiver.vdd)} above its ${volts(receiver.vdd)} rail; the driver works from ${volts(driver.vdd)}.`
    : `The steady low level at ${receiverPin.pin} is ${volts(low)}, ${volts(-low)} below its rail.`;
}

function isLevelShort({ edge, high, low, receiver }: Observation): boolean {
  return edge === "rise"
    ? receiver.vih !== null && high <= receiver.vih
    : receiver.vil !== null && low >= receiver.vil;
}

/** The clear voltage that the level rule asks for; null under other rules. */
function askedVolts(rule: EdgeRule, { path, receiver, edge }: Observation): number | null {
  const { limit } = rule.limit(path, receiver, edge);
  return rule.family === "level" && limit !== null ? (limit / 100) * receiver.vdd : null;
}

function level(seen: Observation, asked: number | null): string {
  const { edge, high, low, receiver, receiverPin, driver, corner, path } = seen;
  const steady = edge === "rise" ? high : low;
  const threshold = edge === "rise" ? (receiver.vih ?? 0) : (receiver.vil ?? 0);
  const clear = edge === "rise" ? steady - threshold : threshold - steady;
  const dividers = path.parts.filter(
    (part) => part.role === "termination" && part.kind === "R" && part.value,
  );
  const why = dividers.length
    ? `${dividers.map((part) => `${part.reference} (${ohms(part.value ?? 0)})`).join(" and ")} against the ${ohms(driver.resistance[corner.driver])} driver of ${volts(driver.vdd)}`
    : `The ${volts(driver.vdd)} driver`;
  const name = `${edge === "rise" ? "VIH" : "VIL"} of ${volts(threshold)}`;
  const stands = clear < 0 ? `${volts(-clear)} short of ${name}` : `${volts(clear)} clear of ${name}`;
  const wanted = asked === null ? "" : `; ${volts(asked)} is asked for`;
  return `${why} leaves a steady ${edge === "rise" ? "high" : "low"} level of ${volts(steady)} at ${receiverPin.pin}, ${stands}${wanted}.`;
}

function lateArrival(seen: Observation): string {
  const found = anatomy(seen.path, seen.driverPin, seen.driver, seen.receiverPin, seen.corner);
  const level = volts(seen.receiver.vmeas ?? seen.receiver.vdd / 2);
  if (seen.measCrossing === null)
    return `${seen.receiverPin.pin} does not reach ${level} within ${nanoseconds(seen.window)}.`;
  const line = found ? `, of which the line takes ${picoseconds(found.delay)}` : "";
  const load =
    found && found.load.farads > 0
      ? ` and ${picofarads(found.load.farads)} behind ${ohms(Math.max(found.source, found.line))} slows the edge`
      : "";
  const driver = `The ${seen.corner.driver} driver's ${picoseconds(seen.driver.riseTime[seen.corner.driver])} edge`;
  return `${driver} crosses ${level} at ${seen.receiverPin.pin} after ${picoseconds(seen.measCrossing - seen.sourceCrossing)} of flight${line}${load}.`;
}

function aside(beyond: number, outside: string, inside: string): string {
  return beyond >= 0 ? `${volts(beyond)} ${outside}` : `${volts(-beyond)} ${inside}`;
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
