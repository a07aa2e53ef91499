// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen } from "@testing-library/react";
import { afterEach, describe, expect, it, vi } from "vitest";
import { AlongLine } from "@/components/charts/along-line";
import { BounceDiagram } from "@/components/charts/bounce-diagram";
import { ImpedanceWidth } from "@/components/charts/impedance-width";
import { MarginHistogram } from "@/components/charts/margin-histogram";
import { StackupSection } from "@/components/charts/stackup-section";
import { TopologyStrip } from "@/components/charts/topology-strip";
import { TraceSection } from "@/components/charts/trace-section";
import { VerdictBar } from "@/components/charts/verdict-bar";
import { WaveformChart } from "@/components/charts/waveform-chart";
import type { LineRow } from "@/lib/drawings/line-row";
import type { Topology } from "@/lib/drawings/topology-graph";

afterEach(cleanup);

const um = 1e-6;
const ns = 1e-9;
const probes = [{ id: "a", label: "U7.4", time: [0, ns, 2 * ns], volts: [0, 4, 3.3] }];
const limits = [{ id: "above", label: "Above rail", volts: 3.6, side: "max" as const }];
const row: LineRow = {
  sections: [{ id: "s", impedance: 50, delay: ns, length: 0.15 }],
  nodes: ["U1.1", "U7.4"],
};
const wave = { time: [0, ns], volts: [1.65, 1.65] };
const topology: Topology = {
  driver: "U1.1",
  edges: [{ kind: "line", id: "s1", a: "n0", b: "n1", impedance: 50, delay: ns }],
  pins: [
    { pin: "U1.1", node: "n0", role: "driver" },
    { pin: "U7.4", node: "n1", role: "receiver", verdict: "fail" },
  ],
  terminations: [],
};

const drawings: [title: string, fact: string, element: React.ReactElement][] = [
  [
    "Stackup cross-section",
    "L1: signal, 0.035\u2009mm",
    <StackupSection
      key={1}
      width={700}
      unit="mm"
      layers={[{ id: "1", kind: "signal", name: "L1", thickness_m: 35 * um }]}
    />,
  ],
  [
    "Trace cross-section",
    "foot width 0.190\u2009mm",
    <TraceSection
      key={2}
      width={700}
      unit="mm"
      shape={{
        layers: [{ thickness: 110 * um, er: 4 }],
        upperPlane: false,
        traces: [{ x: 0, y: 110 * um, thickness: 45 * um, widthBottom: 190 * um, widthTop: 165 * um }],
      }}
    />,
  ],
  ["Topology", "then receiver U7.4, fail", <TopologyStrip key={3} width={700} topology={topology} />],
  [
    "Waveforms",
    "Above rail at 3.60\u2009V: passed by U7.4 by 400\u2009mV",
    <WaveformChart key={4} width={700} probes={probes} limits={limits} />,
  ],
  [
    "Bounce diagram",
    "+1.65\u2009V from U1.1 at 0.00\u2009ns to U7.4",
    <BounceDiagram
      key={5}
      width={700}
      row={row}
      rays={[{ id: "r", section: 0, outward: true, start: 0, amplitude: 1.65 }]}
      voltages={[]}
      span={[0, 4 * ns]}
      unit="mm"
    />,
  ],
  [
    "Voltage along the line",
    "U7.4 3.30\u2009V (incident 1.65\u2009V, reflected 1.65\u2009V)",
    <AlongLine
      key={6}
      width={700}
      row={row}
      waves={[{ outward: wave, inward: wave }]}
      span={[0, 4 * ns]}
      cursorTime={2 * ns}
      unit="mm"
    />,
  ],
  [
    "Margins",
    "2 margins from \u22125\u2009mV to 20\u2009mV: 1 fail",
    <MarginHistogram key={7} width={300} unit="mV" margins={[-5, 20]} />,
  ],
  ["Verdicts", "5 paths: 2 fail, 3 pass", <VerdictBar key={8} width={300} counts={{ pass: 3, fail: 2 }} />],
  [
    "Impedance against width",
    "Chosen: 0.150\u2009mm, 50\u2009\u03a9",
    <ImpedanceWidth
      key={9}
      width={500}
      unit="mm"
      chosen={150 * um}
      points={[100, 150, 200].map((w, i) => ({ width: w * um, impedance: 60 - 10 * i }))}
    />,
  ],
];

describe("every drawing", () => {
  it.each(drawings)("%s is an image with its name and the facts in words: %s", (title, fact, element) => {
    const { container } = render(element);
    const image = screen.getByRole("img", { name: title });
    expect(image.querySelector("desc")?.textContent).toContain(fact);
    expect(image.getAttribute("aria-describedby")).toBe(image.querySelector("desc")?.id);
    expect(container.innerHTML).not.toMatch(/NaN|Infinity|undefined/);
    const ids = [...container.querySelectorAll("[id]")].map((e) => e.id);
    expect(new Set(ids).size).toBe(ids.length);
  });

  it("takes its colours from the page's theme", () => {
    const { container } = render(<WaveformChart width={700} probes={probes} limits={limits} />);
    expect(container.innerHTML).not.toMatch(/#[0-9a-f]{6}/i);
    expect(container.innerHTML).toContain("var(--fail)");
  });
});

describe("WaveformChart", () => {
  it("moves its cursor by keys and says what is read there", () => {
    const onCursor = vi.fn();
    render(<WaveformChart width={700} probes={probes} cursorTime={ns} onCursor={onCursor} />);
    const cursor = screen.getByRole("slider", { name: "Time of the cursor" });
    expect(cursor.getAttribute("aria-valuetext")).toBe("1.00\u2009ns. U7.4 4.00\u2009V");
    const moves: [string, boolean, number][] = [
      ["ArrowRight", false, 1.02],
      ["ArrowLeft", true, 0.998],
      ["Home", false, 0],
      ["End", false, 2],
    ];
    for (const [key, shiftKey, expected] of moves) {
      fireEvent.keyDown(cursor, { key, shiftKey });
      expect((onCursor.mock.lastCall?.[0] as number) / ns).toBeCloseTo(expected, 9);
    }
  });

  it("has no cursor to move when nobody listens, and keeps the row of its reading", () => {
    const { container } = render(<WaveformChart width={700} probes={probes} />);
    expect(screen.queryByRole("slider")).toBeNull();
    expect(container.querySelector("dl")?.className).toContain("min-h-5");
  });
});

describe("picking", () => {
  it("tells which layer, section or verdict was clicked", () => {
    const onPick = vi.fn();
    const { container } = render(<TopologyStrip width={700} topology={topology} onPick={onPick} />);
    const section = container.querySelector('[data-hit="s1"] line');
    if (!section) throw new Error("no section drawn");
    fireEvent.click(section);
    expect(onPick).toHaveBeenCalledWith("s1");
  });
});
