import { modelDoc, type ModelDoc } from "./model";

/** A model to start from; assumed until a data sheet, a vendor's model or a measurement takes its place. */
export interface ModelPreset {
  id: string;
  title: string;
  about: string;
  doc: ModelDoc;
}

const NOTE = "Common practice, from memory. Put in the part's own values.";

const V = (value: string) => ({ value, unit: "V" });
const ohm = (value: string) => ({ value, unit: "Ω" });
const ns = (value: string) => ({ value, unit: "ns" });
const pF = (value: string) => ({ value, unit: "pF" });
type Three = readonly [slow: string, typical: string, fast: string];

const driver = (vdd: string, r: Three, rise: Three) => ({
  vdd: V(vdd),
  resistance: { slow: ohm(r[0]), typical: ohm(r[1]), fast: ohm(r[2]) },
  riseTime: { slow: ns(rise[0]), typical: ns(rise[1]), fast: ns(rise[2]) },
  capacitance: pF("3"),
});
const receiver = (vdd: string, vil: string, vih: string, beyond: string) => ({
  vdd: V(vdd),
  capacitance: { min: pF("2.5"), typical: pF("4"), max: pF("6") },
  vil: V(vil),
  vih: V(vih),
  maxAbove: V(beyond),
  maxBelow: V(beyond),
});

function preset(id: string, title: string, technology: string, about: string, parts: object): ModelPreset {
  return {
    id,
    title,
    about,
    doc: modelDoc.parse({ name: title, technology, origin: "assumed", note: NOTE, ...parts }),
  };
}

export const modelPresets: readonly ModelPreset[] = [
  preset("cmos-33", "3.3 V pin, medium drive", "3.3 V CMOS", "20 Ω, 1.2 ns; drives and receives", {
    driver: driver("3.3", ["28", "20", "14"], ["1.7", "1.2", "0.8"]),
    receiver: receiver("3.3", "0.8", "2", "0.4"),
  }),
  preset("cmos-33-low", "3.3 V pin, low drive", "3.3 V CMOS", "50 Ω, 3.5 ns; drives and receives", {
    driver: driver("3.3", ["70", "50", "38"], ["5", "3.5", "2.5"]),
    receiver: receiver("3.3", "0.8", "2", "0.4"),
  }),
  preset("cmos-25", "2.5 V pin", "2.5 V CMOS", "20 Ω, 1 ns; drives and receives", {
    driver: driver("2.5", ["28", "20", "14"], ["1.4", "1", "0.7"]),
    receiver: receiver("2.5", "0.7", "1.7", "0.3"),
  }),
  preset("cmos-18", "1.8 V pin", "1.8 V CMOS", "25 Ω, 0.8 ns; drives and receives", {
    driver: driver("1.8", ["35", "25", "18"], ["1.2", "0.8", "0.5"]),
    receiver: receiver("1.8", "0.63", "1.17", "0.3"),
  }),
  preset("oscillator", "3.3 V oscillator output", "3.3 V CMOS", "25 Ω, 1.5 ns; drives", {
    driver: driver("3.3", ["35", "25", "17"], ["2.2", "1.5", "1"]),
  }),
  preset("input-33", "3.3 V input", "3.3 V CMOS", "4 pF; receives", {
    receiver: receiver("3.3", "0.8", "2", "0.4"),
  }),
];
