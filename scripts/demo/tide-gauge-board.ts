/**
 * The board of the demo team: six layers, eight classes, about eighty nets, as the lists that a layout
 * program would export. Revision A is clean but for one deliberate exception; draft B adds nets and
 * changes that fail, each for a reason of its own.
 */

export type DemoRevision = "A" | "B";
/** Foot width in mm by class and layer, as the impedance table of the board gives it. */
export type DemoWidths = Record<string, Record<string, string>>;

export interface DemoBoard {
  sectionList: string;
  partsList: string;
  neighbourList: string;
}

interface Section {
  net: string;
  from: string;
  to: string;
  layer: string;
  width: string;
  length: string;
}

interface PartRow {
  reference: string;
  partNumber: string;
  value: string;
  pins: number;
}

const TOP = "L1 Top";
const IN3 = "L3 Inner";
const IN4 = "L4 Inner";
const BOTTOM = "L6 Bottom";

const mm = (value: number) => value.toFixed(3);

class BoardWriter {
  readonly sections: Section[] = [];
  readonly parts: PartRow[] = [];
  readonly neighbours: string[][] = [];
  private nextResistor = 10;
  private nextVia = 1;

  constructor(private readonly widths: DemoWidths) {}

  part(reference: string, partNumber: string, value: string, pins: number) {
    this.parts.push({ reference, partNumber, value, pins });
  }

  width(className: string, layer: string): string {
    return this.widths[className]?.[layer] ?? "0.150";
  }

  section(net: string, from: string, to: string, layer: string, width: string, length: number) {
    this.sections.push({ net, from, to, layer, width, length: mm(length) });
  }

  /** One net on one layer, or escape on top, via, run inside, via, landing on top. */
  route(
    net: string,
    className: string,
    from: string,
    to: string,
    length: number,
    inner: string | null = null,
  ) {
    if (!inner) {
      this.section(net, from, to, TOP, this.width(className, TOP), length);
      return;
    }
    const v1 = `via${this.nextVia++}`;
    const v2 = `via${this.nextVia++}`;
    this.section(net, from, v1, TOP, this.width(className, TOP), 1.6);
    this.section(net, v1, v2, inner, this.width(className, inner), length - 3.1);
    this.section(net, v2, to, TOP, this.width(className, TOP), 1.5);
  }

  /** Driver – short escape – series resistor – line – receiver: two nets, one signal path. */
  series(
    net: string,
    className: string,
    driver: string,
    receiver: string,
    value: string,
    length: number,
    inner: string | null,
  ) {
    const reference = `R${this.nextResistor++}`;
    this.part(reference, `RC0402-${value}`, value, 2);
    this.route(`${net}_S`, className, driver, `${reference}.1`, 2.4);
    this.route(net, className, `${reference}.2`, receiver, length, inner);
  }

  neighbour(net: string, other: string, layer: string, gap: string, parallel: number) {
    this.neighbours.push([net, other, layer, gap, mm(parallel)]);
  }

  toLists(): DemoBoard {
    const rows = (header: string, lines: string[]) => `${[header, ...lines].join("\n")}\n`;
    return {
      sectionList: rows(
        "net,from,to,layer,width_mm,length_mm",
        this.sections.map((s) => [s.net, s.from, s.to, s.layer, s.width, s.length].join(",")),
      ),
      partsList: rows(
        "reference,part number,value,pins",
        this.parts.map((p) => [p.reference, p.partNumber, p.value, p.pins].join(",")),
      ),
      neighbourList: rows(
        "net,neighbour,layer,gap_mm,parallel_mm",
        this.neighbours.map((n) => n.join(",")),
      ),
    };
  }
}

/** The lists of one revision; the same arguments give the same bytes. */
export function tideGaugeBoard(revision: DemoRevision, widths: DemoWidths): DemoBoard {
  const board = new BoardWriter(widths);
  addParts(board);
  addClocks(board, revision);
  addMemory(board, revision);
  addFlash(board, revision);
  addEthernet(board, revision);
  addSensors(board, revision);
  addControl(board, revision);
  addPower(board);
  return board.toLists();
}

function addParts(board: BoardWriter) {
  board.part("U1", "SSC-MCU-196", "controller", 196);
  board.part("U2", "SDR-256-8", "memory", 54);
  board.part("U3", "QSF-128", "flash", 8);
  board.part("U4", "EPHY-100R", "Ethernet transceiver", 32);
  board.part("U5", "PRS-24", "pressure converter", 16);
  board.part("U6", "TRX-485", "bus transceiver", 8);
  board.part("Y1", "XO-50M", "50 MHz", 4);
  board.part("J1", "HDR-10", "service", 10);
  board.part("J2", "SEA-6", "probe", 6);
}

function addClocks(board: BoardWriter, revision: DemoRevision) {
  board.series("ETH_REFCLK", "Clock", "Y1.3", "U1.E4", "33R", 42, null);
  board.series("SD_CLK", "Clock", "U1.F2", "U2.38", "33R", 38, IN3);
  // In both revisions: a short clock without a resistor, tolerated by its part and waived.
  board.route("PUMP_CLK", "Clock", "U1.G2", "J1.9", 34, null);
  // B: the service clock was added in a hurry, straight from the strong driver to the header.
  if (revision === "B") board.route("SVC_CLK", "Clock", "U1.G1", "J1.3", 118, IN4);
}

