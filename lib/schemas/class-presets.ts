import { netClassDoc, type NetClassDoc } from "./net-class";

/** A class to start from: values of the order usual for a technology. The parts' data sheets decide. */
export interface ClassPreset {
  id: string;
  title: string;
  group: "Logic" | "Memory" | "Interfaces" | "Pairs" | "Clocks";
  /** In one line: what it assumes. */
  about: string;
  source: string;
  doc: NetClassDoc;
}

const SOURCE = "Common practice, from memory.";
const ohm = (value: string) => ({ value, unit: "Ω" });
const ns = (value: string) => ({ value, unit: "ns" });
const MHz = (value: string) => ({ value, unit: "MHz" });
const Mbps = (value: string) => ({ value, unit: "Mb/s" });
const mm = (value: string) => ({ value, unit: "mm" });
const series = (value: string) => ({ scheme: "series" as const, resistance: ohm(value) });
const across = (value: string) => ({ scheme: "differential" as const, resistance: ohm(value) });

type Input = Parameters<typeof netClassDoc.parse>[0];

function preset(
  id: string,
  title: string,
  group: ClassPreset["group"],
  about: string,
  doc: Input,
): ClassPreset {
  return { id, title, group, about, source: SOURCE, doc: netClassDoc.parse(doc) };
}

const single = (name: string, edge: string, over: object = {}) => ({
  name,
  kind: "single",
  targetImpedance: ohm("50"),
  tolerancePercent: "10",
  edge: ns(edge),
  ...over,
});
const pair = (name: string, ohms: string, tolerance: string, edge: string, over: object = {}) => ({
  name,
  kind: "differential",
  targetImpedance: ohm(ohms),
  tolerancePercent: tolerance,
  edge: ns(edge),
  ...over,
});

export const classPresets: readonly ClassPreset[] = [
  preset("cmos-33", "LVCMOS 3.3 V", "Logic", "50 Ω ± 10 %, 1.2 ns edge, series 33 Ω", {
    ...single("LVCMOS 3.3 V", "1.2", { rate: Mbps("100"), termination: series("33") }),
  }),
  preset("cmos-25", "LVCMOS 2.5 V", "Logic", "50 Ω ± 10 %, 1 ns edge, series 33 Ω", {
    ...single("LVCMOS 2.5 V", "1", { rate: Mbps("100"), termination: series("33") }),
  }),
  preset("cmos-18", "LVCMOS 1.8 V", "Logic", "50 Ω ± 10 %, 0.8 ns edge, series 27 Ω", {
    ...single("LVCMOS 1.8 V", "0.8", { rate: Mbps("100"), termination: series("27") }),
  }),
  preset("slow", "Slow control", "Logic", "55 Ω ± 15 %, resets, enables, straps; no rate", {
    ...single("Slow control", "5", { targetImpedance: ohm("55"), tolerancePercent: "15", signal: "slow" }),
  }),
  preset("sdram-data", "SDRAM-like data", "Memory", "50 Ω ± 10 %, 133 Mb/s, series 33 Ω, kept 0.2 mm apart", {
    ...single("Memory data", "1", {
      rate: Mbps("133"),
      termination: series("33"),
      spacing: mm("0.2"),
      netPatterns: ["*DQ*", "*DQM*"],
    }),
  }),
  preset("sdram-address", "SDRAM-like address and control", "Memory", "50 Ω ± 10 %, 66 Mb/s, series 33 Ω", {
    ...single("Memory address", "1", {
      rate: Mbps("66"),
      termination: series("33"),
      netPatterns: ["*_A?", "*_A??", "*_BA*", "*RAS*", "*CAS*", "*_WE*"],
    }),
  }),
  preset("quad-flash", "SPI or quad flash", "Memory", "50 Ω ± 10 %, 50 Mb/s, series 27 Ω", {
    ...single("Flash", "1.2", {
      rate: Mbps("50"),
      termination: series("27"),
      netPatterns: ["QSPI_*", "SPI_*"],
    }),
  }),
  preset("rmii", "RMII-like", "Interfaces", "50 Ω ± 10 %, 50 Mb/s at 50 MHz, series 33 Ω", {
    ...single("RMII", "1.2", { rate: Mbps("50"), termination: series("33"), netPatterns: ["RMII_*"] }),
  }),
  preset("rgmii", "RGMII-like", "Interfaces", "50 Ω ± 10 %, 250 Mb/s on both edges, series 22 Ω", {
    ...single("RGMII", "0.75", {
      rate: Mbps("250"),
      termination: series("22"),
      spacing: mm("0.2"),
      netPatterns: ["RGMII_*"],
    }),
  }),
  preset("ethernet-pairs", "Ethernet pairs", "Pairs", "100 Ω ± 10 % differential, 125 Mb/s", {
    ...pair("Ethernet pairs", "100", "10", "2", { rate: Mbps("125"), spacing: mm("0.4") }),
  }),
  preset("usb2", "USB-2-like pair", "Pairs", "90 Ω ± 15 % differential, 480 Mb/s, ended inside the parts", {
    ...pair("USB pair", "90", "15", "0.5", {
      rate: Mbps("480"),
      spacing: mm("0.4"),
      netPatterns: ["USB_D*"],
    }),
  }),
  preset("lvds", "LVDS", "Pairs", "100 Ω ± 10 % differential, 400 Mb/s, 100 Ω across the end", {
    ...pair("LVDS", "100", "10", "0.4", {
      rate: Mbps("400"),
      termination: across("100"),
      spacing: mm("0.3"),
    }),
  }),
  preset(
    "bus-120",
    "RS-485 or CAN pair",
    "Pairs",
    "120 Ω ± 10 % differential, 1 Mb/s, 120 Ω across the end",
    {
      ...pair("Field bus pair", "120", "10", "20", { rate: Mbps("1"), termination: across("120") }),
    },
  ),
  preset("clock", "Clocks", "Clocks", "50 Ω ± 10 %, 50 MHz, series 33 Ω, kept 0.3 mm apart", {
    ...single("Clock", "0.8", {
      signal: "clock",
      rate: MHz("50"),
      termination: series("33"),
      spacing: mm("0.3"),
      netPatterns: ["*CLK*"],
    }),
  }),
];
