/** A wave that crosses one section, once. */
export interface BounceRay {
  id: string;
  /** index in the row, from the driver's side */
  section: number;
  /** true: away from the driver */
  outward: boolean;
  /** when it leaves its end of the section [s] */
  start: number;
  /** [V] */
  amplitude: number;
}

/** The voltage a node has taken at a time. */
export interface NodeVoltage {
  /** index in the row */
  node: number;
  /** [s] */
  time: number;
  volts: number;
}

/** One line of the engine's bounce table, per 1 V step of the source. */
export interface TableBounce {
  time: number;
  node: string;
  section: string;
  end: "a" | "b";
  incident: number;
  outgoing: number;
  voltage: number;
}

/** A section of the row as the network names it, and which of its ends faces the driver. */
export interface TableSection {
  section: string;
  /** the end that faces the driver */
  near: "a" | "b";
}

/**
 * Rays and node voltages of one row out of a bounce table.
 *
 * @param table the engine's table, per 1 V step
 * @param row   the sections from the driver to one receiver
 * @param nodes node names of the row, one more than sections
 * @param swing the source's step [V], signed; start is what every node had before [V]
 */
export function raysFromTable(
  table: readonly TableBounce[],
  row: readonly TableSection[],
  nodes: readonly string[],
  source: { swing: number; start: (node: number) => number },
): { rays: BounceRay[]; voltages: NodeVoltage[] } {
  const rays: BounceRay[] = [];
  const latest = new Map<string, NodeVoltage>();
  for (const bounce of table) {
    const node = nodes.indexOf(bounce.node);
    if (node >= 0)
      latest.set(`${node}@${bounce.time}`, {
        node,
        time: bounce.time,
        volts: source.start(node) + bounce.voltage * source.swing,
      });
    const section = row.findIndex((s) => s.section === bounce.section);
    if (section < 0 || bounce.outgoing === 0) continue;
    const outward = row[section]?.near === bounce.end;
    rays.push({
      id: `${section}${outward ? ">" : "<"}${bounce.time}`,
      section,
      outward,
      start: bounce.time,
      amplitude: bounce.outgoing * source.swing,
    });
  }
  return { rays, voltages: [...latest.values()].sort((a, b) => a.time - b.time) };
}
