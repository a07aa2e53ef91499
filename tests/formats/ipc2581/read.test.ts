import { gzipSync } from "node:zlib";
import { describe, expect, it } from "vitest";
import { readBoard } from "@/lib/formats/ipc2581/read";
import { boardXml, feature, line, pad, stream, via } from "./board-xml";

// All boards here are invented; expected lengths follow from their corners.
const read = (xml: string) => readBoard(stream(xml));
const net = (board: Awaited<ReturnType<typeof readBoard>>, name: string) => {
  const found = board.nets.find((one) => one.name === name);
  if (!found) throw new Error(`no net ${name}`);
  return found;
};
const sections = (board: Awaited<ReturnType<typeof readBoard>>, name: string) =>
  net(board, name).sections.map(({ from, to, layer, width_m, length_m }) => [
    from,
    to,
    layer,
    Number((width_m * 1e3).toFixed(6)),
    Number((length_m * 1e3).toFixed(6)),
  ]);

describe("lines, pins and vias of a net", () => {
  const step =
    feature(
      "TOP",
      pad("CLK", 0, 0, "U1.1") +
        pad("CLK", 10, 10, null) +
        line("CLK", ["0,0", "10,0", "10,10"]) +
        line("", ["0,5", "9,5"]),
    ) +
    feature("BOTTOM", pad("CLK", 10, 30, "U2.7") + line("CLK", ["10,10", "10,30"], "W200")) +
    feature("DRILL", via("CLK", 10, 10)) +
    feature("INK", line("CLK", ["0,0", "50,50"]));

  it.each(["A", "B", "C"])("join through a via from layer to layer in revision %s", async (revision) => {
    const board = await read(boardXml({ revision, step }));
    expect(board.revision).toBe(revision);
    expect(sections(board, "CLK")).toEqual([
      ["U1.1", "via1", "TOP", 0.15, 20],
      ["via1", "U2.7", "BOTTOM", 0.2, 20],
    ]);
    expect(net(board, "CLK")).toMatchObject({ vias: 1, pins: ["U1.1", "U2.7"] });
    expect(board.problems).toEqual([]);
  });

  it("mean the same in inch, mm and micron, to 1e-12 m", async () => {
    const lengths = await Promise.all(
      (
        [
          ["INCH", 1 / 25.4],
          ["MILLIMETER", 1],
          ["MICRON", 1000],
        ] as const
      ).map(async ([units, scale]) => {
        const at = [0, 0, 10 * scale, 0, 10 * scale, 10 * scale];
        const xml = boardXml({
          units,
          step: feature("TOP", line("A", [`${at[0]},${at[1]}`, `${at[2]},${at[3]}`, `${at[4]},${at[5]}`])),
        });
        const board = await read(xml);
        expect(net(board, "A").sections[0]?.width_m).toBeCloseTo(0.15e-3, 12);
        return net(board, "A").sections[0]?.length_m;
      }),
    );
    for (const length of lengths) expect(length).toBeCloseTo(0.02, 12);
  });

  it("are read alike from gzip, in chunks of any size, with a namespace's prefix, in UTF-16", async () => {
    const plain = await read(boardXml({ step }));
    const bytes = new Uint8Array(gzipSync(boardXml({ step })));
    expect(await readBoard(stream(bytes, 7))).toEqual(plain);
    expect(await readBoard(stream(boardXml({ step }), 1))).toEqual(plain);
    const prefixed = boardXml({ step })
      .replace(/<(\/?)(?=[A-Z])/g, "<$1b:")
      .replace("xmlns=", "xmlns:b=");
    expect(await read(prefixed)).toEqual(plain);
    const wide = new Uint8Array(
      Buffer.from(`\uFEFF${boardXml({ step }).replace("UTF-8", "UTF-16")}`, "utf16le"),
    );
    expect(await readBoard(stream(wide, 33))).toEqual(plain);
  });

  it("end in a pad's copper wherever they enter it, turned pads too", async () => {
    const turned = `<Xform rotation="90"/>`;
    const board = await read(
      boardXml({
        step: feature(
          "TOP",
          pad("A", 0, 0, "R1.1", "BAR", turned) +
            pad("A", 9, 0, "R2.1", "BAR") +
            line("A", ["0,0.45", "0,5"]) +
            line("A", ["0.4,0", "5,0"]) +
            line("A", ["9.45,0", "20,0"]),
        ),
      }),
    );
    // R1.1 stands upright: 0.45 above its centre is in it, 0.4 beside it is not.
    expect(sections(board, "A").map(([from]) => from)).toEqual(["R1.1", "j2", "R2.1"]);
  });

  it("are cut where another line or a via meets them on the way", async () => {
    const board = await read(
      boardXml({
        step:
          feature(
            "TOP",
            line("T", ["0,0", "10,0"]) + line("T", ["4,0.05", "4,3"]) + line("T", ["20,0", "20,9"]),
          ) + feature("DRILL", via("T", 20, 6)),
      }),
    );
    expect(sections(board, "T")).toEqual([
      ["j1", "j2", "TOP", 0.15, 4],
      ["j2", "j3", "TOP", 0.15, 6],
      ["j2", "j4", "TOP", 0.15, 2.95],
      ["j5", "via1", "TOP", 0.15, 6],
      ["via1", "j6", "TOP", 0.15, 3],
    ]);
  });

  it("keep an arc's own length, to 1e-9 m: a quarter, three quarters, a full turn", async () => {
    const arc = (end: string, clockwise: boolean) =>
      `<Set net="ARC"><Features><Arc startX="1" startY="0" ${end} centerX="0" centerY="0" clockwise="${clockwise}"><LineDesc lineEnd="ROUND" lineWidth="0.1"/></Arc></Features></Set>`;
    const curve = `<Set net="POLY"><Features><Polyline><PolyBegin x="5" y="0"/><PolyStepCurve x="7" y="0" centerX="6" centerY="0" clockwise="true"/><PolyStepSegment x="8" y="0"/><LineDescRef id="W150"/></Polyline></Features></Set>`;
    const board = await read(
      boardXml({
        step: feature("TOP", arc(`endX="0" endY="1"`, false) + arc(`endX="0" endY="1"`, true) + curve),
      }),
    );
    const lengths = net(board, "ARC").sections.map(({ length_m }) => length_m);
    expect(lengths[0]).toBeCloseTo((Math.PI / 2) * 1e-3, 9);
    expect(lengths[1]).toBeCloseTo(((3 * Math.PI) / 2) * 1e-3, 9);
    expect(net(board, "POLY").sections[0]?.length_m).toBeCloseTo((Math.PI + 1) * 1e-3, 9);
  });

  it("follow the place, turn and mirror of their features", async () => {
    const moved = `<Set net="M"><Features><Xform rotation="90" mirror="true"/><Location x="10" y="20"/><Line startX="0" startY="0" endX="3" endY="1"><LineDescRef id="W150"/></Line></Features></Set>`;
    const board = await read(boardXml({ step: feature("TOP", moved) }));
    const path = net(board, "M").sections[0]?.path.map((value) => Number((value * 1e3).toFixed(6)));
    // (3, 1) mirrored is (−3, 1), turned by 90° (−1, −3).
    expect(path).toEqual([10, 20, 9, 17]);
  });
});

