import { createModel, listModels } from "@/lib/db/model";
import { putBindings, getBindings } from "@/lib/db/binding";
import { createNetClass } from "@/lib/db/net-class";
import { getDraft } from "@/lib/db/revision";
import { getStackup, putStackup } from "@/lib/db/stackup";
import { stackupFromTyped, toSi, widthOnLayer } from "@/lib/si";
import type { UserActor } from "@/lib/schemas/actor";
import type { ModelDoc } from "@/lib/schemas/model";
import { netClassDoc } from "@/lib/schemas/net-class";
import type { StoredStackup } from "@/lib/schemas/stackup";
import type { DemoWidths } from "./tide-gauge-board";

const V = (value: string) => ({ value, unit: "V" });
const ohm = (value: string) => ({ value, unit: "ohm" });
const ns = (value: string) => ({ value, unit: "ns" });
const pF = (value: string) => ({ value, unit: "pF" });

/** Names as the layout lists write them. */
const LAYER_NAMES = ["L1 Top", "L2 Ground", "L3 Inner", "L4 Inner", "L5 Power", "L6 Bottom"];
const PLANE_NETS: Record<string, string> = { "L2 Ground": "GND", "L5 Power": "+3V3" };

/** Grid of the fabricator's art work. */
const GRID_M = 5e-6;

interface DemoClass {
  name: string;
  patterns: string[];
  kind?: "differential";
  ohms: string;
  tolerance?: string;
  signal: "data" | "clock" | "strobe" | "slow";
  rate: { value: string; unit: string } | null;
  spacing?: string;
  series?: string;
  flightTimeMax?: string;
}

const CLASSES: DemoClass[] = [
  {
    name: "Clock",
    patterns: ["*CLK*"],
    ohms: "50",
    signal: "clock",
    rate: { value: "50", unit: "MHz" },
    series: "33",
    spacing: "0.3",
  },
  {
    name: "Memory data",
    patterns: ["SD_DQ*", "MEMORYDATA_*"],
    ohms: "50",
    signal: "data",
    rate: { value: "133", unit: "MHz" },
    series: "33",
    spacing: "0.2",
  },
  {
    name: "Memory address",
    patterns: ["SD_A*", "SD_RAS*", "SD_CAS*", "SD_WE*", "SD_CS*", "MEMORYADDRESS_*"],
    ohms: "50",
    signal: "data",
    rate: { value: "66", unit: "MHz" },
  },
  {
    name: "Flash",
    patterns: ["QF_*", "FLASH_*"],
    ohms: "50",
    signal: "data",
    rate: { value: "50", unit: "MHz" },
    series: "27",
  },
  {
    name: "Ethernet",
    patterns: ["RMII_*", "ETHERNET_*"],
    ohms: "50",
    signal: "data",
    rate: { value: "50", unit: "MHz" },
  },
  {
    name: "Sensor",
    patterns: ["TIDE_*"],
    ohms: "55",
    tolerance: "15",
    signal: "data",
    rate: { value: "5", unit: "MHz" },
  },
  {
    name: "Telemetry pair",
    patterns: ["PROBE_*"],
    kind: "differential",
    ohms: "120",
    signal: "data",
    rate: { value: "1", unit: "MHz" },
  },
  {
    name: "Control",
    patterns: ["*_RST", "SD_CKE", "PUMP_EN", "LED_*", "WAKE", "BUS_*", "VALVE_*", "TIDE_SYNC", "CONTROL_*"],
    ohms: "55",
    tolerance: "15",
    signal: "slow",
    rate: null,
  },
];

