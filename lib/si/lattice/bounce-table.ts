import { DomainError, UnsupportedError } from "../errors";
import type { Network, Section } from "../network/types";
import { validateNetwork } from "../network/validate";
import { buildCircuit, type Circuit, type Port } from "./circuit";
import { buildClusters } from "./clusters";
import { combClusters, runComb } from "./comb";

/** One arrival at, or launch from, an end of a section; volts per 1 V of source step. */
export interface Bounce {
  /** after the source step [s] */
  time: number;
  /** a name of the node */
  node: string;
  section: string;
  /** end of the section; of a pair, the mode too */
  end: "a" | "b";
  mode: "line" | "even" | "odd";
  incident: number;
  outgoing: number;
  /** the node's voltage from then on */
  voltage: number;
}

/** Most moments of a table; a net with many branches multiplies its echoes. */
const MOST_MOMENTS = 20_000;
const FLOOR = 1e-6;
/** A default floor is raised by this at a time until the table fits. */
const COARSER = 10;

/**
 * The bounce table of a resistive network: what arrives and leaves at every section end, and the running node voltage,
 * after a 1 V step of the first driver whose wave moves (the first driver where none does). Exact for any topology,
 * rings included, and any delays, but for waves below `floor`, which are dropped.
 *
 * @param options.until  [s], > 0
 * @param options.floor  share of the source step; default 1e-6, or ten, a hundred … times that where the table would
 *                       grow beyond 20,000 moments
 * @throws DomainError where the network is not valid, has no driver, or has more moments above the given floor
 * @throws UnsupportedError where a part stores energy or is not linear
 */
export function bounceTable(network: Network, options: { until: number; floor?: number }): Bounce[] {
  validateNetwork(network);
  if (!(options.until > 0) || !Number.isFinite(options.until))
    throw new DomainError("The bounce table needs an end time above zero.", "until");
  const circuit = buildCircuit(network);
  const reactive = circuit.branches.find((branch) => branch.kind !== "R");
  if (reactive)
    throw new UnsupportedError(
      `${reactive.name} stores energy, so its bounces have no single height; look at the waveforms instead.`,
      "parts",
    );
  const curved = circuit.elements[0];
  if (curved)
    throw new UnsupportedError(
      `${curved.name} is not linear, so its bounces depend on their height; look at the waveforms instead.`,
      "parts",
    );
  const lossy = circuit.lines.find(({ skin }) => skin > 0);
  if (lossy)
    throw new UnsupportedError(
      `${network.sections[lossy.section]!.name} has skin loss, so its bounces have no single height; look at the waveforms instead.`,
      "sections",
    );
  const moving = circuit.fixed.findIndex(
    ({ wave }) =>
      wave !== null && (wave.kind === "sine" || wave.value.some((value) => value !== wave.value[0])),
  );
  const source = moving > 0 ? moving : circuit.fixed.findIndex(({ wave }) => wave !== null);
  if (source < 0) throw new DomainError("A bounce table needs a driver.", "drivers");
  const { until, floor } = options;
  if (floor !== undefined && !(floor >= 0))
    throw new DomainError("The bounce table's floor must be zero or more.", "floor");
  for (let least = floor ?? FLOOR; least <= 1; least *= COARSER) {
    const table = tableAbove(network, circuit, source, until, least);
    if (table) return table;
    if (floor !== undefined) break;
  }
  throw new DomainError(
    `The net sends more than ${MOST_MOMENTS} bounces before the end; end earlier or leave out smaller ones with a higher floor.`,
    "floor",
  );
}

/** null: too many. */
function tableAbove(
  network: Network,
  circuit: Circuit,
  source: number,
  until: number,
  floor: number,
): Bounce[] | null {
  const volts = new Float64Array(circuit.nodeCount);
  const held = new Float64Array(circuit.fixed.length);
  held[source] = 1;
  const table: Bounce[] = [];
  const isWhole = runComb(
    circuit,
    combClusters(buildClusters(circuit)),
    source,
    { until, floor, most: MOST_MOMENTS },
    ({ time, cluster: { cluster }, rise, incident, outgoing }) => {
      cluster.nodes.forEach((node, i) => (volts[node] = volts[node]! + rise[i]!));
      cluster.ports.forEach(({ end }, k) => {
        if (incident[k] === 0 && outgoing[k] === 0) return;
        const line = circuit.lines[end >> 1]!;
        const section = network.sections[line.section]!;
        const isB = (end & 1) === 1;
        const port: Port = isB ? line.b : line.a;
        const voltage = port.node >= 0 ? volts[port.node]! : held[-1 - port.node]!;
        table.push({
          time,
          node: endNode(section, isB),
          section: section.name,
          end: isB ? "b" : "a",
          mode: line.mode,
          incident: incident[k]!,
          outgoing: outgoing[k]!,
          voltage,
        });
      });
    },
  );
  return isWhole ? table : null;
}

function endNode(section: Section, isB: boolean): string {
  if (section.kind === "pair") return isB ? section.b1 : section.a1;
  return isB ? section.b : section.a;
}
