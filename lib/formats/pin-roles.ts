import type { BindingDoc, PinRole } from "@/lib/schemas/model";
import { globMatcher } from "./glob";

export interface RolePin {
  net: string;
  reference: string;
  pin: string;
  /** "" when the parts list does not know the part. */
  partNumber: string;
  /** A role that the list itself gave; it stands before any rule. */
  role?: PinRole | null;
}

export type RoleRule = Pick<
  BindingDoc,
  "referencePattern" | "partNumberPattern" | "pinPattern" | "netPattern" | "role"
>;

export interface RoleResult {
  /** One for each pin, in its order; null where no rule fits. */
  roles: (PinRole | null)[];
  /** Pins that each rule decided (the first that fits wins). */
  pinsOfRule: number[];
  pins: { driver: number; receiver: number; either: number; passive: number; open: number };
  /** Nets by how many of their pins can drive. */
  nets: { noDriver: number; oneDriver: number; severalDrivers: number };
}

/** Gives each pin its role by the table of patterns and counts what came of it. */
export function assignRoles(pins: readonly RolePin[], rules: readonly RoleRule[]): RoleResult {
  const tests = rules.map((rule) => ({
    role: rule.role,
    reference: globMatcher(rule.referencePattern),
    partNumber: globMatcher(rule.partNumberPattern),
    pin: globMatcher(rule.pinPattern),
    net: globMatcher(rule.netPattern),
  }));
  const result: RoleResult = {
    roles: [],
    pinsOfRule: rules.map(() => 0),
    pins: { driver: 0, receiver: 0, either: 0, passive: 0, open: 0 },
    nets: { noDriver: 0, oneDriver: 0, severalDrivers: 0 },
  };
  const drivers = new Map<string, number>();
  // A part has hundreds of pins, and few rules fit it.
  const ofPart = new Map<string, { index: number; test: (typeof tests)[number] }[]>();
  const fitting = ({ reference, partNumber }: RolePin) => {
    const key = `${reference}\u0000${partNumber}`;
    let found = ofPart.get(key);
    if (!found) {
      found = tests.flatMap((test, index) =>
        test.reference(reference) && test.partNumber(partNumber) ? [{ index, test }] : [],
      );
      ofPart.set(key, found);
    }
    return found;
  };
  for (const pin of pins) {
    let role = pin.role ?? null;
    if (role === null) {
      const rule = fitting(pin).find(({ test }) => test.pin(pin.pin) && test.net(pin.net));
      role = rule?.test.role ?? null;
      if (rule) result.pinsOfRule[rule.index] = (result.pinsOfRule[rule.index] ?? 0) + 1;
    }
    result.roles.push(role);
    result.pins[role ?? "open"]++;
    const drives = role === "driver" || role === "either" ? 1 : 0;
    drivers.set(pin.net, (drivers.get(pin.net) ?? 0) + drives);
  }
  for (const count of drivers.values()) {
    if (count === 0) result.nets.noDriver++;
    else if (count === 1) result.nets.oneDriver++;
    else result.nets.severalDrivers++;
  }
  return result;
}
