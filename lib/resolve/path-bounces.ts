import { EngineError } from "@/lib/si/errors";
import { bounceTable, type Bounce } from "@/lib/si/lattice/bounce-table";
import type { LinearPart, Network } from "@/lib/si/network/types";

export interface PathBounces {
  /** per 1 V step of the driver; empty with `refused` */
  table: Bounce[];
  /** what was left out or taken as a short, in a sentence; null: nothing */
  leftOut: string | null;
  /** why there is no table */
  refused: string | null;
}

/** Weaker waves than this share of the step are dropped. */
const FLOOR = 1e-3;

/**
 * The bounces of a network with nothing that stores energy: a bounce has a single height only on resistive ends. Small
 * capacitances (pins) are left out, capacitors that the watched time cannot charge and inductors in series are shorts.
 */
export function pathBounces(network: Network, until: number): PathBounces {
  const { resistive, leftOut } = withoutStorage(network, until);
  try {
    return { table: bounceTable(resistive, { until, floor: FLOOR }), leftOut, refused: null };
  } catch (error) {
    if (!(error instanceof EngineError)) throw error;
    return { table: [], leftOut, refused: error.message };
  }
}

function withoutStorage(network: Network, until: number): { resistive: Network; leftOut: string | null } {
  const open: string[] = [];
  const short: string[] = [];
  const line = network.sections.find((section) => section.kind === "line");
  const ohms = line?.kind === "line" ? line.impedance : 50;
  const parts = network.parts.flatMap((part): Network["parts"] => {
    if (part.kind === "L" || (part.kind === "C" && isLarge(part, ohms, until))) {
      short.push(part.name);
      return [{ ...part, kind: "R", value: 0 }];
    }
    if (part.kind !== "C") return [part];
    if (part.value > 0) open.push(part.name === "load" ? "pin capacitance" : part.name);
    return [];
  });
  const said = [
    open.length > 0 ? `leave out ${[...new Set(open)].join(" and ")}` : null,
    short.length > 0 ? `take ${short.join(" and ")} as a short` : null,
  ].filter((entry) => entry !== null);
  return {
    resistive: { ...network, parts },
    leftOut: said.length > 0 ? `The bounces ${said.join(" and ")}; the waveforms include it.` : null,
  };
}

/** One that the watched time does not charge holds its voltage. */
function isLarge(part: LinearPart, ohms: number, until: number): boolean {
  return part.name !== "load" && part.value * ohms > until;
}
