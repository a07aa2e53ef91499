import { pinsInOnePlace } from "@/lib/si/path/pins-in-one-place";
import type { ResolvedPath } from "@/lib/si/path/types";
import type { StoredNet } from "@/lib/schemas/net";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import type { RevisionInputs } from "@/lib/schemas/snapshot";
import { indexBoard, type BoardIndex } from "./board-index";
import { groupPaths, type PathGroup } from "./path-groups";
import { resolveParts } from "./path-parts";
import { resolvePins, type MissingInput } from "./path-pins";
import { resolveSections } from "./path-sections";
import { byName } from "./pin-names";
import { isRail, railVoltage } from "./rails";
import { findUnreached } from "./reach";

export interface OutOfScopeNet {
  lineageId: string;
  name: string;
  kind: StoredNet["scopeKind"];
  reason: string;
}

export interface ResolvedBoard {
  /** In the order of their names. One that cannot be simulated yet is here too, with what is missing. */
  paths: ResolvedPath[];
  outOfScope: OutOfScopeNet[];
}

/**
 * Everything a check judges, from everything a person entered: nets joined through two-terminal parts into signal
 * paths, with models, impedances, neighbours and limits in SI units. Whatever is not known stands in `missing`, by
 * the input that would fill it. Pure: the same inputs give the same paths in the same order.
 */
export function resolvePaths(inputs: RevisionInputs): ResolvedBoard {
  const board = indexBoard(inputs);
  const result: ResolvedBoard = { paths: [], outOfScope: inputs.nets.filter(isRail).map(describeRail) };
  for (const group of groupPaths(inputs.nets, board.twoTerminals.parts)) {
    if (group.nets.every((net) => net.scope === "out"))
      for (const net of group.nets)
        result.outOfScope.push({
          lineageId: net.lineageId,
          name: net.name,
          kind: net.scopeKind,
          reason: net.scopeReason,
        });
    else result.paths.push(resolvePath(group, board));
  }
  result.paths.sort((a, b) => byName(a.name, b.name) || byName(a.id, b.id));
  result.outOfScope.sort((a, b) => byName(a.name, b.name));
  return result;
}

function describeRail(net: StoredNet): OutOfScopeNet {
  const volts = railVoltage(net.name);
  const kind = net.scopeKind === "signal" ? (volts === 0 ? "ground" : "power") : net.scopeKind;
  return {
    lineageId: net.lineageId,
    name: net.name,
    kind,
    reason: net.scopeReason || `Its name is that of a ${kind} net.`,
  };
}

function resolvePath(group: PathGroup, board: BoardIndex): ResolvedPath {
  const byLength = new Map(group.nets.map((net) => [net, routedLength(net, board)]));
  const longest = [...group.nets].sort(
    (a, b) => (byLength.get(b) ?? 0) - (byLength.get(a) ?? 0) || byName(a.name, b.name),
  );
  const netClass =
    longest.map((net) => board.netClass(net.classLineageId)).find((entry) => entry !== null) ?? null;
  const target = classTarget(netClass, board);
  const pins = resolvePins(group, netClass, board);
  const sections = resolveSections(group.nets, netClass, target, board);
  const joined = resolveParts(group, netClass, board);
  const firstDriver = pins.drivers[0];
  const driving = group.nets.find((net) => net.name === firstDriver?.net) ?? group.nets[0];
  const named = longest.find((net) => net.scope !== "out") ?? driving;
  const flightTimeMax = board.si.orNull(netClass?.flightTimeMax ?? null, "time");
  const path: ResolvedPath = {
    id: driving?.lineageId ?? "",
    name: named?.name ?? "",
    nets: group.nets.map((net) => ({ lineageId: net.lineageId, name: net.name })),
    className: netClass?.name ?? null,
    classLineageId: netClass?.lineageId ?? null,
    signal: netClass?.signal ?? "data",
    bitTime: bitTime(netClass, board),
    target,
    sections: sections.sections,
    parts: joined.parts,
    rails: joined.rails,
    drivers: pins.drivers,
    receivers: pins.receivers,
    viaCount: group.nets.reduce((sum, net) => sum + net.topology.viaCount, 0),
    neighbours: resolveNeighbours(group, board),
    geometryKnown: board.geometryKnown,
    termination: classTermination(netClass, board),
    flightTimeMax,
    spacing: board.si.orNull(netClass?.spacing ?? null, "length"),
    missing: [...routeGaps(group, board), ...pairGaps(group, netClass)],
    limits: board.limits.of(group.nets, netClass, flightTimeMax),
  };
  path.missing.push(...sections.missing, ...pins.missing, ...joined.missing);
  if (path.missing.length === 0) path.missing.push(...findUnreached(path));
  return path;
}

