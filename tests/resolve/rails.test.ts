import { describe, expect, it } from "vitest";
import { looksLikeRail, railVoltage } from "@/lib/resolve/rails";

describe("supplies and grounds by their whole name (common practice, no source)", () => {
  const voltages: [string, number][] = [
    ["+3V3", 3.3],
    ["3V3", 3.3],
    ["1V8", 1.8],
    ["VCC_3V3", 3.3],
    ["VDD1.8", 1.8],
    ["3.3V", 3.3],
    ["-5V", -5],
    ["+12V", 12],
    ["+12V_SENS", 12],
    ["VDDQ_1V2", 1.2],
    ["5V0_USB", 5],
    ["P3V3", 3.3],
    ["+1P8V", 1.8],
    ["GND", 0],
    ["AGND", 0],
    ["GND1", 0],
    ["VSS", 0],
    ["0V", 0],
  ];
  for (const [name, volts] of voltages)
    it(`${name} is ${volts} V`, () => {
      expect(looksLikeRail(name)).toBe(true);
      expect(railVoltage(name)).toBe(volts);
    });
  it.each(["VTT", "VREF", "VCC", "VDDIO", "VBUS", "VDD_CORE"])(
    "%s is a supply of unknown voltage",
    (name) => {
      expect(looksLikeRail(name)).toBe(true);
      expect(railVoltage(name)).toBeNull();
    },
  );
  it.each([
    "3V3_EN",
    "1V8_PGOOD",
    "VDD_PG",
    "SD_DQ0",
    "V1",
    "CLK_25",
    "A12",
    "V2_OUT",
    "P1.0",
    "1.2",
    "12P3",
    "GNDOK",
    "MDC",
  ])("%s is a signal", (name) => {
    expect(looksLikeRail(name)).toBe(false);
    expect(railVoltage(name)).toBeNull();
  });
});
