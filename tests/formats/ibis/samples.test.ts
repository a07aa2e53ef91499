import { existsSync, readdirSync, readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { columnPoints } from "@/lib/formats/ibis/corners";
import type { IbisModel } from "@/lib/formats/ibis/document";
import { ibisDriver } from "@/lib/formats/ibis/driver";
import { fixtureVolts } from "@/lib/formats/ibis/edge-weights";
import { ibisQuality } from "@/lib/formats/ibis/quality";
import { readIbis } from "@/lib/formats/ibis/read";
import { simulate } from "@/lib/si/lattice";
import { sample } from "./salt-buffer";

// Public sample models of an open-source reader, not part of this project.
const folder = fileURLToPath(new URL("../../../../shared/reference/ibis", import.meta.url));
const present = existsSync(folder);
if (!present)
  process.stdout.write(
    "Skipped: the public IBIS samples are not beside this repository (shared/reference/ibis).\n",
  );
const read = (file: string) => readIbis(readFileSync(`${folder}/${file}`));

/** Worst miss of a waveform put through its own fixture, as a share of its swing. */
function worstMiss(model: IbisModel, corner: "slow" | "typical" | "fast", which: number): number {
  const waveform = model.waveforms[which]!;
  const request = { name: "D", node: "pad", edges: [{ at: 0, edge: waveform.edge }] };
  const { driver, parts } = ibisDriver(model, corner, request);
  const points = columnPoints(waveform.rows, corner);
  const start = points[0]![0];
  const { time, voltage } = simulate(
    {
      rails: [{ name: "f", node: "f", volts: fixtureVolts(waveform, corner) }],
      drivers: [driver],
      sections: [],
      parts: [...parts, { name: "R", kind: "R", a: "pad", b: "f", value: waveform.resistance }],
      probes: [{ name: "pad", node: "pad" }],
    },
    { until: points.at(-1)![0] - start },
  );
  const volts = points.map(([, v]) => v);
  const swing = Math.max(...volts) - Math.min(...volts);
  return Math.max(...points.map(([t, v]) => Math.abs(sample(time, voltage.pad!, t - start) - v))) / swing;
}

describe.skipIf(!present)("public samples", () => {
  const files = present ? readdirSync(folder).filter((file) => file.endsWith(".ibs")) : [];

  it.each(files)("%s is read, and no value of it counts as wrong", (file) => {
    const { document, problems } = read(file);
    expect(document?.models.length).toBeGreaterThan(0);
    expect(problems.filter(({ severity }) => severity === "error")).toEqual([]);
    for (const { line, reason } of ibisQuality(document!))
      expect([line > 0, reason.endsWith(".")]).toEqual([true, true]);
  });

  it("all pins, models and waveforms are there: 231, 14 and 32", () => {
    const { document } = read("sample1.ibs");
    expect(document?.components[0]?.pins).toHaveLength(231);
    expect(document?.models).toHaveLength(14);
    expect(document?.models.flatMap(({ waveforms }) => waveforms)).toHaveLength(32);
    expect(document?.selectors[0]?.choices).toHaveLength(2);
  });

  it("submodels, series parts and tables that fall are named", () => {
    const reasons = (file: string) => [
      ...read(file).problems.map(({ reason }) => reason),
      ...ibisQuality(read(file).document!).map(({ reason }) => reason),
    ];
    expect(reasons("bushold.ibs").join()).toContain("Submodel BUS_HOLD");
    expect(reasons("diff_pecl_term.ibs").join()).toContain("[R Series] is known but not simulated");
    expect(reasons("dclampst.ibs").join()).toContain("falls by 1.9 % of its range");
  });

  it("an ECL output, whose both tables hang from the upper supply, swings from 3.19 V to 4.08 V on 50 Ω to 3 V", () => {
    const { document } = read("diff_pecl_term.ibs");
    expect(document?.components[0]?.differential[0]).toMatchObject({
      pin: "1",
      inverting: "2",
      threshold: 0.25,
    });
    const model = document!.models.find(({ name }) => name === "PECL_DIFF_OUT")!;
    const edges = [{ at: 0, edge: "rise" as const }];
    const { driver, parts } = ibisDriver(model, "typical", { name: "D", node: "pad", edges });
    const { voltage } = simulate(
      {
        rails: [{ name: "vt", node: "vt", volts: 3 }],
        drivers: [driver],
        sections: [],
        parts: [...parts, { name: "R", kind: "R", a: "pad", b: "vt", value: 50 }],
        probes: [{ name: "pad", node: "pad" }],
      },
      { until: 5e-9 },
    );
    expect(voltage.pad![0]).toBeCloseTo(3.19, 1);
    expect(voltage.pad!.at(-1)).toBeCloseTo(4.08, 1);
  });

  it("every waveform at every corner comes back in its own fixture, to 0.2 % of its swing", () => {
    let waveforms = 0;
    for (const file of files)
      for (const model of read(file).document?.models ?? [])
        for (const which of model.waveforms.keys())
          for (const corner of ["slow", "typical", "fast"] as const) {
            waveforms++;
            expect(worstMiss(model, corner, which), `${model.name} ${corner} ${which}`).toBeLessThan(2e-3);
          }
    expect(waveforms).toBe(102);
  }, 120_000);
});