describe("what else the file says", () => {
  it("finds pins without pads by their part's place, mirrored below the board", async () => {
    const data = `
<Package name="SO"><Pin number="1" type="SURFACE"><Location x="1" y="2"/></Pin></Package>
<Component refDes="U1" packageRef="SO" layerRef="TOP" part="gauge-amp"><Xform rotation="90"/><Location x="10" y="10"/></Component>
<Component refDes="U2" packageRef="SO" layerRef="BOTTOM" part="gauge-amp"><Xform mirror="true"/><Location x="30" y="10"/></Component>
<LogicalNet name="N"><PinRef componentRef="U1" pin="1"/><PinRef componentRef="U2" pin="1"/></LogicalNet>`;
    const board = await read(
      boardXml({
        step:
          data +
          feature("TOP", line("N", ["8,11", "8,20"])) +
          feature("BOTTOM", line("N", ["29,12", "40,12"])),
      }),
    );
    expect(sections(board, "N").map(([from]) => from)).toEqual(["U1.1", "U2.1"]);
    expect(board.parts.map(({ reference, partNumber, pins }) => [reference, partNumber, pins])).toEqual([
      ["U1", "gauge-amp", ["1"]],
      ["U2", "gauge-amp", ["1"]],
    ]);
  });

  it("takes value and number of parts from the bill of material", async () => {
    const xml = boardXml({
      step: `<Component refDes="R1" packageRef="" layerRef="TOP" part=""><Location x="0" y="0"/></Component>`,
    }).replace(
      "<Ecad",
      `<Bom name="b"><BomItem OEMDesignNumberRef="RES-33"><RefDes name="R1"/><Characteristics><Textual textualCharacteristicName="VALUE" textualCharacteristicValue="33R"/></Characteristics></BomItem></Bom><Ecad`,
    );
    expect((await read(xml)).parts).toMatchObject([{ reference: "R1", partNumber: "RES-33", value: "33R" }]);
  });

  it("reads the stackup in its sequence, with thickness, tolerance and specifications", async () => {
    const board = await read(
      boardXml({
        header: `<Spec name="core"><General type="MATERIAL"><Property text="glass epoxy"/></General><Dielectric type="DIELECTRIC_CONSTANT"><Property value="4.1" unit="NONE"/></Dielectric></Spec>
<Spec name="Z50"><Impedance type="SINGLE_ENDED" comment="TOP"><Property value="50" unit="OHMS" plusTol="5" minusTol="5"/></Impedance></Spec>`,
        data: `<Stackup name="four" overallThickness="1.6"><StackupGroup name="all">
<StackupLayer layerOrGroupRef="BOTTOM" thickness="0.035" sequence="3"/>
<StackupLayer layerOrGroupRef="TOP" thickness="0.035" tolPlus="0.005" tolMinus="0.004" sequence="1"><SpecRef id="Z50"/></StackupLayer>
<StackupLayer layerOrGroupRef="core" thickness="0.2" sequence="2"><SpecRef id="core"/></StackupLayer>
</StackupGroup></Stackup>`,
        step: feature("TOP", line("A", ["0,0", "1,0"])),
      }),
    );
    expect(board.stackup?.plies.map(({ layer }) => layer)).toEqual(["TOP", "core", "BOTTOM"]);
    expect(board.stackup?.thickness_m).toBeCloseTo(1.6e-3, 12);
    expect(board.stackup?.plies[0]).toMatchObject({ specs: ["Z50"] });
    expect(board.stackup?.plies[0]?.plus_m).toBeCloseTo(5e-6, 12);
    expect(board.specs[0]?.lines.map(({ about, text, value }) => [about, text, value])).toEqual([
      ["General", "glass epoxy", null],
      ["Dielectric", "", 4.1],
    ]);
    expect(board.specs[1]?.lines[0]).toMatchObject({
      about: "Impedance",
      type: "SINGLE_ENDED",
      value: 50,
      plus: 5,
    });
  });

  it("knows planes by their function and by the share of the board that a net covers", async () => {
    const square = (size: number) =>
      `<PolyBegin x="0" y="0"/><PolyStepSegment x="${size}" y="0"/><PolyStepSegment x="${size}" y="${size}"/><PolyStepSegment x="0" y="${size}"/>`;
    const board = await read(
      boardXml({
        step: `<Profile><Polygon>${square(10)}</Polygon></Profile>${feature("BOTTOM", `<Set net="VSS"><Features><Contour><Polygon>${square(8)}</Polygon></Contour></Features></Set>`)}${feature("TOP", `<Set net="VSS"><Features><Contour><Polygon>${square(5)}</Polygon></Contour></Features></Set>`)}`,
      }),
    );
    expect(board.layers.filter(({ plane }) => plane).map(({ name }) => name)).toEqual(["GND", "BOTTOM"]);
    expect(net(board, "VSS").pours[0]?.area_m2).toBeCloseTo(64e-6, 12);
    expect(net(board, "VSS").sections).toEqual([]);
  });

  it("joins only the layers that a blind hole goes through, and reads pad stacks of revision A", async () => {
    const stack = `<PadStack net="B"><LayerHole name="h" diameter="0.3" platingStatus="VIA" x="5" y="0"><Span fromLayer="TOP" toLayer="IN2"/></LayerHole><LayerPad layerRef="TOP"><Location x="5" y="0"/><StandardPrimitiveRef id="ROUND5"/></LayerPad></PadStack>`;
    const board = await read(
      boardXml({
        revision: "A",
        step:
          stack +
          feature("TOP", line("B", ["0,0", "5,0"])) +
          feature("IN2", line("B", ["5,0", "9,0"])) +
          feature("BOTTOM", line("B", ["5,0", "9,9"])),
      }),
    );
    expect(sections(board, "B").map(([from, to]) => [from, to])).toEqual([
      ["j1", "via1"],
      ["via1", "j2"],
      ["j3", "j4"],
    ]);
  });

  it("reads the board and not the panel that repeats it", async () => {
    const board = await read(
      boardXml({ step: feature("TOP", line("A", ["0,0", "1,0"])) }).replace(
        "</CadData>",
        `<Step name="panel">${feature("TOP", line("RAIL", ["0,0", "1,0"]))}</Step></CadData>`,
      ),
    );
    expect(board.step).toBe("tide gauge");
    expect(board.nets.map(({ name }) => name)).toEqual(["A"]);
    expect(board.problems[0]?.reason).toContain("panel is another board");
  });
});

describe("progress", () => {
  it("tells the bytes of the file as it came, to its end", async () => {
    const bytes = new Uint8Array(gzipSync(boardXml({ step: feature("TOP", line("A", ["0,0", "1,0"])) })));
    const told: number[] = [];
    await readBoard(stream(bytes, 50), {
      totalBytes: bytes.length,
      onProgress: (done, total) => {
        expect(total).toBe(bytes.length);
        told.push(done);
      },
    });
    expect(told.at(-1)).toBe(bytes.length);
    expect([...told].sort((a, b) => a - b)).toEqual(told);
  });
});