const MODELS: ModelDoc[] = [
  {
    name: "Controller pin, medium drive",
    technology: "3.3 V CMOS",
    origin: "data sheet",
    note: "Invented device; values of the order usual for such pins.",
    driver: {
      vdd: V("3.3"),
      resistance: { slow: ohm("27"), typical: ohm("19"), fast: ohm("14") },
      riseTime: { slow: ns("1.6"), typical: ns("1.1"), fast: ns("0.8") },
      capacitance: pF("3"),
    },
    receiver: {
      vdd: V("3.3"),
      capacitance: { min: pF("2.5"), typical: pF("3.5"), max: pF("5") },
      vil: V("0.8"),
      vih: V("2.0"),
      vilAc: null,
      vihAc: null,
      vmeas: V("1.5"),
      maxAbove: V("0.4"),
      maxBelow: V("0.4"),
    },
  },
  {
    name: "Controller pin, low drive",
    technology: "3.3 V CMOS",
    origin: "data sheet",
    note: "Invented device.",
    driver: {
      vdd: V("3.3"),
      resistance: { slow: ohm("75"), typical: ohm("55"), fast: ohm("42") },
      riseTime: { slow: ns("5"), typical: ns("3.5"), fast: ns("2.6") },
      capacitance: pF("3"),
    },
    receiver: null,
  },
  {
    name: "Memory pin",
    technology: "3.3 V CMOS",
    origin: "data sheet",
    note: "Invented device.",
    driver: {
      vdd: V("3.3"),
      resistance: { slow: ohm("32"), typical: ohm("23"), fast: ohm("17") },
      riseTime: { slow: ns("1.7"), typical: ns("1.2"), fast: ns("0.9") },
      capacitance: pF("4"),
    },
    receiver: {
      vdd: V("3.3"),
      capacitance: { min: pF("3"), typical: pF("4"), max: pF("5.5") },
      vil: V("0.8"),
      vih: V("2.0"),
      vilAc: null,
      vihAc: null,
      vmeas: V("1.4"),
      maxAbove: V("0.4"),
      maxBelow: V("0.4"),
    },
  },
  {
    name: "Logic input",
    technology: "3.3 V CMOS",
    origin: "data sheet",
    note: "Invented device; headers and small parts.",
    driver: null,
    receiver: {
      vdd: V("3.3"),
      capacitance: { min: pF("3"), typical: pF("5"), max: pF("8") },
      vil: V("0.8"),
      vih: V("2.0"),
      vilAc: null,
      vihAc: null,
      vmeas: V("1.5"),
      maxAbove: V("0.5"),
      maxBelow: V("0.5"),
    },
  },
  {
    name: "Transceiver output",
    technology: "3.3 V CMOS",
    origin: "data sheet",
    note: "Invented device.",
    driver: {
      vdd: V("3.3"),
      resistance: { slow: ohm("30"), typical: ohm("21"), fast: ohm("15") },
      riseTime: { slow: ns("1.8"), typical: ns("1.3"), fast: ns("1.0") },
      capacitance: pF("4"),
    },
    receiver: null,
  },
];

/** Names the copper of the six-layer template as the layout does and gives its planes their nets. */
export async function nameLayers(actor: UserActor, projectId: string): Promise<StoredStackup> {
  const draft = await getDraft(actor, projectId);
  const stackup = await getStackup(actor, draft);
  let copper = 0;
  const layers = stackup.layers.map(({ thickness_m: _derived, ...layer }) => {
    if (!["signal", "plane", "foil"].includes(layer.kind)) return layer;
    const name = LAYER_NAMES[copper++] ?? layer.name;
    return { ...layer, name, planeNet: PLANE_NETS[name] ?? "" };
  });
  return putStackup(actor, projectId, stackup.version, {
    name: "Six layers, named as the layout names them",
    layers,
  });
}

