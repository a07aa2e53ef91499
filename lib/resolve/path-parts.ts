import type { PathPart, ResolvedPath } from "@/lib/si/path/types";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import type { BoardIndex } from "./board-index";
import type { PathGroup } from "./path-groups";
import type { MissingInput } from "./path-pins";
import { pathNode } from "./pin-names";
import { railVoltage } from "./rails";
import type { PartEnd } from "./two-terminal";

/** The parts of a path with their values, and the rails that its terminations go to. */
export function resolveParts(group: PathGroup, netClass: StoredNetClass | null, board: BoardIndex) {
  const parts: PathPart[] = [];
  const rails = new Map<string, ResolvedPath["rails"][number]>();
  const missing: MissingInput[] = [];
  const node = (end: PartEnd) => pathNode(end.net, end.node, board.pinNodes);
  for (const { part, a, b } of group.series) {
    parts.push({
      reference: part.reference,
      kind: part.kind,
      a: node(a),
      b: node(b),
      value: part.value,
      role: "series",
    });
    if (part.missing) missing.push(part.missing);
  }
  for (const { part, end, rail } of group.terminations) {
    const volts =
      railVoltage(rail.name) ??
      (rail.scopeKind === "ground" ? 0 : board.si.orNull(netClass?.termination.voltage ?? null, "voltage"));
    const railNode = `rail ${rail.name}`;
    parts.push({
      reference: part.reference,
      kind: part.kind,
      a: node(end),
      b: railNode,
      value: part.value,
      role: "termination",
    });
    if (part.missing) missing.push(part.missing);
    if (volts !== null) rails.set(railNode, { name: rail.name, node: railNode, volts });
    else
      missing.push({
        input: `voltage of ${rail.name}`,
        detail: `${part.reference} goes to ${rail.name}, whose name says no voltage, and the class gives none.`,
      });
  }
  for (const { part, end } of group.loose)
    missing.push({
      input: `other net of ${part.reference}`,
      detail: `${end.node} is on ${end.net.name}; the part's other pin is on no imported net.`,
    });
  return { parts, rails: [...rails.values()], missing };
}
