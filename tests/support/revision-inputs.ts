import type { StoredBinding, StoredModel } from "@/lib/schemas/model";
import type { NetPinDoc, NetSectionDoc, StoredNet, StoredPart } from "@/lib/schemas/net";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import type { RevisionInputs } from "@/lib/schemas/snapshot";
import type { StoredStackupLayer } from "@/lib/schemas/stackup";

/** A number and its unit, as typed: q("0.15 mm"). */
export function q(text: string): { value: string; unit: string } {
  const [value = "", unit = ""] = text.split(" ");
  return { value, unit };
}

let count = 0;
const newId = () => `00000000-0000-7000-8000-${String(++count).padStart(12, "0")}`;

function layer(
  kind: StoredStackupLayer["kind"],
  name: string,
  over: Partial<StoredStackupLayer> = {},
): StoredStackupLayer {
  return {
    id: newId(),
    lineageId: `layer-${name}`,
    kind,
    name,
    material: "",
    thickness: null,
    thicknessMode: "typed",
    tolerancePercent: null,
    plies: [],
    dk: null,
    df: null,
    dkFrequency: null,
    baseFoil: null,
    plating: null,
    coveragePercent: null,
    etch: null,
    roughness: null,
    maskOverTrace: null,
    planeNet: "",
    origin: "assumed",
    ...over,
  };
}

/** Four layers: Top and Bottom for signals, GND and PWR planes between. 0.15 mm of Dk 4.2 under the outer layers. */
export function fourLayers(): RevisionInputs["stackup"] {
  const copper = { baseFoil: q("18 um"), plating: q("20 um"), etch: q("0.02 mm") };
  const plane = { baseFoil: q("35 um"), coveragePercent: "90" };
  const prepreg = (name: string) =>
    layer("prepreg", name, { thickness: q("0.15 mm"), dk: "4.2", df: "0.02" });
  return {
    name: "Four layers",
    version: 1,
    layers: [
      layer("signal", "Top", copper),
      prepreg("P1"),
      layer("plane", "GND", { ...plane, planeNet: "GND" }),
      layer("core", "C1", { thickness: q("1.2 mm"), dk: "4.4", df: "0.02" }),
      layer("plane", "PWR", { ...plane, planeNet: "+3V3" }),
      prepreg("P2"),
      layer("signal", "Bottom", copper),
    ],
  };
}

const three = (value: string) => ({ slow: q(value), typical: q(value), fast: q(value) });

export function outputModel(name: string, ohms: string, edge: string): StoredModel {
  const driver = { vdd: q("3.3 V"), resistance: three(ohms), riseTime: three(edge), capacitance: null };
  return {
    id: newId(),
    lineageId: `model-${name}`,
    version: 1,
    name,
    technology: "",
    driver,
    receiver: null,
    origin: "data sheet",
    note: "",
  };
}

export function inputModel(name: string): StoredModel {
  const receiver = {
    vdd: q("3.3 V"),
    capacitance: { min: q("2 pF"), typical: q("3 pF"), max: q("5 pF") },
    vil: q("0.8 V"),
    vih: q("2.0 V"),
    vilAc: null,
    vihAc: null,
    vmeas: null,
    maxAbove: null,
    maxBelow: null,
  };
  return {
    id: newId(),
    lineageId: `model-${name}`,
    version: 1,
    name,
    technology: "",
    driver: null,
    receiver,
    origin: "data sheet",
    note: "",
  };
}

export function netClass(name: string, over: Partial<StoredNetClass> = {}): StoredNetClass {
  return {
    id: newId(),
    lineageId: `class-${name}`,
    version: 1,
    name,
    kind: "single",
    targetImpedance: q("50 Ω"),
    tolerancePercent: "10",
    layers: [{ layerLineageId: "layer-Top", width: q("0.28 mm"), gap: null }],
    driverModelLineageId: null,
    receiverModelLineageId: null,
    edge: null,
    rate: q("50 MHz"),
    signal: "data",
    termination: { scheme: "none", resistance: null, resistanceLow: null, capacitance: null, voltage: null },
    spacing: null,
    flightTimeMax: null,
    limits: {},
    netPatterns: [],
    ...over,
  };
}

export function binding(
  referencePattern: string,
  role: StoredBinding["role"],
  model: string | null,
  over: Partial<StoredBinding> = {},
): StoredBinding {
  return {
    id: newId(),
    referencePattern,
    partNumberPattern: "*",
    pinPattern: "*",
    netPattern: "*",
    role,
    modelLineageId: model && `model-${model}`,
    ...over,
  };
}

/** Rows "from to mm [layer] [width mm]"; pins are the nodes that read REFERENCE.PIN. */
export function routed(name: string, rows: string[], over: Partial<StoredNet> = {}): StoredNet {
  const sections: NetSectionDoc[] = rows.map((row) => {
    const [from = "", to = "", mm = "0", layerName = "Top", width = "0.28"] = row.split(" ");
    return {
      from,
      to,
      layer: layerName,
      layerLineageId: layerName === "?" ? null : `layer-${layerName}`,
      width: q(`${width} mm`),
      length: q(`${mm} mm`),
      at: null,
    };
  });
  const nodes = [...new Set(sections.flatMap(({ from, to }) => [from, to]))].filter((node) =>
    node.includes("."),
  );
  const pins: NetPinDoc[] = nodes.map((node) => {
    const [reference = "", pin = ""] = node.split(".");
    return { node, reference, pin, role: null };
  });
  return {
    id: newId(),
    lineageId: `net-${name}`,
    version: 1,
    name,
    classLineageId: "class-Data",
    scope: "in",
    scopeKind: "signal",
    scopeReason: "",
    source: "section list",
    topology: { sections, pins, viaCount: 0, shapeKnown: true },
    gaps: [],
    pair: null,
    bus: null,
    matchGroup: null,
    limits: {},
    ...over,
  };
}

export function part(
  reference: string,
  value: string,
  kind: StoredPart["kind"],
  partNumber = "",
): StoredPart {
  return { id: newId(), lineageId: `part-${reference}`, reference, partNumber, value, kind, pins: [] };
}

/** U1 drives with 17 Ω and 1 ns, everything else receives; class Data at 50 Ω, 50 Mbit/s. */
export function revisionInputs(nets: StoredNet[], over: Partial<RevisionInputs> = {}): RevisionInputs {
  return {
    schema: 1,
    project: { name: "Bench board", unit: "mm" },
    revision: "A",
    stackup: fourLayers(),
    classes: [netClass("Data")],
    models: [outputModel("OUT", "17 Ω", "1 ns"), inputModel("IN")],
    bindings: [binding("U1", "driver", "OUT"), binding("U*", "receiver", "IN")],
    ruleSet: { version: 1, rules: {}, judgedAt: "pin" },
    parts: [],
    nets,
    neighbours: [],
    ...over,
  };
}
