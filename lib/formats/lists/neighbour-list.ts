import type { NeighbourDoc } from "@/lib/schemas/net";
import type { Quantity } from "@/lib/si/units";
import type { ListFormat } from "./list-field";

const UNREAD: Quantity = { value: "0", unit: "mm" };

/** One row a stretch on which two nets run side by side. */
export const neighbourList: ListFormat<NeighbourDoc> = {
  kind: "neighbour list",
  fields: [
    {
      id: "net",
      label: "Net",
      required: true,
      kind: "text",
      headers: ["net", "net name", "victim", "signal", "net 1", "net1", "net a"],
    },
    {
      id: "neighbour",
      label: "Neighbour",
      required: true,
      kind: "text",
      headers: [
        "neighbour",
        "neighbor",
        "aggressor",
        "other net",
        "net 2",
        "net2",
        "net b",
        "neighbour net",
        "neighbor net",
      ],
    },
    {
      id: "layer",
      label: "Layer",
      required: true,
      kind: "text",
      headers: ["layer", "layer name", "layername", "lyr"],
    },
    {
      id: "gap",
      label: "Gap",
      required: true,
      kind: "length",
      headers: ["gap", "spacing", "distance", "separation", "air gap", "edge gap"],
    },
    {
      id: "parallelLength",
      label: "Parallel length",
      required: true,
      kind: "length",
      headers: [
        "parallel length",
        "parallel",
        "parallellength",
        "coupled length",
        "length",
        "run",
        "overlap",
      ],
    },
  ],
  read(cells) {
    const net = cells.text("net", 120);
    const neighbour = cells.text("neighbour", 120);
    if (net !== "" && net === neighbour)
      cells.refuse("neighbour", `is the net itself, ${net}. Name another net.`);
    return {
      net,
      neighbour,
      layer: cells.text("layer", 60),
      gap: cells.length("gap", "positive") ?? UNREAD,
      parallelLength: cells.length("parallelLength", "positive") ?? UNREAD,
    };
  },
  key: (row) =>
    [
      row.net,
      row.neighbour,
      row.layer,
      row.gap.value,
      row.gap.unit,
      row.parallelLength.value,
      row.parallelLength.unit,
    ].join("\u0000"),
  unique: null,
};