/** Models, their bindings, and the eight classes with the widths that their targets ask for on this stackup. */
export async function addClasses(
  actor: UserActor,
  projectId: string,
  stackup: StoredStackup,
): Promise<DemoWidths> {
  for (const model of MODELS) await createModel(actor, projectId, model);
  const draft = await getDraft(actor, projectId);
  const models = new Map((await listModels(actor, draft)).map((model) => [model.name, model.lineageId]));
  const { version } = await getBindings(actor, draft);
  const bind = (
    referencePattern: string,
    pinPattern: string,
    role: "driver" | "receiver" | "either" | "passive",
    model: string | null,
    netPattern = "*",
  ) => ({
    referencePattern,
    partNumberPattern: "*",
    pinPattern,
    netPattern,
    role,
    modelLineageId: model ? (models.get(model) ?? null) : null,
  });
  await putBindings(actor, projectId, version, [
    bind("U1", "*", "receiver", "Controller pin, medium drive", "RMII_RX*"),
    bind("U1", "*", "receiver", "Controller pin, medium drive", "RMII_CRS*"),
    bind("U1", "*", "receiver", "Controller pin, medium drive", "ETH_REFCLK*"),
    bind("U1", "L3", "receiver", "Controller pin, medium drive"),
    bind("U1", "M*", "driver", "Controller pin, low drive"),
    bind("U1", "N1", "driver", "Controller pin, low drive"),
    bind("U1", "N2", "driver", "Controller pin, low drive"),
    bind("U1", "L*", "driver", "Controller pin, low drive"),
    bind("U4", "*", "driver", "Transceiver output", "RMII_RX*"),
    bind("U4", "*", "driver", "Transceiver output", "RMII_CRS*"),
    bind("Y1", "3", "driver", "Transceiver output"),
    bind("U5", "5", "driver", null),
    bind("U6", "6", "driver", null),
    bind("U6", "7", "driver", null),
    bind("U1", "*", "driver", "Controller pin, medium drive"),
    bind("U2", "*", "receiver", "Memory pin"),
    bind("U3", "*", "receiver", "Logic input"),
    bind("U4", "*", "receiver", "Logic input"),
    bind("U5", "*", "receiver", "Logic input"),
    bind("U6", "*", "receiver", "Logic input"),
    bind("J*", "*", "receiver", "Logic input"),
    // The large board has many of each device: told apart by part number.
    { ...bind("*", "*", "driver", "Controller pin, medium drive"), partNumberPattern: "SSC-MCU-*" },
    { ...bind("*", "*", "receiver", "Memory pin"), partNumberPattern: "SDR-*" },
  ]);
  const widths: DemoWidths = {};
  for (const entry of CLASSES) {
    const layers = classLayers(stackup, entry);
    widths[entry.name] = Object.fromEntries(layers.map((layer) => [layer.name, layer.width]));
    await createNetClass(
      actor,
      projectId,
      netClassDoc.parse({
        name: entry.name,
        kind: entry.kind ?? "single",
        targetImpedance: ohm(entry.ohms),
        tolerancePercent: entry.tolerance ?? "10",
        layers: layers.map(({ lineageId, width, gap }) => ({
          layerLineageId: lineageId,
          width: { value: width, unit: "mm" },
          gap: gap === null ? null : { value: gap, unit: "mm" },
        })),
        signal: entry.signal,
        rate: entry.rate,
        spacing: entry.spacing ? { value: entry.spacing, unit: "mm" } : null,
        termination: entry.series
          ? {
              scheme: "series",
              resistance: ohm(entry.series),
              resistanceLow: null,
              capacitance: null,
              voltage: null,
            }
          : undefined,
        flightTimeMax: entry.flightTimeMax ? ns(entry.flightTimeMax) : null,
        netPatterns: entry.patterns,
      }),
    );
  }
  return widths;
}

function classLayers(stackup: StoredStackup, entry: DemoClass) {
  const si = stackupFromTyped(stackup.layers);
  const target = { kind: entry.kind ?? ("single" as const), ohms: toSi(ohm(entry.ohms), "resistance") };
  return stackup.layers.flatMap((layer, index) => {
    if (layer.kind !== "signal") return [];
    const pair = target.kind === "differential";
    const gap = pair ? 2e-4 : undefined;
    try {
      const found = widthOnLayer({
        stackup: si,
        index,
        target,
        vary: "width",
        gap,
        min: 6e-5,
        max: 8e-4,
        grid: GRID_M,
      });
      return [
        {
          name: layer.name,
          lineageId: layer.lineageId,
          width: (found.value * 1e3).toFixed(3),
          gap: pair ? "0.200" : null,
        },
      ];
    } catch {
      // This target cannot be had on this layer: the class does not allow it there.
      return [];
    }
  });
}
