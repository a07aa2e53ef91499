import { EngineError } from "../errors";
import { PathNetwork } from "../path/network";
import { cannotSimulate } from "../path/simulable";
import type { PathPin, ResolvedPath } from "../path/types";
import { edgeRules, staticRules } from "./catalogue";
import { edgeFinding, missingFinding, staticFinding } from "./findings";
import { observe } from "./observe";
import { groupProblems, pathVerdict } from "./problems";
import type { EdgeRule, Missing, Observation } from "./rule";
import { Tally } from "./tally";
import { watch } from "./watch";
import type { CheckContext, Corner, CornerValue, Finding, PathResult, RuleDefinition } from "./types";

/**
 * Judges one path by every rule that speaks of it, at every corner, with each pin that can drive as driver in turn.
 *
 * The worst over pins, edges and corners becomes the rule's finding. A path that lacks an input, or that the engine
 * refuses, has no data by every simulated rule it cannot be judged by, and never passes. Its verdict is the worst of
 * its counting findings: fail, no data, near, pass. Deterministic; never throws for a resolved path.
 *
 * @param context corners to judge at, usually `allCorners`
 */
export function checkPath(path: ResolvedPath, context: Pick<CheckContext, "corners">): PathResult {
  const { corners } = context;
  const tallies = edgeRules
    .filter((rule) => isEnabled(path, rule.definition) && speaksOf(rule, path))
    .map((rule) => new Tally(rule));
  let blocked: Missing | null = cannotSimulate(path);
  let simulations = 0;
  if (!blocked)
    for (const pin of path.drivers) {
      try {
        simulations += simulateDriver(path, pin, corners, tallies);
      } catch (error) {
        // One path must not end a run of thousands; it has no data, which blocks a release until somebody looks.
        const said = error instanceof EngineError ? error.message : `The engine stopped: ${String(error)}`;
        blocked = { input: `simulation of ${path.name}`, detail: said };
      }
    }
  const findings: Finding[] = [];
  const values: CornerValue[] = [];
  for (const tally of tallies) {
    const finding = blocked
      ? missingFinding(path, tally.rule.definition, blocked)
      : edgeFinding(path, tally, corners.length);
    if (!finding) continue;
    findings.push(finding);
    if (!blocked) values.push(...tally.values(corners));
  }
  addStatic(path, findings, values);
  return {
    pathId: path.id,
    verdict: pathVerdict(findings),
    findings,
    problems: groupProblems(findings),
    corners: values,
    simulations,
  };
}

function isEnabled(path: ResolvedPath, definition: RuleDefinition): boolean {
  return path.limits[definition.id]?.enabled ?? definition.enabledByDefault;
}

function speaksOf(rule: EdgeRule, path: ResolvedPath): boolean {
  const receivers = path.receivers.length > 0 ? path.receivers.map((pin) => pin.receiver) : [null];
  return receivers.some((receiver) => rule.edges.some((edge) => rule.applies(path, receiver, edge)));
}

function simulateDriver(
  path: ResolvedPath,
  pin: PathPin,
  corners: readonly Corner[],
  tallies: readonly Tally[],
): number {
  if (!pin.driver) return 0;
  const prepared = new PathNetwork(path, pin, pin.driver);
  for (const probe of prepared.probes)
    for (const tally of tallies) {
      const lacks = tally.rule.lacks(path, probe.receiver);
      if (lacks) tally.lack(lacks);
    }
  let simulations = 0;
  for (const corner of corners) {
    const { time, voltage, until, windowIsBit, ramp, runs } = watch(prepared, corner, path.bitTime);
    simulations += runs;
    const seen = blankObservation(path, pin, corner, until, windowIsBit);
    for (const probe of prepared.probes) {
      const wave = voltage[probe.pin.pin];
      if (!seen || !wave) continue;
      for (const edge of ["rise", "fall"] as const) {
        observe(seen, probe, edge, { time, voltage: wave, until, ramp });
        for (const tally of tallies) {
          const { rule } = tally;
          if (
            !rule.edges.includes(edge) ||
            !rule.applies(path, probe.receiver, edge) ||
            rule.lacks(path, probe.receiver)
          )
            continue;
          tally.add(seen, rule.read(seen), rule.limit(path, probe.receiver, edge));
        }
      }
    }
  }
  return simulations;
}

function blankObservation(
  path: ResolvedPath,
  driverPin: PathPin,
  corner: Corner,
  window: number,
  windowIsBit: boolean,
): Observation | null {
  const { driver } = driverPin;
  const receiver = path.receivers.find((pin) => pin.receiver)?.receiver;
  if (!driver || !receiver) return null;
  return {
    path,
    corner,
    edge: "rise",
    driverPin,
    driver,
    receiverPin: driverPin,
    receiver,
    low: 0,
    high: 0,
    max: 0,
    maxTime: 0,
    min: 0,
    minTime: 0,
    window,
    windowIsBit,
    firstThreshold: null,
    measCrossing: null,
    sourceCrossing: 0,
    settled: null,
    ringbackMargin: null,
    ringbackTime: null,
  };
}

function addStatic(path: ResolvedPath, findings: Finding[], values: CornerValue[]): void {
  for (const rule of staticRules) {
    if (!isEnabled(path, rule.definition)) continue;
    const reading = rule.read(path);
    if (!reading) continue;
    // A selector chooses what to look at; simulation judges, and where it could not there is no data.
    const counts = !rule.definition.selector;
    if ("input" in reading) findings.push({ ...missingFinding(path, rule.definition, reading), counts });
    else {
      const { finding, corners } = staticFinding(path, rule.definition, reading);
      findings.push({ ...finding, counts });
      values.push(...corners);
    }
  }
}
