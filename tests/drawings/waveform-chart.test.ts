import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { svgString } from "@/lib/drawings/svg-string";
import { excesses, thinned, voltsAt } from "@/lib/drawings/wave-samples";
import {
  type LimitLine,
  waveformChart,
  waveformCursor,
  type WaveProbe,
} from "@/lib/drawings/waveform-chart.geometry";
import { textWidth } from "@/lib/drawings/text-width";
import { textMarks, texts } from "./texts";

const ns = 1e-9;
const ringing: WaveProbe = {
  id: "u7",
  label: "U7.4",
  time: [0, 1 * ns, 2 * ns, 3 * ns, 4 * ns],
  volts: [0, 4, 2.5, 3.3, 3.3],
};
const above: LimitLine = { id: "above", label: "Above rail", volts: 3.6, side: "max" };
const back: LimitLine = { id: "back", label: "Ringback", volts: 2.8, side: "min", from: 1 * ns };

describe("voltsAt", () => {
  it("is straight between samples, level beyond the ends, and takes the later value of a jump", () => {
    expect(voltsAt(ringing, 0.5 * ns)).toBeCloseTo(2, 12);
    expect(voltsAt(ringing, -1)).toBe(0);
    expect(voltsAt(ringing, 9)).toBe(3.3);
    expect(voltsAt({ time: [0, 1, 1, 2], volts: [0, 0, 5, 5] }, 1)).toBe(5);
    expect(voltsAt({ time: [], volts: [] }, 1)).toBeNull();
  });
});

describe("excesses", () => {
  it("finds the crossing points on the straight lines, to 1e-12 of the time", () => {
    const [over] = excesses(ringing, 3.6, "max", 0, 4 * ns);
    expect((over?.from ?? 0) / ns).toBeCloseTo(0.9, 12);
    expect((over?.to ?? 0) / ns).toBeCloseTo(1 + 0.4 / 1.5, 12);
    expect(over?.worst.past).toBeCloseTo(0.4, 12);
  });

  it("counts only the time in which the limit holds", () => {
    expect(excesses(ringing, 2.8, "min", 1 * ns, 4 * ns)).toHaveLength(1);
    expect(excesses(ringing, 2.8, "min", 0, 4 * ns)).toHaveLength(2);
    expect(excesses(ringing, 2.8, "min", 3 * ns, 4 * ns)).toEqual([]);
  });

  it("finds none when the wave only touches the limit", () => {
    expect(excesses(ringing, 4, "max", 0, 4 * ns)).toEqual([]);
  });

  it("is beyond the limit at every point it encloses (property)", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 2, maxLength: 30 }),
        (volts) => {
          const wave = { time: volts.map((_, i) => i), volts };
          for (const e of excesses(wave, 0.2, "max", 0, volts.length - 1))
            for (const [t, v] of e.outline) {
              expect(v).toBeGreaterThanOrEqual(0.2);
              expect(t).toBeGreaterThanOrEqual(e.from);
              expect(t).toBeLessThanOrEqual(e.to);
            }
        },
      ),
    );
  });
});

describe("thinned", () => {
  it("keeps the highest and lowest sample of 100,000 in four points a column", () => {
    const time = Float64Array.from({ length: 100_000 }, (_, i) => i);
    const volts = Float64Array.from(time, (t) => Math.sin(t / 300));
    volts[54_321] = 7;
    volts[777] = -7;
    const kept = thinned({ time, volts }, 0, 99_999, 500);
    expect(kept.length).toBeLessThanOrEqual(4 * 501);
    expect(kept.map(([, v]) => v)).toEqual(expect.arrayContaining([7, -7]));
    expect(kept.every(([t], i) => i === 0 || t >= (kept[i - 1]?.[0] ?? 0))).toBe(true);
  });
});

