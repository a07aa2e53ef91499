import type { ImportPreview, ImportState, ListKind } from "@/lib/schemas/import-list";

export const KIND_LABELS: Record<ListKind, string> = {
  "section list": "Section list",
  "net list": "Net list",
  "parts list": "Parts list",
  "neighbour list": "Neighbour list",
};

export const KIND_HINTS: Record<ListKind, string> = {
  "section list": "One row a routed section: net, from, to, layer, width, length; coordinates when known.",
  "net list": "One row a net: name, class, layer, width, length, vias, driver, receivers.",
  "parts list": "One row a part: reference, part number, value, pins.",
  "neighbour list": "One row a stretch side by side: net, neighbour, layer, gap, parallel length.",
};

export const STATE_WORDS: Record<ImportState, string> = {
  parsed: "Not confirmed",
  applying: "Under way",
  applied: "Imported",
  cancelled: "Dropped",
  failed: "Failed",
};

export const DELIMITER_WORDS = { ",": "Comma", ";": "Semicolon", "\t": "Tab" } as const;

export const rows = (count: number) => `${count.toLocaleString("en")} row${count === 1 ? "" : "s"}`;

/** "480 nets, 478 new, 2 there already; 430 incomplete routes, with the gap named." */
export function effectWords({ things, added, present, incomplete }: ImportPreview["effect"]): string {
  const number = (count: number) => count.toLocaleString("en");
  const broken =
    incomplete > 0
      ? `; ${number(incomplete)} incomplete route${incomplete === 1 ? "" : "s"}, with the gap named`
      : "";
  if (things === "neighbour rows") return `${rows(added)} of neighbours.`;
  const split = present > 0 ? `${number(added)} new, ${number(present)} there already` : "all new";
  const total = added + present;
  return `${number(total)} ${total === 1 ? things.replace(/s$/, "") : things}, ${split}${broken}.`;
}

/** What replacing would take away, or nothing. */
export function replaceWords({ things, absent }: ImportPreview["effect"]): string {
  return absent > 0
    ? `Removes ${absent.toLocaleString("en")} ${things} that ${things === "neighbour rows" ? "are there now" : "this list does not name"}.`
    : "Removes nothing: the list names all that is there.";
}
