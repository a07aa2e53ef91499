import { describe, expect, it } from "vitest";
import { resolvePaths } from "@/lib/resolve/resolve-paths";
import type { ResolvedPath } from "@/lib/si/path/types";
import type { StoredNet } from "@/lib/schemas/net";
import type { RevisionInputs } from "@/lib/schemas/snapshot";
import { binding, netClass, outputModel, part, q, revisionInputs, routed } from "../support/revision-inputs";

function only(nets: StoredNet[], over: Partial<RevisionInputs> = {}): ResolvedPath {
  const { paths } = resolvePaths(revisionInputs(nets, over));
  const [path] = paths;
  if (!path || paths.length !== 1) throw new Error(`one path, not ${paths.length}`);
  return path;
}
const missing = (path: ResolvedPath) => path.missing.map((entry) => entry.input);

describe("what joins nets into one path", () => {
  const nets = [routed("D0_S", ["U1.1 R1.1 3"]), routed("D0", ["R1.2 U2.1 40"])];

  it("a series resistor between two nets makes one path of them", () => {
    const path = only(nets, { parts: [part("R1", "33R", "resistor")] });
    expect(path.nets.map((net) => net.name)).toEqual(["D0", "D0_S"]);
    expect(path.name).toBe("D0");
    expect(path.id).toBe("net-D0_S");
    expect(path.parts).toEqual([
      { reference: "R1", kind: "R", a: "R1.1", b: "R1.2", value: 33, role: "series" },
    ]);
    expect(path.drivers.map((pin) => pin.pin)).toEqual(["U1.1"]);
    expect(path.receivers.map((pin) => pin.pin)).toEqual(["U2.1"]);
    expect(path.missing).toEqual([]);
  });

  it.each(["4,7k", "4 700", "4,7k 1%"])("reads its value %s whole: 4700 Ω", (value) => {
    expect(only(nets, { parts: [part("R1", value, "resistor")] }).parts[0]?.value).toBe(4700);
  });

  it("an AC capacitor joins too", () => {
    const path = only([routed("TX", ["U1.1 C1.1 3"]), routed("TX_C", ["C1.2 U2.1 40"])], {
      parts: [part("C1", "100n", "capacitor")],
    });
    expect(path.nets).toHaveLength(2);
    expect(path.parts[0]).toMatchObject({ kind: "C", role: "series", value: 1e-7 });
  });

  it("a decoupling capacitor between supplies joins nothing", () => {
    const board = resolvePaths(
      revisionInputs(
        [routed("+3V3", ["C1.1 U1.9 2"]), routed("GND", ["C1.2 U1.10 2"]), routed("D0", ["U1.1 U2.1 40"])],
        { parts: [part("C1", "100n", "capacitor")] },
      ),
    );
    expect(board.paths.map((path) => path.nets.length)).toEqual([1]);
    expect(board.paths[0]?.parts).toEqual([]);
    expect(board.outOfScope.map(({ name, kind }) => `${name} ${kind}`)).toEqual(["+3V3 power", "GND ground"]);
  });

  it("two paths pulled up to one supply stay two, and the supply's voltage comes from its name", () => {
    const { paths } = resolvePaths(
      revisionInputs(
        [
          routed("D0", ["U1.1 U2.1 40", "U2.1 R1.1 1"]),
          routed("D1", ["U1.2 U2.2 40", "U2.2 R2.1 1"]),
          routed("1V8", ["R1.2 R2.2 4"]),
        ],
        { parts: [part("R1", "4k7", "resistor"), part("R2", "4.7 kΩ", "resistor")] },
      ),
    );
    expect(paths).toHaveLength(2);
    expect(paths[1]?.parts).toMatchObject([{ reference: "R2", value: 4700, role: "termination" }]);
    expect(paths[1]?.rails).toEqual([{ name: "1V8", node: "rail 1V8", volts: 1.8 }]);
  });

  it("a chain of two resistors is one path of three nets", () => {
    const path = only(
      [routed("A", ["U1.1 R1.1 3"]), routed("B", ["R1.2 R2.1 20"]), routed("C", ["R2.2 U2.1 20"])],
      {
        parts: [part("R1", "22R", "resistor"), part("R2", "10", "resistor")],
      },
    );
    expect(path.nets).toHaveLength(3);
    expect(path.parts.map((entry) => entry.value)).toEqual([22, 10]);
  });

  it("vias of one name on two nets are two nodes", () => {
    const path = only(
      [routed("D0_S", ["U1.1 via1 1", "via1 R1.1 1"]), routed("D0", ["R1.2 via1 20", "via1 U2.1 20"])],
      { parts: [part("R1", "33R", "resistor")] },
    );
    expect(new Set(path.sections.flatMap((section) => [section.a, section.b])).size).toBe(6);
  });
});