function addMemory(board: BoardWriter, revision: DemoRevision) {
  for (let bit = 0; bit < 8; bit++) {
    // B: a purchasing change put 10 Ω in place of 33 Ω on the upper half.
    const value = revision === "B" && bit >= 4 ? "10R" : "33R";
    board.series(
      `SD_DQ${bit}`,
      "Memory data",
      `U1.A${bit + 1}`,
      `U2.D${bit + 1}`,
      value,
      33 + (bit % 5) * 1.3,
      IN3,
    );
  }
  for (let bit = 0; bit < 12; bit++) {
    board.series(
      `SD_A${bit}`,
      "Memory address",
      `U1.B${bit + 1}`,
      `U2.A${bit + 1}`,
      "33R",
      36 + (bit % 4) * 1.7,
      IN4,
    );
  }
  for (const [index, name] of ["SD_RAS", "SD_CAS", "SD_WE", "SD_CS"].entries())
    board.route(name, "Memory address", `U1.C${index + 1}`, `U2.C${index + 1}`, 9 + index, null);
  if (revision === "B") {
    board.neighbour("SD_DQ3", "SD_DQ4", IN3, "0.140", 27);
    board.neighbour("SD_DQ5", "SD_CLK", IN3, "0.360", 22);
  }
}

function addFlash(board: BoardWriter, revision: DemoRevision) {
  board.series("QF_CLK", "Flash", "U1.H1", "U3.6", "27R", 24, null);
  for (let bit = 0; bit < 4; bit++)
    // B: moved across the board; the line is now long for its edge and has no resistor.
    if (revision === "B" && bit === 3) board.route("QF_IO3", "Flash", "U1.H5", "U3.7", 96, IN4);
    else
      board.series(
        `QF_IO${bit}`,
        "Flash",
        `U1.H${bit + 2}`,
        `U3.${[5, 2, 3, 7][bit]}`,
        "27R",
        23 + bit,
        null,
      );
  board.route("QF_CS", "Flash", "U1.H6", "U3.1", 11, null);
}

function addEthernet(board: BoardWriter, revision: DemoRevision) {
  for (const [index, name] of ["RMII_TXD0", "RMII_TXD1", "RMII_TXEN"].entries())
    board.series(name, "Ethernet", `U1.J${index + 1}`, `U4.${index + 5}`, "33R", 45 + 2 * index, IN3);
  for (const [index, name] of ["RMII_RXD0", "RMII_RXD1", "RMII_CRS"].entries())
    board.series(name, "Ethernet", `U4.${index + 10}`, `U1.J${index + 6}`, "33R", 46 + 2 * index, IN3);
  if (revision === "B") {
    // A neck-down of 20 mm between the connector's pins: far from the class's width.
    board.section("RMII_MDC", "U1.K1", "viaN1", TOP, board.width("Ethernet", TOP), 18);
    board.section("RMII_MDC", "viaN1", "viaN2", TOP, "0.090", 20);
    board.section("RMII_MDC", "viaN2", "U4.20", TOP, board.width("Ethernet", TOP), 30);
  } else board.route("RMII_MDC", "Ethernet", "U1.K1", "U4.20", 15, null);
  board.route("RMII_MDIO", "Ethernet", "U1.K2", "U4.21", 16, null);
}

function addSensors(board: BoardWriter, revision: DemoRevision) {
  board.route("TIDE_SCK", "Sensor", "U1.L1", "U5.3", 14, null);
  board.route("TIDE_MOSI", "Sensor", "U1.L2", "U5.4", 15, null);
  board.route("TIDE_CS", "Sensor", "U1.L4", "U5.6", 12, null);
  // The converter's output has no driver model yet: no data until somebody fills it in.
  if (revision === "B") board.route("TIDE_MISO", "Sensor", "U5.5", "U1.L3", 62, null);
  board.route("PROBE_P", "Telemetry pair", "U6.6", "J2.1", 32, null);
  board.route("PROBE_N", "Telemetry pair", "U6.7", "J2.2", 32.4, null);
}

function addControl(board: BoardWriter, revision: DemoRevision) {
  for (const [index, name] of ["ETH_RST", "SD_CKE", "PUMP_EN", "LED_RUN", "LED_FAULT", "WAKE"].entries())
    board.route(
      name,
      "Control",
      `U1.M${index + 1}`,
      index < 2 ? `U${[4, 2][index]}.${25 + index}` : `J1.${index + 2}`,
      13 + index,
      null,
    );
  board.route("BUS_TXD", "Control", "U1.N1", "U6.4", 15, null);
  board.route("BUS_DE", "Control", "U1.N2", "U6.3", 16, null);
  if (revision === "B") {
    // Half routed: two islands that nobody has joined.
    board.section("VALVE_EN", "U1.N4", "via901", TOP, "0.150", 7.5);
    board.section("VALVE_EN", "via902", "J2.4", BOTTOM, "0.150", 22);
    // A parallel end of 50 Ω that the driver cannot lift far enough.
    board.part("R91", "RC0402-50R", "50R", 2);
    board.section("TIDE_SYNC", "U1.N5", "J2.5", TOP, board.width("Control", TOP), 70);
    board.section("TIDE_SYNC", "J2.5", "R91.1", TOP, board.width("Control", TOP), 2.2);
    board.section("GND", "R91.2", "via903", TOP, "0.300", 1);
  }
}

function addPower(board: BoardWriter) {
  board.part("C1", "CC0402-100N", "100n", 2);
  board.part("C2", "CC0805-10U", "10u", 2);
  board.section("+3V3", "C1.1", "U1.P1", TOP, "0.300", 1.9);
  board.section("+3V3", "C2.1", "U1.P2", TOP, "0.400", 3.1);
  board.section("GND", "C1.2", "U1.P3", TOP, "0.300", 1.7);
  board.section("GND", "C2.2", "U1.P4", TOP, "0.400", 2.8);
}
