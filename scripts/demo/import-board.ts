import { listNetClasses } from "@/lib/db/net-class";
import { applyLayoutLists } from "@/lib/db/layout-lists";
import { listNets } from "@/lib/db/net";
import { patchNets } from "@/lib/db/net-fields";
import { getDraft } from "@/lib/db/revision";
import { getStackup } from "@/lib/db/stackup";
import { readTable } from "@/lib/formats/delimited/table";
import { guessMapping } from "@/lib/formats/lists/guess-mapping";
import { copperLayers, proposeLayer } from "@/lib/formats/lists/layer-names";
import { netsFromSections } from "@/lib/formats/lists/nets-from-rows";
import { previewTable } from "@/lib/formats/lists/preview";
import type { UserActor } from "@/lib/schemas/actor";
import type { ListKind } from "@/lib/schemas/import-list";
import type { DemoBoard } from "./tide-gauge-board";

/** Takes a board's lists in as a person would: read, mapped, checked, applied in one unit, power nets set aside. */
export async function importBoard(
  actor: UserActor,
  projectId: string,
  board: DemoBoard,
  summary: string,
): Promise<void> {
  const draft = await getDraft(actor, projectId);
  const [stackup, classes] = await Promise.all([getStackup(actor, draft), listNetClasses(actor, draft)]);
  const copper = copperLayers(stackup.layers);
  const sections = readList(board.sectionList, "section list");
  const parts = readList(board.partsList, "parts list");
  const neighbours = readList(board.neighbourList, "neighbour list");
  const layers = Object.fromEntries(sections.layers.map(({ name }) => [name, proposeLayer(name, copper)]));
  const nets = netsFromSections(sections.good, {
    layers,
    classes,
    references: new Set(parts.good.map((row) => row.value.reference)),
  });
  await applyLayoutLists(
    actor,
    projectId,
    { nets, parts: parts.good.map((row) => row.value), neighbours: neighbours.good.map((row) => row.value) },
    { mode: "replace", summary },
  );
  await setSuppliesAside(actor, projectId);
}

async function setSuppliesAside(actor: UserActor, projectId: string): Promise<void> {
  const draft = await getDraft(actor, projectId);
  const { nets } = await listNets(actor, draft);
  const supplies = nets.filter((row) => row.name === "GND" || row.name.startsWith("+"));
  if (supplies.length === 0) return;
  await patchNets(
    actor,
    projectId,
    supplies.map((row) => ({
      id: row.id,
      fields: {
        scope: "out" as const,
        scopeKind: row.name === "GND" ? ("ground" as const) : ("power" as const),
        scopeReason: "Supply, proposed from its name.",
      },
    })),
    "Supplies set out of scope",
  );
}

function readList<K extends ListKind>(text: string, kind: K) {
  const table = readTable(text, { delimiter: "," });
  const preview = previewTable(table, { ...guessMapping(table, kind, "mm"), kind });
  if (preview.badRows > 0)
    throw new Error(`The demo's ${kind} has bad rows: ${JSON.stringify(preview.problems.slice(0, 3))}`);
  return preview;
}
