import { describe, expect, it } from "vitest";
import { globMatcher } from "@/lib/formats/glob";
import { proposeFromNames } from "@/lib/formats/net-names";
import { assignRoles } from "@/lib/formats/pin-roles";

// Habits of naming are common practice, no source.
describe("supplies by name", () => {
  const kindOf = (name: string) => proposeFromNames([name]).outOfScope[0]?.kind ?? "signal";
  it.each([
    ...[
      "+12V",
      "-5V",
      "3V3",
      "+3V3",
      "1V8_CORE",
      "P3V3",
      "+1.8V",
      "VCC",
      "VCC3",
      "VCC_IO",
      "VDD",
      "VDDQ",
      "VDDD",
      "AVDD",
      "VTT",
      "VREF",
      "VBAT",
      "VIN",
      "VREFL",
    ].map((name) => [name, "power"]),
    ...["GND", "AGND", "DGND", "PGND", "GNDA", "GND_ISO", "VSS", "0V", "CHASSIS"].map((name) => [
      name,
      "ground",
    ]),
    ...["TP12", "TEST_EN", "TEM_SCAN_EN"].map((name) => [name, "test"]),
    ...["NC_12", "Unused_0000024F", "BOOT0"].map((name) => [name, "static"]),
    ...[
      "3V3_EN",
      "VCC_PG",
      "PWR_RST*",
      "SD_DQ3",
      "VIDEO_D1",
      "VSYNC",
      "VALVE_EN",
      "VBUS_SENSE",
      "RESET",
      "GNSS_TX",
      "A12",
      "D0",
      "TESTER_TX",
      "VOICE",
      "V1_DATA",
    ].map((name) => [name, "signal"]),
  ])("%s is %s", (name, kind) => {
    expect(kindOf(name)).toBe(kind);
  });

  it.each(["TEST_CLK", "TEST_EN", "TEM_SCAN_EN", "SCAN_OUT", "TP12"])(
    "leaves %s unticked: it may be a clock or an enable",
    (name) => {
      expect(proposeFromNames([name]).outOfScope).toMatchObject([{ kind: "test", sure: false }]);
    },
  );
});

describe("pairs by name", () => {
  it.each([
    ["CLK_P", "CLK_N"],
    ["USB_DP", "USB_DM"],
    ["D+", "D-"],
    ["TXP", "TXN"],
    ["LN0_TX_P_SERIES", "LN0_TX_N_SERIES"],
    ["CANH", "CANL"],
    ["RX_P<3>", "RX_N<3>"],
    ["TXP3", "TXN3"],
    ["hdmi_p", "hdmi_n"],
    ["SDI_POS", "SDI_NEG"],
  ])("%s goes with %s", (positive, negative) => {
    expect(proposeFromNames([negative, positive, "OTHER"]).pairs).toMatchObject([{ positive, negative }]);
  });

  it("proposes none without a counterpart, and each net once", () => {
    expect(proposeFromNames(["STOP", "CLK_P", "STEP"]).pairs).toEqual([]);
    expect(proposeFromNames(["A_DP", "A_DM", "A_DN"]).pairs).toHaveLength(1);
  });
});

describe("buses and match groups by name", () => {
  const range = (count: number, make: (i: number) => string) =>
    Array.from({ length: count }, (_, i) => make(i));
  it.each([
    [range(4, (i) => `DQ[${i}]`), "DQ[0..3]"],
    [range(3, (i) => `A${i + 10}`), "A[10..12]"],
    [range(3, (i) => `D_${i}`), "D[0..2]"],
    [range(8, (i) => `SD_DQ${i}_S`), "SD_DQ_S[0..7]"],
    [["L<0>", "L<2>"], "L[0, 2]"],
  ])("%j is one bus", (names, label) => {
    expect(proposeFromNames(names).buses.map((bus) => bus.label)).toEqual([label]);
  });

  it("makes no bus of hashes", () => {
    expect(proposeFromNames(range(5, (i) => `N_${1000000 + i}`)).buses).toEqual([]);
  });

  it("matches a data bus by byte lane where it has strobes", () => {
    const names = [
      ...range(16, (i) => `DDR_DQ${i}`),
      "DDR_DQS0_P",
      "DDR_DQS0_N",
      "DDR_DQS1_P",
      "DDR_DQS1_N",
      "DDR_DM0",
      "DDR_DM1",
    ];
    const groups = proposeFromNames(names).matchGroups;
    expect(groups.map(({ name, nets }) => [name, nets.length])).toEqual([
      ["DDR_DQ lane 0", 11],
      ["DDR_DQ lane 1", 11],
    ]);
  });
});

describe("globMatcher", () => {
  it.each([
    ["U1", "u1", true],
    ["U*", "U12", true],
    ["?1", "R1", true],
    ["U1", "U12", false],
    ["*_CLK*", "SD_CLK_S", true],
    ["a.c", "abc", false],
    ["", "x", false],
    ["U?*", "U", false],
  ])("%j on %j is %j", (pattern, text, expected) => {
    expect(globMatcher(pattern)(text)).toBe(expected);
  });

  it("answers whatever the pattern", () => {
    expect(globMatcher("*a".repeat(40))("a".repeat(119) + "b")).toBe(false);
  });
});

it("lets the first rule that fits decide, and a role of the list before all", () => {
  const rule = { referencePattern: "*", partNumberPattern: "*", pinPattern: "*", netPattern: "*" };
  const result = assignRoles(
    [
      { net: "A", reference: "U1", pin: "1", partNumber: "MCU" },
      { net: "A", reference: "U2", pin: "1", partNumber: "MEM", role: "either" },
      { net: "B", reference: "U2", pin: "2", partNumber: "MEM" },
      { net: "C", reference: "Q1", pin: "1", partNumber: "" },
    ],
    [
      { ...rule, partNumberPattern: "mcu", role: "driver" },
      { ...rule, referencePattern: "U*", role: "receiver" },
    ],
  );
  expect(result.roles).toEqual(["driver", "either", "receiver", null]);
  expect(result.pinsOfRule).toEqual([1, 1]);
  expect(result.nets).toEqual({ noDriver: 2, oneDriver: 0, severalDrivers: 1 });
  expect(result.pins).toMatchObject({ driver: 1, either: 1, receiver: 1, open: 1 });
});
