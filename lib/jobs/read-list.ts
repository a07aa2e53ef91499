import "server-only";
import { setImmediate } from "node:timers/promises";
import { listNeighbours } from "@/lib/db/neighbour";
import { listNetClasses } from "@/lib/db/net-class";
import { listNets, readNetChunks } from "@/lib/db/net";
import { listParts } from "@/lib/db/part";
import type { RevisionRef } from "@/lib/db/revision";
import { getStackup } from "@/lib/db/stackup";
import type { LayoutLists } from "@/lib/db/layout-lists";
import type { DelimitedTable } from "@/lib/formats/delimited/table";
import { copperLayers, type LayerChoice } from "@/lib/formats/lists/layer-names";
import type { RowProblem } from "@/lib/formats/lists/list-field";
import {
  netsFromNetList,
  netsFromSections,
  unknownClasses,
  type ProjectContext,
} from "@/lib/formats/lists/nets-from-rows";
import { pinsWarning, valueWarning } from "@/lib/formats/lists/parts-list";
import { previewInTurns, type ListPreview } from "@/lib/formats/lists/preview";
import type { Actor } from "@/lib/schemas/actor";
import type { ListMapping } from "@/lib/schemas/import-list";
import type { NetDoc, NetPinDoc } from "@/lib/schemas/net";

/** A list read against the project it is to come into. */
export interface ReadList {
  preview: ListPreview<unknown>;
  lists: LayoutLists;
  warnings: RowProblem[];
  unknownClasses: { name: string; rows: number }[];
  effect: { things: string; added: number; present: number; absent: number; incomplete: number };
}

/** What a draft knows that a list may refer to. */
export interface DraftContext extends ProjectContext {
  copper: LayerChoice[];
  netNames: ReadonlySet<string>;
  references: ReadonlySet<string>;
  neighbours: number;
}

const turn = () => setImmediate();

export async function readDraftContext(actor: Actor, draft: RevisionRef): Promise<DraftContext> {
  const [stackup, classes, nets, parts, neighbours] = await Promise.all([
    getStackup(actor, draft),
    listNetClasses(actor, draft),
    listNets(actor, draft),
    listParts(actor, draft),
    listNeighbours(actor, draft),
  ]);
  return {
    copper: copperLayers(stackup.layers),
    layers: {},
    classes,
    netNames: new Set(nets.nets.map(({ name }) => name)),
    references: new Set(parts.map(({ reference }) => reference)),
    neighbours: neighbours.length,
  };
}

/** Reads a whole table under a mapping into what would be written, in turns. */
export async function readList(
  table: DelimitedTable,
  mapping: ListMapping,
  draft: DraftContext,
): Promise<ReadList> {
  const context = { ...draft, layers: mapping.layers };
  switch (mapping.kind) {
    case "section list": {
      const preview = await previewInTurns(table, { ...mapping, kind: mapping.kind }, turn);
      const nets = netsFromSections(preview.good, context);
      return { preview, lists: { nets }, warnings: [], unknownClasses: [], effect: netEffect(nets, draft) };
    }
    case "net list": {
      const preview = await previewInTurns(table, { ...mapping, kind: mapping.kind }, turn);
      const nets = netsFromNetList(preview.good, context);
      const unknown = unknownClasses(preview.good, draft.classes);
      return {
        preview,
        lists: { nets },
        warnings: [],
        unknownClasses: unknown,
        effect: netEffect(nets, draft),
      };
    }
    case "parts list": {
      const preview = await previewInTurns(table, { ...mapping, kind: mapping.kind }, turn);
      const rows = preview.good.filter(({ duplicateOf }) => duplicateOf === null);
      const warnings = rows.flatMap(({ row, value }) => {
        const ofValue = valueWarning(value);
        const ofPins = pinsWarning(value);
        return [
          ...(ofValue ? [{ row, column: "value", value: value.value, reason: ofValue }] : []),
          ...(ofPins ? [{ row, column: "pins", value: value.pins.join(" "), reason: ofPins }] : []),
        ];
      });
      const parts = rows.map(({ value }) => value);
      return {
        preview,
        lists: { parts },
        warnings,
        unknownClasses: [],
        effect: {
          ...effectOf(
            parts.map(({ reference }) => reference),
            draft.references,
          ),
          things: "parts",
          incomplete: 0,
        },
      };
    }
    case "neighbour list": {
      const preview = await previewInTurns(table, { ...mapping, kind: mapping.kind }, turn);
      const rows = preview.good.filter(({ duplicateOf }) => duplicateOf === null);
      const warnings = rows.flatMap(({ row, value }) =>
        (["net", "neighbour"] as const)
          .filter((field) => !draft.netNames.has(value[field]))
          .map((field) => ({
            row,
            column: field,
            value: value[field],
            reason: `No net of this draft is named ${value[field]}. The row waits until one is.`,
          })),
      );
      const neighbours = rows.map(({ value }) => value);
      return {
        preview,
        lists: { neighbours },
        warnings,
        unknownClasses: [],
        effect: {
          things: "neighbour rows",
          added: neighbours.length,
          present: 0,
          absent: draft.neighbours,
          incomplete: 0,
        },
      };
    }
  }
}

/** Roles that a net list gave pins outlive a section list, which knows none. */
export async function keepPinRoles(
  actor: Actor,
  draft: RevisionRef,
  lists: LayoutLists,
): Promise<LayoutLists> {
  if (!lists.nets?.some((net) => net.source === "section list")) return lists;
  const known = new Map<string, Map<string, NetPinDoc["role"]>>();
  for await (const nets of readNetChunks(actor, draft))
    for (const net of nets) {
      const roles = net.topology.pins.filter(({ role }) => role !== null);
      if (roles.length > 0) known.set(net.name, new Map(roles.map(({ node, role }) => [node, role])));
    }
  if (known.size === 0) return lists;
  const nets = lists.nets.map((net) => {
    const roles = known.get(net.name);
    if (!roles) return net;
    const pins = net.topology.pins.map((pin) => ({ ...pin, role: pin.role ?? roles.get(pin.node) ?? null }));
    return { ...net, topology: { ...net.topology, pins } };
  });
  return { ...lists, nets };
}

function netEffect(nets: readonly NetDoc[], draft: DraftContext): ReadList["effect"] {
  return {
    ...effectOf(
      nets.map(({ name }) => name),
      draft.netNames,
    ),
    things: "nets",
    incomplete: nets.filter(({ scope }) => scope === "incomplete").length,
  };
}

function effectOf(
  names: readonly string[],
  known: ReadonlySet<string>,
): { added: number; present: number; absent: number } {
  const present = names.filter((name) => known.has(name)).length;
  return { added: names.length - present, present, absent: known.size - present };
}
