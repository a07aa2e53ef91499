import type { DriverModel, PathPin, ReceiverModel, ResolvedLimit, ResolvedPath } from "../path/types";
import type { Corner, RuleDefinition } from "./types";

export type Edge = "rise" | "fall";

/** What one receiver sees after one edge of one driver at one corner; volts at the pin, times from the edge's start. */
export interface Observation {
  path: ResolvedPath;
  corner: Corner;
  edge: Edge;
  driverPin: PathPin;
  driver: DriverModel;
  receiverPin: PathPin;
  receiver: ReceiverModel;
  /** DC levels of this pin, low < high [V] */
  low: number;
  high: number;
  /** extremes inside the window [V], [s] */
  max: number;
  maxTime: number;
  min: number;
  minTime: number;
  /** [s]; `windowIsBit`: it ends with the next edge */
  window: number;
  windowIsBit: boolean;
  /** first crossing of the near threshold (VIL rising, VIH falling; Vmeas where the part states none), null: never */
  firstThreshold: number | null;
  /** first crossing of Vmeas by the receiver, and by the driver's open-circuit wave */
  measCrossing: number | null;
  sourceCrossing: number;
  /** from the edge's start until it stays within 10 % of swing; null: not inside the window */
  settled: number | null;
  /** V beyond the far threshold at the worst of the dip back, mirrored on the falling edge; null without thresholds */
  ringbackMargin: number | null;
  /** time of that dip; null where nothing dips */
  ringbackTime: number | null;
}

/** One measured value; `fails` where there is none but the behaviour itself breaks the rule (never gets there). */
export interface Reading {
  value: number | null;
  time: number | null;
  fails?: boolean;
}

export interface Missing {
  input: string;
  detail: string;
}

/** Families of mechanism: what can make the rule's value bad. */
export type Family = "bounce" | "level" | "timing";

/** A rule judged on simulated edges, at every receiver and corner. */
export interface EdgeRule {
  kind: "edge";
  definition: RuleDefinition;
  family: Family;
  edges: readonly Edge[];
  /** Whether the rule speaks of this receiver at all. */
  applies(path: ResolvedPath, receiver: ReceiverModel | null, edge: Edge): boolean;
  /** The input it lacks at this receiver, or null. */
  lacks(path: ResolvedPath, receiver: ReceiverModel): Missing | null;
  limit(path: ResolvedPath, receiver: ReceiverModel, edge: Edge): Limit;
  read(seen: Observation): Reading;
}

export interface Limit {
  limit: number | null;
  origin: ResolvedLimit["origin"];
}

/** A value that needs no simulation; one entry for each corner that matters. */
export interface StaticReading {
  corners: { corner: Corner; value: number }[];
  limit: Limit;
  pin: string | null;
  mechanism: string;
  /** for the worst entry */
  cause(value: number): string;
  restsOnAssumed: boolean;
}

export interface StaticRule {
  kind: "static";
  definition: RuleDefinition;
  /** null: the rule does not speak of this path; `input`: what it lacks */
  read(path: ResolvedPath): StaticReading | Missing | null;
}

export type Rule = EdgeRule | StaticRule;

/** The limit as resolved for this path; the rule's default where the path carries none. */
export function pathLimit(path: ResolvedPath, definition: RuleDefinition): Limit {
  const entry = path.limits[definition.id];
  return entry
    ? { limit: entry.limit, origin: entry.origin }
    : { limit: definition.defaultLimit, origin: "default" };
}

/**
 * A part's own maximum before the project's limit (model → data sheet → class → project); a class or a net may only
 * be stricter than the part.
 */
export function partLimit(path: ResolvedPath, definition: RuleDefinition, ofPart: number | null): Limit {
  const set = pathLimit(path, definition);
  if (ofPart === null) return set;
  const stricter =
    (set.origin === "net" || set.origin === "class") && set.limit !== null && set.limit < ofPart;
  return stricter ? set : { limit: ofPart, origin: "model" };
}
