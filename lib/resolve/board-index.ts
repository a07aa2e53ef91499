import type { NeighbourDoc, StoredPart } from "@/lib/schemas/net";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import type { RevisionInputs } from "@/lib/schemas/snapshot";
import { LimitResolver } from "./limits";
import { LineTable } from "./line-table";
import { PinRoles } from "./pin-roles";
import { siModel, type SiModel } from "./si-models";
import { SiValues } from "./si-values";
import { findTwoTerminals, type TwoTerminals } from "./two-terminal";

/** What path resolution looks up again and again, indexed once for a board. */
export interface BoardIndex {
  si: SiValues;
  lines: LineTable;
  roles: PinRoles;
  limits: LimitResolver;
  twoTerminals: TwoTerminals;
  pinNodes: ReadonlySet<string>;
  neighbours: ReadonlyMap<string, NeighbourDoc[]>;
  geometryKnown: boolean;
  model(lineageId: string | null): SiModel | null;
  netClass(lineageId: string | null): StoredNetClass | null;
}

export function indexBoard(inputs: RevisionInputs): BoardIndex {
  const si = new SiValues();
  const parts = new Map<string, StoredPart>(inputs.parts.map((part) => [part.reference, part]));
  const models = new Map(inputs.models.map((model) => [model.lineageId, siModel(model, si)]));
  const classes = new Map(inputs.classes.map((entry) => [entry.lineageId, entry]));
  return {
    si,
    lines: new LineTable(inputs.stackup),
    roles: new PinRoles(inputs.bindings, parts),
    limits: new LimitResolver(inputs.ruleSet),
    twoTerminals: findTwoTerminals(inputs.nets, parts),
    pinNodes: new Set(inputs.nets.flatMap((net) => net.topology.pins.map((pin) => pin.node))),
    neighbours: indexNeighbours(inputs.neighbours),
    geometryKnown: inputs.neighbours.length > 0,
    model: (lineageId) => (lineageId ? (models.get(lineageId) ?? null) : null),
    netClass: (lineageId) => (lineageId ? (classes.get(lineageId) ?? null) : null),
  };
}

/** A row counts for both of its nets. */
function indexNeighbours(rows: NeighbourDoc[]): Map<string, NeighbourDoc[]> {
  const byNet = new Map<string, NeighbourDoc[]>();
  const add = (row: NeighbourDoc) => {
    const list = byNet.get(row.net);
    if (list) list.push(row);
    else byNet.set(row.net, [row]);
  };
  for (const row of rows) {
    add(row);
    add({ ...row, net: row.neighbour, neighbour: row.net });
  }
  return byNet;
}