function routedLength(net: StoredNet, board: BoardIndex): number {
  return net.topology.sections.reduce((sum, section) => sum + board.si.of(section.length, "length"), 0);
}

function classTarget(netClass: StoredNetClass | null, board: BoardIndex): ResolvedPath["target"] {
  if (!netClass?.targetImpedance) return null;
  return {
    ohms: board.si.of(netClass.targetImpedance, "resistance"),
    tolerance: Number(netClass.tolerancePercent) / 100,
    kind: netClass.kind,
  };
}

/** Half a period for a clock, which has two edges in each. */
function bitTime(netClass: StoredNetClass | null, board: BoardIndex): number | null {
  if (!netClass?.rate) return null;
  const rate = board.si.of(netClass.rate, "frequency");
  return netClass.signal === "clock" ? 0.5 / rate : 1 / rate;
}

function classTermination(netClass: StoredNetClass | null, board: BoardIndex): ResolvedPath["termination"] {
  const entry = netClass?.termination;
  return {
    scheme: entry?.scheme ?? "none",
    resistance: board.si.orNull(entry?.resistance ?? null, "resistance"),
    resistanceLow: board.si.orNull(entry?.resistanceLow ?? null, "resistance"),
    capacitance: board.si.orNull(entry?.capacitance ?? null, "capacitance"),
    voltage: board.si.orNull(entry?.voltage ?? null, "voltage"),
  };
}

function resolveNeighbours(group: PathGroup, board: BoardIndex): ResolvedPath["neighbours"] {
  const own = new Set(group.nets.map((net) => net.name));
  return group.nets
    .flatMap((net) => board.neighbours.get(net.name) ?? [])
    .filter((row) => !own.has(row.neighbour))
    .map((row) => ({
      neighbour: row.neighbour,
      layer: row.layer,
      gap: board.si.of(row.gap, "length"),
      parallelLength: board.si.of(row.parallelLength, "length"),
      heightOverPlane: board.lines.heightOverPlane(row.layer),
    }));
}

function routeGaps(group: PathGroup, board: BoardIndex): MissingInput[] {
  const missing: MissingInput[] = [];
  for (const net of group.nets) {
    const input = `route of ${net.name}`;
    if (net.scope === "incomplete" || net.gaps.length > 0)
      missing.push({
        input,
        detail: net.gaps.map((gap) => gap.text).join(" ") || "The route does not join all its pins.",
      });
    else if (net.topology.sections.length === 0 && net.topology.pins.length > 1)
      missing.push({ input, detail: `${net.name} has pins but no routed section.` });
    else if (!net.topology.shapeKnown && net.topology.pins.length > 2)
      missing.push({
        input: `branch lengths of ${net.name}`,
        detail: "Its length is known, but not how its receivers hang on the line. Import its sections.",
      });
    else {
      const unrouted = pinsInOnePlace(
        net.topology.sections.map(({ from, to, length }) => ({
          from,
          to,
          length: board.si.of(length, "length"),
        })),
        net.topology.pins.map(({ node }) => node),
      );
      if (unrouted)
        missing.push({
          input,
          detail: `The route has no length between ${unrouted.join(" and ")}. Route it or give its length.`,
        });
    }
  }
  return missing;
}

function pairGaps(group: PathGroup, netClass: StoredNetClass | null): MissingInput[] {
  const paired = group.nets.find((net) => net.pair !== null);
  if (netClass?.kind !== "differential" && !paired) return [];
  const name = paired?.name ?? group.nets[0]?.name ?? "";
  return [
    {
      input: "simulation of coupled pairs",
      detail: `${name} is half of a differential pair; two coupled lines are not simulated yet.`,
    },
  ];
}