describe("waveformChart", () => {
  const drawing = waveformChart([ringing], [above, back], { width: 800 });

  it("names each limit at its line and how far it is passed", () => {
    expect(texts(drawing)).toEqual(
      expect.arrayContaining([
        "Above rail 3.60\u2009V",
        "400\u2009mV past",
        "Ringback 2.80\u2009V",
        "300\u2009mV past",
      ]),
    );
  });

  it.each([330, 500, 800])(
    "keeps how far a limit is passed clear of every limit's name, %i px wide",
    (width) => {
      const settled = (volts: number, side: "max" | "min"): LimitLine => ({
        id: side,
        label: "Settled by then",
        volts,
        side,
        from: 1.8 * ns,
      });
      const crowded = waveformChart([ringing], [above, back, settled(3.2, "max"), settled(2.9, "min")], {
        width,
      });
      const rooms = textMarks(crowded)
        .filter((mark) => mark.halo)
        .map((mark) => {
          const words = mark.spans.map((span) => span.text).join("");
          const left = mark.anchor === "end" ? mark.x - textWidth(words, 12) : mark.x;
          return { words, left, right: left + textWidth(words, 12), y: mark.y };
        });
      const notes = rooms.filter(({ words }) => words.endsWith("past"));
      expect(notes).toHaveLength(4);
      for (const note of notes)
        for (const other of rooms)
          if (other !== note && other.left < note.right && note.left < other.right)
            expect(Math.abs(other.y - note.y), `${note.words} on ${other.words}`).toBeGreaterThanOrEqual(12);
    },
  );

  it("tells the same in words", () => {
    expect(drawing.description).toContain(
      "Above rail at 3.60\u2009V: passed by U7.4 by 400\u2009mV at 1.00\u2009ns",
    );
    expect(waveformChart([ringing], [{ ...above, volts: 5 }], { width: 800 }).description).toContain(
      "Above rail at 5.00\u2009V: kept",
    );
  });

  it("does not judge a line that is only for reference", () => {
    expect(waveformChart([ringing], [{ ...above, reference: true }], { width: 800 }).violations).toEqual([]);
  });

  it("keeps the names of six lines that end together apart by a line of text", () => {
    const six = Array.from({ length: 6 }, (_, i): WaveProbe => ({
      ...ringing,
      id: `p${i}`,
      label: `Pin ${i}`,
    }));
    const rows = textMarks(waveformChart(six, [], { width: 800 }))
      .filter((t) => t.spans[0]?.text.startsWith("Pin"))
      .map((t) => t.y)
      .sort((a, b) => a - b);
    expect(rows).toHaveLength(6);
    rows.forEach((y, i) => i > 0 && expect(y - (rows[i - 1] ?? 0)).toBeGreaterThan(14.9));
  });

  it("puts the cursor's dot on the wave and reads its time back, to 1e-9 of the span", () => {
    expect(drawing.timeAt(drawing.x(1.5 * ns)) / ns).toBeCloseTo(1.5, 9);
    const dot = waveformCursor(drawing, [ringing], 0.5 * ns).find((m) => m.kind === "circle");
    expect(dot?.kind === "circle" && dot.cy).toBeCloseTo(drawing.y(2), 9);
    expect(waveformCursor(drawing, [ringing], null)).toEqual([]);
  });

  it("has a unit on every number of its axes", () => {
    const ticks = textMarks(drawing)
      .filter((t) => t.ink === "ink-soft")
      .map((t) => t.spans.map((s) => s.text).join(""));
    expect(ticks.length).toBeGreaterThan(6);
    for (const label of ticks) expect(label).toMatch(/^\u2212?[\d.]+\u2009(V|mV|ns|ps)$/);
  });

  it.each([
    ["no probe", []],
    ["an empty one", [{ ...ringing, time: [], volts: [] }]],
    ["one without a finite sample", [{ ...ringing, volts: [NaN, NaN, NaN, NaN, NaN] }]],
  ])("says that there is nothing to show for %s", (_, probes) => {
    const none = waveformChart(probes, [above], { width: 400 });
    expect(none.empty).toBe("No waveform to show.");
    expect(svgString(none)).not.toMatch(/NaN|Infinity/);
  });
});
