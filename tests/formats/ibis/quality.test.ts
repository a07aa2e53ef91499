import { expect, it } from "vitest";
import { ibisQuality } from "@/lib/formats/ibis/quality";
import { readIbis } from "@/lib/formats/ibis/read";
import { saltFile } from "./salt-buffer";

const whole = saltFile();
const checks = (text: string) =>
  ibisQuality(readIbis(text).document!).map(({ check, severity, line }) => `${severity} ${check} ${line}`);

it("a consistent model has its missing corners named and nothing else", () => {
  expect(checks(whole)).toEqual(["warning missing corner 14"]);
});

it.each([
  ["C_comp", /C_comp.*\n/, "warning missing value 14"],
  ["the voltage range", /\[Voltage Range\].*\n/, "error missing value 14"],
  ["the ramp beside waveforms", /\[Ramp\][^[]*/, "notice missing value 14"],
  ["Vinl", /Vinl.*\n/, "warning missing value 14"],
  ["the pullup", /\[Pullup\][^[]*/, "error missing value 14"],
])("names %s where it is missing", (_, pattern, finding) => {
  expect(checks(whole.replace(pattern, ""))).toContain(finding);
});

it("finds a current that falls, by its table's line", () => {
  const at = whole.split("\n").indexOf("[Pulldown]") + 1;
  expect(checks(whole.replace("1.2 0.0395 NA NA", "1.2 0.0295 NA NA"))).toContain(
    `warning falling table ${at}`,
  );
});

it("finds a waveform that does not begin where the tables rest", () => {
  const at = whole.split("\n").indexOf("[Rising Waveform]") + 1;
  const moved = whole.replace(/(V_fixture = 0\n)0 \S+/, (_all, start: string) => `${start}0 0.2`);
  expect(checks(moved)).toContain(`warning end points ${at}`);
});

it("finds a clamp that counts twice", () => {
  const doubled = whole
    .replace("-3.3 -0.09 NA NA\n-1 -0.04 NA NA", "-3.3 -0.99 NA NA\n-1 -0.1 NA NA")
    .replace("-1.2 -0.12 NA NA\n", "");
  expect(checks(doubled)).toContain(
    `warning double-counted clamp ${whole.split("\n").indexOf("[Pulldown]") + 1}`,
  );
});

it("finds a ramp that swings otherwise than the tables, a short table, and columns out of order", () => {
  expect(
    checks(whole.replace("dV/dt_r 1.26", "dV/dt_r 2.26")).some((one) => one.includes("notice ramp")),
  ).toBe(true);
  expect(
    checks(whole.replaceAll(/-3.3 -?0.09 NA NA\n/g, "")).some((one) => one.includes("short table")),
  ).toBe(true);
  expect(checks(whole.replace("3.0pF 2.5pF", "3.0pF 3.5pF"))).toContain("warning order of corners 20");
});

it("finds waveforms that the tables cannot give", () => {
  const strong = whole.replace(
    /(V_fixture = 0\n)([\s\S]*?)(\[Rising)/,
    (_all, start: string, rows: string, end: string) =>
      start + rows.replace(/^(\S+) (\S+)/gm, (_row, t: string, v: string) => `${t} ${Number(v) * 1.6}`) + end,
  );
  expect(checks(strong).some((one) => one.includes("switching weights"))).toBe(true);
});
