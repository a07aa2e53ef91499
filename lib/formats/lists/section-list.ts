import type { Quantity } from "@/lib/si/units";
import type { ListFormat, RowCells } from "./list-field";

export interface SectionRow {
  net: string;
  from: string;
  to: string;
  layer: string;
  width: Quantity;
  length: Quantity;
  at: Partial<Record<"x1" | "y1" | "x2" | "y2", Quantity>> | null;
}

/** One row a routed section. */
export const sectionList: ListFormat<SectionRow> = {
  kind: "section list",
  fields: [
    {
      id: "net",
      label: "Net",
      required: true,
      kind: "text",
      headers: ["net", "net name", "netname", "signal", "signal name"],
    },
    {
      id: "from",
      label: "From",
      required: true,
      kind: "text",
      headers: ["from", "start", "node 1", "node1", "from node", "start node", "from pin", "a", "begin"],
    },
    {
      id: "to",
      label: "To",
      required: true,
      kind: "text",
      headers: ["to", "end", "node 2", "node2", "to node", "end node", "to pin", "b"],
    },
    {
      id: "layer",
      label: "Layer",
      required: true,
      kind: "text",
      headers: ["layer", "layer name", "layername", "routing layer", "lyr"],
    },
    {
      id: "width",
      label: "Width",
      required: true,
      kind: "length",
      headers: ["width", "line width", "trace width", "track width", "w"],
    },
    {
      id: "length",
      label: "Length",
      required: true,
      kind: "length",
      headers: ["length", "len", "section length", "segment length", "etch length", "routed length", "l"],
    },
    {
      id: "x1",
      label: "Start x",
      required: false,
      kind: "length",
      headers: ["x1", "start x", "from x", "xstart", "x start"],
    },
    {
      id: "y1",
      label: "Start y",
      required: false,
      kind: "length",
      headers: ["y1", "start y", "from y", "ystart", "y start"],
    },
    {
      id: "x2",
      label: "End x",
      required: false,
      kind: "length",
      headers: ["x2", "end x", "to x", "xend", "x end"],
    },
    {
      id: "y2",
      label: "End y",
      required: false,
      kind: "length",
      headers: ["y2", "end y", "to y", "yend", "y end"],
    },
  ],
  read(cells) {
    const from = cells.node("from");
    const to = cells.node("to");
    if (from !== "" && from === to)
      cells.refuse("to", `is the same node as its start, ${from}. A section joins two nodes.`);
    return {
      net: cells.text("net", 120),
      from,
      to,
      layer: cells.text("layer", 60),
      width: cells.length("width", "positive") ?? UNREAD,
      length: cells.length("length", "not negative") ?? UNREAD,
      at: readPlace(cells),
    };
  },
  key: (row) => [row.net, row.from, row.to, row.layer, ...quantityKeys(row)].join("\u0000"),
  unique: null,
};

/** Stands where a problem was noted; such a row is never used. */
const UNREAD: Quantity = { value: "0", unit: "mm" };

function readPlace(cells: RowCells): SectionRow["at"] {
  const place: NonNullable<SectionRow["at"]> = {};
  for (const axis of ["x1", "y1", "x2", "y2"] as const) {
    const value = cells.length(axis, "any");
    if (value) place[axis] = value;
  }
  return Object.keys(place).length > 0 ? place : null;
}

function quantityKeys(row: SectionRow): string[] {
  return [row.width, row.length, row.at?.x1, row.at?.y1, row.at?.x2, row.at?.y2].map((q) =>
    q ? `${q.value} ${q.unit}` : "",
  );
}
