import { materialDoc, type MaterialDoc } from "@/lib/schemas/material";
import { modelDoc, type ModelDoc } from "@/lib/schemas/model";
import { netDoc, type NetDoc } from "@/lib/schemas/net";
import { netClassDoc, type NetClassDoc } from "@/lib/schemas/net-class";

/** Small valid documents, as a form or an import would hand them over. */

export function aNet(name: string, over: Partial<NetDoc> = {}): NetDoc {
  return netDoc.parse({
    name,
    scope: "in",
    source: "section list",
    topology: {
      sections: [
        {
          from: "U1.1",
          to: "U2.1",
          layer: "L1 Top",
          layerLineageId: null,
          width: { value: "0.15", unit: "mm" },
          length: { value: "25.4", unit: "mm" },
        },
      ],
      pins: [
        { node: "U1.1", reference: "U1", pin: "1" },
        { node: "U2.1", reference: "U2", pin: "1" },
      ],
      viaCount: 0,
    },
    ...over,
  });
}

export function aClass(name: string, over: Partial<NetClassDoc> = {}): NetClassDoc {
  return netClassDoc.parse({ name, kind: "single", targetImpedance: { value: "50", unit: "Ω" }, ...over });
}

export function aModel(name: string): ModelDoc {
  const corners = <T>(value: T) => ({ slow: value, typical: value, fast: value });
  return modelDoc.parse({
    name,
    driver: {
      vdd: { value: "3.3", unit: "V" },
      resistance: corners({ value: "17", unit: "Ω" }),
      riseTime: corners({ value: "0.5", unit: "ns" }),
    },
  });
}

export function aMaterial(name: string, over: Partial<MaterialDoc> = {}): MaterialDoc {
  return materialDoc.parse({
    name,
    kind: "laminate",
    dk: "3.62",
    df: "0.0041",
    frequency: { value: "10", unit: "GHz" },
    thickness: { value: "0.1", unit: "mm" },
    source: "Data sheet of the invented maker, table 2",
    origin: "data sheet",
    ...over,
  });
}
