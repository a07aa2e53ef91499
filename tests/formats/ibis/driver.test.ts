import { describe, expect, it } from "vitest";
import { ibisDriver } from "@/lib/formats/ibis/driver";
import { ibisLimits } from "@/lib/formats/ibis/limits";
import { ibisPackage, ibisReceiver } from "@/lib/formats/ibis/receiver";
import { readIbis } from "@/lib/formats/ibis/read";
import type { IbisModel } from "@/lib/formats/ibis/document";
import { simulate } from "@/lib/si/lattice";
import type { IvDriver, Network, Part } from "@/lib/si/network";
import { saltClamp, saltDriver, saltFile, sample, SUPPLY } from "./salt-buffer";

const modelOf = (text: string): IbisModel => {
  const model = readIbis(text).document?.models[0];
  if (!model) throw new Error("no model");
  return model;
};
const salt = modelOf(saltFile());
const rise = { name: "U1", node: "pad", edges: [{ at: 0, edge: "rise" as const }] };

/** A net the file's fixtures never saw: a line to a capacitor. */
const line = (driver: IvDriver, parts: Part[]): Network => ({
  rails: [],
  drivers: [driver],
  sections: [{ name: "T", kind: "line", a: "pad", b: "end", impedance: 60, delay: 0.8e-9 }],
  parts: [...parts, { name: "C", kind: "C", a: "end", b: "0", value: 2e-12 }],
  probes: [{ name: "end", node: "end" }],
});

describe("a driver from two waveforms", () => {
  it("drives a net it was never measured on as the buffer it was made of does, to 0.5 % of the swing", () => {
    const { driver, parts, methods, notes } = ibisDriver(salt, "typical", rise);
    expect(methods).toEqual({ rise: "two waveforms" });
    expect(notes).toEqual([]);
    const got = simulate(line(driver, parts), { until: 10e-9 });
    const want = simulate(line(saltDriver, [saltClamp]), { until: 10e-9 });
    let worst = 0;
    for (let t = 0; t < 9.9e-9; t += 20e-12)
      worst = Math.max(
        worst,
        Math.abs(sample(got.time, got.voltage.end!, t) - sample(want.time, want.voltage.end!, t)),
      );
    expect(worst / SUPPLY).toBeLessThan(5e-3);
  });

  it("gives each waveform back in its own fixture, to 0.2 % of its swing", () => {
    const { driver, parts } = ibisDriver(salt, "typical", rise);
    for (const { fixture, resistance, rows } of salt.waveforms) {
      const { time, voltage } = simulate(
        {
          rails: [{ name: "f", node: "f", volts: fixture.typ ?? 0 }],
          drivers: [driver],
          sections: [],
          parts: [...parts, { name: "R", kind: "R", a: "pad", b: "f", value: resistance }],
          probes: [{ name: "pad", node: "pad" }],
        },
        { until: 4e-9 },
      );
      const values = rows.map(({ typ }) => typ ?? 0);
      const swing = Math.max(...values) - Math.min(...values);
      for (const { x, typ } of rows)
        expect(Math.abs(sample(time, voltage.pad!, x) - (typ ?? 0)) / swing).toBeLessThan(2e-3);
    }
  });
});

describe("a driver from the ramp", () => {
  const ramped = modelOf(saltFile({ waveforms: false }));

  it("has the ramp's 20–80 % slope into the ramp's load, to 2 %", () => {
    const { driver, parts, methods } = ibisDriver(ramped, "typical", rise);
    expect(methods).toEqual({ rise: "ramp" });
    const { time, voltage } = simulate(
      {
        rails: [],
        drivers: [driver],
        sections: [],
        parts: [...parts, { name: "R", kind: "R", a: "pad", b: "0", value: 50 }],
        probes: [{ name: "pad", node: "pad" }],
      },
      { until: 3e-9 },
    );
    const v = voltage.pad!;
    const high = v.at(-1)!;
    const crossing = (level: number) => time[v.findIndex((value) => value >= level)]!;
    const slope = (0.6 * high) / (crossing(0.8 * high) - crossing(0.2 * high));
    expect(slope / (1.26 / 0.45e-9)).toBeCloseTo(1, 1);
    expect(Math.abs(slope / (1.26 / 0.45e-9) - 1)).toBeLessThan(0.02);
  });

  it("joins edges in turn, rests by the first, and says where one cuts another short", () => {
    const edges = [
      { at: 1e-9, edge: "rise" as const },
      { at: 6e-9, edge: "fall" as const },
      { at: 6.2e-9, edge: "rise" as const },
    ];
    const { driver, notes } = ibisDriver(ramped, "slow", { ...rise, edges });
    expect(driver.pullupWeight.value[0]).toBeCloseTo(0, 6);
    expect(driver.pullupWeight.value.at(-1)).toBeCloseTo(1, 6);
    expect(notes).toHaveLength(1);
    expect(notes[0]).toContain("cuts it short");
    expect(() =>
      ibisDriver(ramped, "slow", { ...rise, edges: [edges[0]!, { at: 2e-9, edge: "rise" }] }),
    ).toThrow("rise and fall in turn");
  });
});

