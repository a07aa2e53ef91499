import { expect, it } from "vitest";
import { linearDriver } from "@/lib/formats/ibis/linear-driver";
import { modelDocOf } from "@/lib/formats/ibis/model-doc";
import { readIbis } from "@/lib/formats/ibis/read";
import { saltFile, SUPPLY } from "./salt-buffer";

const model = (text: string) => readIbis(text).document!.models[0]!;

it("the plain driver rests on a 50 Ω line where the tables do, to 1 mV", () => {
  const { supply, resistance } = linearDriver(model(saltFile()), "typical");
  const level = (supply * 50) / (50 + resistance);
  const current = level / 50;
  const drop = SUPPLY - level;
  // The table's piece between 1.2 V (39.5 mA) and 1.8 V (46.5 mA).
  const onTable = drop < 1.8 ? 0.0395 + ((drop - 1.2) * 0.007) / 0.6 : NaN;
  expect(Math.abs(current - onTable)).toBeLessThan(2e-5);
});

it("its edge is the ramp's 20–80 % time, widened to 10–90 %, where there are no waveforms", () => {
  expect(linearDriver(model(saltFile({ waveforms: false })), "typical").riseTime).toBeCloseTo(0.6e-9, 15);
});

it("a model of the project holds the driver, the die and every limit the file states", () => {
  const doc = modelDocOf(model(saltFile()));
  expect(doc).toMatchObject({
    name: "SALT_BUF",
    origin: "model",
    driver: { vdd: { value: "3.3", unit: "V" } },
  });
  expect(doc.receiver).toMatchObject({
    capacitance: { min: { value: "2.5", unit: "pF" }, typical: { value: "3" }, max: { value: "3.5" } },
    vil: { value: "0.8" },
    vih: { value: "2.1" },
    vihAc: null,
    vmeas: { value: "1.5" },
    maxAbove: { value: "0.8" },
    maxBelow: { value: "0.5" },
  });
});

it("what cannot become one says why", () => {
  const made = (change: (text: string) => string) => () =>
    modelDocOf(model(change(saltFile({ waveforms: false }))));
  expect(made((text) => text.replace(/\[Voltage Range\].*/, ""))).toThrow("no voltage range");
  expect(made((text) => text.replace("I/O", "Output_ECL"))).toThrow("rail to rail");
  expect(made((text) => text.replace("I/O", "Series"))).toThrow("fill one part");
  expect(made((text) => text.replace(/\[Ramp\][^[]*/, ""))).toThrow("no ramp and no waveform");
});