describe("pins", () => {
  const net = [routed("D0", ["U1.1 U2.1 40"])];
  it("the first binding that matches gives the role, the first with a model the model", () => {
    const bindings = [
      binding("U1", "driver", null),
      binding("*", "receiver", "OUT"),
      binding("U2", "receiver", "IN"),
    ];
    const path = only(net, { bindings });
    expect(path.drivers[0]?.driver?.name).toBe("OUT");
  });
  it("bindings match by part number, pin and net, whatever the case", () => {
    const bindings = [
      binding("*", "driver", "OUT", { partNumberPattern: "ssc-*", pinPattern: "1", netPattern: "d?" }),
      binding("U2", "receiver", "IN"),
    ];
    const path = only(net, { bindings, parts: [part("U1", "", "ic", "SSC-MCU")] });
    expect(path.drivers.map((pin) => pin.pin)).toEqual(["U1.1"]);
  });
  it("a class's models stand in, its driver at the class's edge", () => {
    const classes = [
      netClass("Data", {
        driverModelLineageId: "model-OUT",
        receiverModelLineageId: "model-IN",
        edge: q("0.5 ns"),
      }),
    ];
    const path = only(net, { classes, bindings: [binding("U1", "driver", null)] });
    expect(path.drivers[0]?.driver?.riseTime).toEqual({ slow: 0.5e-9, typical: 0.5e-9, fast: 0.5e-9 });
    expect(path.missing).toEqual([]);
  });
  it("a pin that can do either is driver and receiver", () => {
    const either = outputModel("IO", "20 Ω", "1 ns");
    const path = only(net, {
      models: [either, ...revisionInputs([]).models],
      bindings: [binding("U1", "either", "IO"), binding("U2", "receiver", "IN")],
      classes: [netClass("Data", { receiverModelLineageId: "model-IN" })],
    });
    expect(path.drivers.map((pin) => pin.pin)).toEqual(["U1.1"]);
    expect(path.receivers.map((pin) => pin.pin)).toEqual(["U1.1", "U2.1"]);
  });
});

describe("what is missing is named by the input that would fill it", () => {
  it("and says the way out where pins only receive, in the right number", () => {
    const bindings = { bindings: [binding("U1", "receiver", "IN"), binding("U2", "receiver", "IN")] };
    const path = only([routed("D0", ["U1.1 U2.1 40"])], bindings);
    expect(path.missing.find(({ input }) => input === "a driving pin")?.detail).toBe(
      "U1.1, U2.1 only receive. Say which pin drives, or put the net out of scope.",
    );
  });

  const net = [routed("D0", ["U1.1 U7.1 40"])];
  const inputs: [string, RevisionInputs["nets"], Partial<RevisionInputs>, string][] = [
    ["no roles", net, { bindings: [] }, "which of U1, U7 drives"],
    [
      "no driver model",
      net,
      { bindings: [binding("U1", "driver", null), binding("U7", "receiver", "IN")] },
      "driver model of U1",
    ],
    [
      "no receiver model",
      net,
      { bindings: [binding("U1", "driver", "OUT"), binding("U7", "receiver", null)] },
      "receiver model of U7",
    ],
    [
      "nobody listens",
      net,
      { bindings: [binding("U1", "driver", "OUT"), binding("U7", "passive", null)] },
      "receiver of D0",
    ],
    ["no length between its pins", [routed("D0", ["U1.1 U2.1 0"])], {}, "route of D0"],
    ["unknown layer", [routed("D0", ["U1.1 U2.1 40 ?"])], {}, 'layer "?" in the stackup'],
    [
      "a gap",
      [
        routed("D0", ["U1.1 via1 4", "via2 U2.1 4"], {
          scope: "incomplete",
          gaps: [{ kind: "islands", text: "via1 and via2 are not joined." }],
        }),
      ],
      {},
      "route of D0",
    ],
    [
      "a part without value",
      [routed("D0_S", ["U1.1 R1.1 3"]), routed("D0", ["R1.2 U2.1 40"])],
      { parts: [part("R1", "tbd", "resistor")] },
      "value of R1",
    ],
    [
      "a part whose value can be read two ways",
      [routed("D0_S", ["U1.1 R1.1 3"]), routed("D0", ["R1.2 U2.1 40"])],
      { parts: [part("R1", "4 70", "resistor")] },
      "value of R1",
    ],
    [
      "a part of a negative value",
      [routed("D0_S", ["U1.1 R1.1 3"]), routed("D0", ["R1.2 U2.1 40"])],
      { parts: [part("R1", "-33R", "resistor")] },
      "value of R1",
    ],
    [
      "a part not listed",
      [routed("D0_S", ["U1.1 R1.1 3"]), routed("D0", ["R1.2 U2.1 40"])],
      {},
      "value of R1",
    ],
    [
      "a part with one pin routed",
      [routed("D0", ["U1.1 U2.1 40", "U2.1 R1.1 1"])],
      { parts: [part("R1", "50R", "resistor")] },
      "other net of R1",
    ],
    [
      "a rail without voltage",
      [routed("D0", ["U1.1 U2.1 40", "U2.1 R1.1 1"]), routed("VTT", ["R1.2 U3.1 4"])],
      { parts: [part("R1", "50R", "resistor")] },
      "voltage of VTT",
    ],
    [
      "a pair",
      [routed("D0", ["U1.1 U2.1 40"], { pair: { partner: "D0_N", polarity: "P" } })],
      {},
      "simulation of coupled pairs",
    ],
    [
      "shape not known",
      [
        routed("D0", ["U1.1 U2.1 40", "U1.1 U3.1 0"], {
          topology: { ...routed("D0", ["U1.1 U2.1 40", "U2.1 U3.1 0"]).topology, shapeKnown: false },
        }),
      ],
      {},
      "branch lengths of D0",
    ],
  ];
  for (const [name, nets, over, input] of inputs)
    it(name, () => expect(missing(only(nets, over))).toContain(input));
});

