import type { PathPart, PathSection, ResolvedPath } from "./types";

export type RouteStep =
  | { kind: "section"; section: PathSection; from: string; to: string }
  | { kind: "part"; part: PathPart; from: string; to: string };

export interface Route {
  /** in order from the driver */
  steps: RouteStep[];
  /** one-way delay [s]; null where a section's delay is not known */
  delay: number | null;
}

/**
 * The routes that copper and series parts make from one node to every node they reach; in a loop, the one with the
 * fewest steps. Terminations lead to rails and are no route.
 */
export class PathTrace {
  private readonly arrival = new Map<string, RouteStep | null>();

  constructor(path: ResolvedPath, start: string) {
    const leaving = new Map<string, RouteStep[]>();
    const leave = (step: RouteStep) => {
      const list = leaving.get(step.from);
      if (list) list.push(step);
      else leaving.set(step.from, [step]);
    };
    for (const section of path.sections) {
      leave({ kind: "section", section, from: section.a, to: section.b });
      leave({ kind: "section", section, from: section.b, to: section.a });
    }
    for (const part of path.parts) {
      if (part.role !== "series") continue;
      leave({ kind: "part", part, from: part.a, to: part.b });
      leave({ kind: "part", part, from: part.b, to: part.a });
    }
    this.arrival.set(start, null);
    const queue = [start];
    for (let i = 0; i < queue.length; i++)
      for (const step of leaving.get(queue[i] ?? "") ?? []) {
        if (this.arrival.has(step.to)) continue;
        this.arrival.set(step.to, step);
        queue.push(step.to);
      }
  }

  reaches(node: string): boolean {
    return this.arrival.has(node);
  }

  /** Empty where the node is the start or is not reached. */
  to(node: string): Route {
    const steps: RouteStep[] = [];
    for (let step = this.arrival.get(node); step; step = this.arrival.get(step.from)) steps.push(step);
    steps.reverse();
    return { steps, delay: totalDelay(steps) };
  }
}

function totalDelay(steps: RouteStep[]): number | null {
  let delay = 0;
  for (const step of steps) {
    if (step.kind === "part") continue;
    if (step.section.delayPerMeter === null) return null;
    delay += step.section.length * step.section.delayPerMeter;
  }
  return delay;
}

/** The longest of a route's sections by delay that begins at or after `after` steps: the line that a resistor sees. */
export function mainSection(route: Route, after = 0): PathSection | null {
  let main: PathSection | null = null;
  for (const step of route.steps.slice(after))
    if (step.kind === "section" && step.section.impedance && (!main || step.section.length > main.length))
      main = step.section;
  return main;
}

/** Resistors in series between the driver and the route's main line: what makes the source, with the driver. */
export function sourceResistors(route: Route): PathPart[] {
  const main = mainSection(route);
  const found: PathPart[] = [];
  for (const step of route.steps) {
    if (step.kind === "section" && step.section === main) break;
    if (step.kind === "part" && step.part.kind === "R" && step.part.value) found.push(step.part);
  }
  return found;
}
