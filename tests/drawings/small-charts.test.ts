import { describe, expect, it } from "vitest";
import { csvText } from "@/lib/drawings/csv-rows";
import { impedanceWidth } from "@/lib/drawings/impedance-width.geometry";
import { marginBins, marginHistogram } from "@/lib/drawings/margin-histogram.geometry";
import {
  lengthText,
  numberText,
  ohmsText,
  quantityText,
  scaledUnit,
  voltsText,
} from "@/lib/drawings/number-text";
import { LIGHT } from "@/lib/drawings/palette";
import { playbackAfter, startPlayback, WHOLE_SPAN_SECONDS } from "@/lib/drawings/playback";
import { svgString } from "@/lib/drawings/svg-string";
import { verdictBar, verdictPieces } from "@/lib/drawings/verdict-bar.geometry";
import { waveformChart } from "@/lib/drawings/waveform-chart.geometry";
import { TOKENS } from "@/tailwind.config";

describe("numbers", () => {
  it("carries a thin space and a true minus", () => {
    expect(voltsText(-0.32, true)).toBe("\u2212320\u2009mV");
    expect(quantityText(1.24e-9, "s")).toBe("1.24\u2009ns");
    expect(lengthText(17.5e-6, "mm")).toBe("0.0175\u2009mm");
    expect(lengthText(127e-6, "mil")).toBe("5.00\u2009mil");
    expect(ohmsText(49.9)).toBe("49.9\u2009\u03a9");
  });

  it("never writes a number that is none", () => {
    expect(numberText(NaN, 2)).toBe("\u2013");
    expect(ohmsText(null)).toBe("no data");
    expect(lengthText(null, "mm")).toBe("no data");
    expect(scaledUnit(NaN, "V").unit).toBe("V");
    expect(numberText(-0.0001, 2)).toBe("0.00");
  });
});

describe("verdict bar", () => {
  it("divides the whole width in proportion, none too thin to see", () => {
    const pieces = verdictPieces({ pass: 9000, fail: 1, waived: 999 }, 500);
    expect(pieces.reduce((sum, p) => sum + p.width, 0)).toBeCloseTo(500, 9);
    expect(pieces.find((p) => p.verdict === "fail")?.width).toBe(4);
    const [waived, pass] = ["waived", "pass"].map((v) => pieces.find((p) => p.verdict === v)?.width ?? 0);
    expect((pass ?? 0) / (waived ?? 1)).toBeCloseTo(9000 / 999, 9);
  });

  it("says all counts in words, and when there are none", () => {
    expect(verdictBar({ pass: 8211, fail: 37 }, { width: 400 }).description).toBe(
      "8,248 paths: 37 fail, 8,211 pass.",
    );
    expect(verdictBar({}, { width: 400 }).empty).toBe("No paths checked yet.");
  });
});

describe("margin histogram", () => {
  it("has an edge at zero and counts every margin once", () => {
    const margins = Array.from({ length: 1000 }, (_, i) => ((i * 7919) % 997) - 300);
    const bins = marginBins(margins);
    expect(bins.some((b) => Math.abs(b.from) < 1e-9)).toBe(true);
    expect(bins.reduce((sum, b) => sum + b.count, 0)).toBe(1000);
    expect(bins.length).toBeLessThanOrEqual(30);
    const below = bins.filter((b) => b.to <= 0).reduce((sum, b) => sum + b.count, 0);
    expect(below).toBe(margins.filter((m) => m < 0).length);
  });

  it("leaves out what is no number, and says when none is known", () => {
    expect(marginHistogram([NaN], { width: 200, unit: "mV" }).empty).toBe("No margin is known.");
    expect(svgString(marginHistogram([0, 0], { width: 200, unit: "mV" }))).not.toMatch(/NaN|Infinity/);
  });
});

describe("impedance against width", () => {
  const points = [100, 150, 200].map((w, i) => ({ width: w * 1e-6, impedance: [60, 50, 42][i] ?? 0 }));

  it("reads the chosen width on the straight line between computed ones", () => {
    const drawing = impedanceWidth(points, {
      width: 600,
      unit: "mm",
      chosen: 125e-6,
      target: { ohms: 50, tolerance: 0.1 },
    });
    expect(drawing.chosenOhms).toBeCloseTo(55, 9);
    expect(drawing.description).toContain("Target 50\u2009\u03a9 ± 10\u2009%.");
  });

  it("says that one point is no line", () => {
    expect(impedanceWidth(points.slice(0, 1), { width: 600, unit: "mm" }).empty).toBe(
      "Not enough widths were computed.",
    );
  });
});

describe("playback", () => {
  it("passes the whole span in its time and stops at the end", () => {
    let now = playbackAfter(startPlayback(0, 6), { kind: "play" });
    now = playbackAfter(now, { kind: "tick", elapsed: WHOLE_SPAN_SECONDS / 2 });
    expect(now.time).toBeCloseTo(3, 12);
    now = playbackAfter(now, { kind: "tick", elapsed: WHOLE_SPAN_SECONDS });
    expect(now).toMatchObject({ time: 6, playing: false });
    expect(playbackAfter(now, { kind: "play" })).toMatchObject({ time: 0, playing: true });
  });

  it("keeps the cursor inside the span, whatever it is told", () => {
    const now = startPlayback(1, 2, NaN);
    expect(now.time).toBe(1);
    expect(playbackAfter(now, { kind: "seek", time: 9 }).time).toBe(2);
    expect(playbackAfter(now, { kind: "step", steps: -5 }).time).toBe(1);
    expect(playbackAfter(now, { kind: "span", start: 3, end: 4 }).time).toBe(3);
    expect(startPlayback(NaN, 2)).toMatchObject({ start: 0, end: 0, time: 0 });
  });
});

describe("files", () => {
  it("gives the same SVG bytes for the same drawing, in the light palette of the page", () => {
    const probe = { id: "a", label: 'U7 <4> & "x"', time: [0, 1e-9], volts: [0, 1] };
    const make = () => svgString(waveformChart([probe], [], { width: 300 }));
    expect(make()).toBe(make());
    expect(make()).toContain("U7 &lt;4&gt; &amp; &quot;x&quot;");
    expect(make()).not.toContain("var(");
    for (const [name, value] of Object.entries(LIGHT))
      expect(TOKENS[name as keyof typeof LIGHT].light).toBe(value);
  });

  it("writes CSV that survives quotes, commas and formulas", () => {
    expect(csvText([["a,b", 'c"d', "=1+1", 1.5, null, NaN]])).toBe('"a,b","c""d",\'=1+1,1.5,,\r\n');
  });
});
