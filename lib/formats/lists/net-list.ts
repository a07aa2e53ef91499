import type { Quantity } from "@/lib/si/units";
import { readPinName } from "../route-graph";
import type { ListFormat, RowCells } from "./list-field";

export interface NetRow {
  net: string;
  className: string;
  layer: string;
  width: Quantity | null;
  length: Quantity | null;
  vias: number | null;
  driver: string | null;
  receivers: string[];
}

const MAX_PINS = 2000;

/** One row a net: its length is known, not how several receivers hang on it. */
export const netList: ListFormat<NetRow> = {
  kind: "net list",
  fields: [
    {
      id: "net",
      label: "Net",
      required: true,
      kind: "text",
      headers: ["net", "net name", "netname", "signal", "signal name", "name"],
    },
    {
      id: "className",
      label: "Class",
      required: false,
      kind: "text",
      headers: ["class", "net class", "netclass", "class name", "group"],
    },
    {
      id: "layer",
      label: "Layer",
      required: false,
      kind: "text",
      headers: ["layer", "layer name", "layername", "main layer", "lyr"],
    },
    {
      id: "width",
      label: "Width",
      required: false,
      kind: "length",
      headers: ["width", "line width", "trace width", "track width", "w"],
    },
    {
      id: "length",
      label: "Length",
      required: false,
      kind: "length",
      headers: ["length", "len", "routed length", "etch length", "total length", "net length", "l"],
    },
    {
      id: "vias",
      label: "Vias",
      required: false,
      kind: "count",
      headers: ["vias", "via count", "via", "number of vias", "nvias"],
    },
    {
      id: "driver",
      label: "Driver",
      required: false,
      kind: "pins",
      headers: ["driver", "drv", "source", "driver pin", "from", "output", "tx"],
    },
    {
      id: "receivers",
      label: "Receivers",
      required: false,
      kind: "pins",
      headers: [
        "receivers",
        "receiver",
        "rcv",
        "load",
        "loads",
        "sink",
        "sinks",
        "receiver pins",
        "to",
        "inputs",
        "rx",
        "pins",
      ],
    },
  ],
  read(cells) {
    const drivers = readPins(cells, "driver");
    if (drivers.length > 1)
      cells.refuse(
        "driver",
        `names ${drivers.length} pins. Name one driver and put the others with the receivers.`,
      );
    return {
      net: cells.text("net", 120),
      className: cells.text("className", 60),
      layer: cells.text("layer", 60),
      width: cells.length("width", "positive"),
      length: cells.length("length", "not negative"),
      vias: cells.count("vias", 10_000),
      driver: drivers[0] ?? null,
      receivers: readPins(cells, "receivers").filter((pin) => pin !== drivers[0]),
    };
  },
  key: (row) => row.net,
  unique: "net",
};

function readPins(cells: RowCells, field: string): string[] {
  const pins = cells.words(field, MAX_PINS);
  const wrong = pins.find((pin) => !readPinName(pin));
  if (wrong) cells.refuse(field, `'${wrong}' names no pin. Write reference and pin, such as U1.E10.`);
  return pins;
}