describe("sections", () => {
  it("a controlled width takes the class's target and tolerance, another width the formula's nominal with the same tolerance", () => {
    const path = only([routed("D0", ["U1.1 via1 20 Top 0.28", "via1 U2.1 20 Top 0.12"])]);
    const [controlled, narrow] = path.sections;
    expect(
      [controlled?.impedance?.low, controlled?.impedance?.nominal, controlled?.impedance?.high].map((z) =>
        Number(z?.toFixed(9)),
      ),
    ).toEqual([45, 50, 55]);
    const nominal = narrow?.impedance?.nominal ?? 0;
    expect(nominal).toBeGreaterThan(60);
    expect(narrow?.impedance?.low).toBeCloseTo(0.9 * nominal, 9);
    // outer line on Dk 4.2: √εeff / c with 2.6 < εeff < 3.6
    expect(controlled?.delayPerMeter).toBeGreaterThan(5.3e-9);
    expect(controlled?.delayPerMeter).toBeLessThan(6.4e-9);
  });
  it("a stackup without a plane says so", () => {
    const inputs = revisionInputs([routed("D0", ["U1.1 U2.1 40"])]);
    inputs.stackup.layers = inputs.stackup.layers.filter((layer) => layer.kind !== "plane");
    const [path] = resolvePaths(inputs).paths;
    expect(path?.sections[0]?.impedance).toBeNull();
    expect(path?.missing[0]?.input).toContain("Top");
  });
});

describe("limits: net over class over project over default, with their origin", () => {
  const set = (limit: string | null, enabled = true) => ({ enabled, limit, note: "" });
  it("in that order", () => {
    const ruleSet = {
      version: 1,
      judgedAt: "pin" as const,
      rules: { overshoot: { enabled: true, limit: "25", severity: "warning" as const } },
    };
    const classes = [
      netClass("Data", {
        limits: { ringback: set("50"), settling: set(null, false) },
        flightTimeMax: q("450 ps"),
      }),
    ];
    const path = only([routed("D0", ["U1.1 U2.1 40"], { limits: { "above-rail": set("0.2") } })], {
      ruleSet,
      classes,
    });
    expect(path.limits.overshoot).toEqual({
      enabled: true,
      limit: 25,
      severity: "warning",
      origin: "project",
    });
    expect(path.limits.ringback).toMatchObject({ limit: 50, origin: "class" });
    expect(path.limits.settling).toMatchObject({ enabled: false, limit: 50, origin: "class" });
    expect(path.limits["above-rail"]).toMatchObject({ limit: 0.2, origin: "net" });
    expect(path.limits["below-rail"]).toMatchObject({ limit: 0.3, origin: "default" });
    expect(path.limits["flight-time"]?.limit).toBeCloseTo(450, 9);
  });
});

describe("neighbours and scope", () => {
  it("a row counts for both nets, with the height over the plane", () => {
    const { paths } = resolvePaths(
      revisionInputs([routed("D0", ["U1.1 U2.1 40"]), routed("D1", ["U1.2 U2.2 40"])], {
        neighbours: [
          { net: "D0", neighbour: "D1", layer: "Top", gap: q("0.2 mm"), parallelLength: q("20 mm") },
        ],
      }),
    );
    expect(paths.map((path) => path.neighbours[0]?.neighbour)).toEqual(["D1", "D0"]);
    expect(paths[0]?.neighbours[0]?.heightOverPlane).toBeCloseTo(0.15e-3, 9);
  });
  it("nets taken out of scope are listed with their reason", () => {
    const board = resolvePaths(
      revisionInputs([
        routed("TP1", ["U1.1 U2.1 4"], { scope: "out", scopeKind: "test", scopeReason: "Test pad" }),
      ]),
    );
    expect(board.paths).toEqual([]);
    expect(board.outOfScope).toEqual([
      { lineageId: "net-TP1", name: "TP1", kind: "test", reason: "Test pad" },
    ]);
  });
});
