import type { ListKind } from "@/lib/schemas/import-list";
import type { NeighbourDoc, PartDoc } from "@/lib/schemas/net";
import type { ListFormat } from "./list-field";
import { neighbourList } from "./neighbour-list";
import { netList, type NetRow } from "./net-list";
import { partsList } from "./parts-list";
import { sectionList, type SectionRow } from "./section-list";

/** What a row of each kind of list becomes. */
export interface ListRows {
  "net list": NetRow;
  "section list": SectionRow;
  "parts list": PartDoc;
  "neighbour list": NeighbourDoc;
}

/** To add a kind of list: one file beside these, one line here and in the schema. */
export const listFormats: { [K in ListKind]: ListFormat<ListRows[K]> } = {
  "net list": netList,
  "section list": sectionList,
  "parts list": partsList,
  "neighbour list": neighbourList,
};
