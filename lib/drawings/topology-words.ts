import { ohmsText, quantityText } from "./number-text";
import type { PartKind, Strand, StripEdge, Topology } from "./topology-graph";
import { strandsOf } from "./topology-graph";

const PART_NAMES: Record<PartKind, string> = { R: "resistor", C: "capacitor", L: "inductor", D: "diode" };

export function partValue(part: PartKind, value: number | null): string {
  if (part === "D") return "";
  if (value === null || !Number.isFinite(value)) return "no value";
  if (part === "R") return ohmsText(value);
  return quantityText(value, part === "C" ? "F" : "H");
}

export function delayText(delay: number | null): string {
  return delay === null || !Number.isFinite(delay)
    ? "no delay"
    : quantityText(delay, "s").replace(/\.0+(?=\u2009)/, "");
}

export function edgeWords(edge: StripEdge): string {
  switch (edge.kind) {
    case "line":
      return `section ${ohmsText(edge.impedance)}, ${delayText(edge.delay)}${edge.layer ? ` on ${edge.layer}` : ""}`;
    case "part":
      return [PART_NAMES[edge.part], edge.reference, partValue(edge.part, edge.value)]
        .filter((w) => w !== "")
        .join(" ");
    case "via":
      return edge.label ? `via ${edge.label}` : "via";
  }
}

/** The path in sentences: along the main line, then each branch. */
export function describeTopology(topology: Topology): string {
  const { main, apart } = strandsOf(topology);
  const driver = topology.pins.find((p) => p.pin === topology.driver);
  const branches: string[] = [];
  const walk = (strand: Strand, title: string): void => {
    const steps = [...strand.edges.map(edgeWords), endWords(strand)];
    branches.push(`${title}: ${steps.join(", then ")}.`);
    for (const b of strand.branches) walk(b, `At ${b.from}`);
  };
  walk(main, `From driver ${topology.driver}${driver?.detail ? ` (${driver.detail})` : ""}`);
  if (apart > 0)
    branches.push(
      apart === 1
        ? "1 section or pin is not reached from the driver."
        : `${apart} sections or pins are not reached from the driver.`,
    );
  return branches.join(" ");
}

function endWords({ end }: Strand): string {
  switch (end.kind) {
    case "pin":
      return `${end.pin.role === "driver" ? "driver" : "receiver"} ${end.pin.pin}${end.pin.verdict ? `, ${end.pin.verdict}` : ""}`;
    case "rail":
      return `to ${end.rail}`;
    case "joins":
      return `which joins ${end.node} again`;
    case "open":
      return "open end";
  }
}