describe("corners", () => {
  it("slow pairs the least supply with the most capacitance", () => {
    expect(ibisDriver(salt, "slow", rise).driver).toMatchObject({ vdd: 3.0, capacitance: 3.5e-12 });
    expect(ibisDriver(salt, "fast", rise).driver).toMatchObject({ vdd: 3.6, capacitance: 2.5e-12 });
  });

  it("where a column is NA the typical table stands in whole", () => {
    expect(ibisDriver(salt, "slow", rise).driver.pulldown).toEqual(
      ibisDriver(salt, "typical", rise).driver.pulldown,
    );
  });
});

describe("what cannot drive says why", () => {
  const made = (change: (text: string) => string) => () =>
    ibisDriver(modelOf(change(saltFile({ waveforms: false }))), "typical", rise);
  it("an input", () => expect(made((t) => t.replace("I/O", "Input"))).toThrow("does not drive"));
  it("no supply", () =>
    expect(made((t) => t.replace(/\[Voltage Range\].*/, ""))).toThrow("no voltage range"));
  it("no speed", () =>
    expect(made((t) => t.replace(/\[Ramp\][^[]*/, ""))).toThrow("neither a waveform nor a ramp"));
  it("another language", () =>
    expect(made((t) => t.replace("I/O", "Output_diff"))).toThrow("another language"));
});

describe("a receiver", () => {
  it("is its die and clamps; the limits are those of the file, spec before the plain lines", () => {
    const { parts, supply } = ibisReceiver(salt, "slow", { name: "U2", node: "n" });
    expect(supply).toBe(3.0);
    expect(parts.map(({ kind, name }) => `${kind} ${name}`)).toEqual(["C U2 die", "iv U2 ground clamp"]);
    const limits = ibisLimits(salt);
    expect(limits).toMatchObject({
      vil: 0.8,
      vih: 2.1,
      vmeas: 1.5,
      staticHigh: 4.1,
      staticLow: -0.5,
      vihAc: null,
    });
    expect(limits.lines).toMatchObject({ vil: 17, vih: 23 });
    expect(ibisLimits(salt, "fast").vih).toBe(2.2);
  });

  it("no limit is invented where a file is silent", () => {
    const silent = modelOf(saltFile({ waveforms: false }).replace(/Vin[lh].*\n/g, ""));
    expect(ibisLimits(silent)).toMatchObject({ vil: null, vih: null });
  });

  it("levels of [Receiver Thresholds] count from Vth", () => {
    const text = saltFile({ waveforms: false }).replace(
      "[Pulldown]",
      "[Receiver Thresholds]\nVth = 0.75\nVinh_ac = 175m\nVinl_dc = -0.1\n[Pulldown]",
    );
    const limits = ibisLimits(modelOf(text));
    expect(limits.vihAc).toBeCloseTo(0.925, 12);
    expect(limits.vil).toBeCloseTo(0.65, 12);
  });

  it("the package is the pin's own where it has one, else the component's", () => {
    const component = readIbis(saltFile({ waveforms: false })).document!.components[0]!;
    expect(ibisPackage(component, "A1", "slow")).toEqual({
      resistance: 0.06,
      inductance: 2.5e-9,
      capacitance: 0.3e-12,
    });
  });
});
