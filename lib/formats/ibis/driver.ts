import { DomainError } from "@/lib/si/errors";
import type { IvDriver, IvTable, Part, Pwl } from "@/lib/si/network";
import { dieCapacitance, type IbisCorner } from "./corners";
import { modelTypes, type IbisModel } from "./document";
import { edgeWeights, REST, type EdgeMethod, type EdgeWeights } from "./edge-weights";
import { cornerTables, type CornerTables } from "./iv-tables";

export interface IbisDriverRequest {
  /** of the driver; its clamps are called after it */
  name: string;
  /** the die's pad: the package lies between it and the pin */
  node: string;
  /** what the pin does, in order of time [s]; alternating, the first decides where it rests before */
  edges: readonly { at: number; edge: "rise" | "fall" }[];
}

export interface IbisDriver {
  driver: IvDriver;
  /** clamps, from the node to ground */
  parts: Part[];
  /** where each kind of edge that was asked for comes from */
  methods: Partial<Record<"rise" | "fall", EdgeMethod>>;
  /** what is assumed or left out, in sentences */
  notes: string[];
}

/** A table that carries nothing, for the side a model does not pull to. */
const NOTHING: IvTable = [
  [-1, 0],
  [1, 0],
];

/**
 * The engine's driver by I-V table from a model that drives: tables in the engine's sign, the two switches' weights over
 * time from waveforms or the ramp, the die's capacitance, clamps as parts of their own.
 *
 * @returns what, put into the fixture of one of its waveforms, gives that waveform
 * @throws DomainError where the model does not drive, or lacks a table, a supply or a speed
 */
export function ibisDriver(model: IbisModel, corner: IbisCorner, request: IbisDriverRequest): IbisDriver {
  const notes: string[] = [];
  requireDriver(model);
  const tables = cornerTables(model, corner);
  if (!tables.pullup && !tables.pulldown)
    throw new DomainError(
      `Model ${model.name} drives but has neither a pullup nor a pulldown table. Add one to the file.`,
      "tables",
    );
  const capacitance = dieCapacitance(model, corner);
  if (capacitance === null)
    notes.push(`Model ${model.name} has no C_comp; the die counts as free of capacitance.`);
  const methods: IbisDriver["methods"] = {};
  const weights: Partial<Record<"rise" | "fall", EdgeWeights>> = {};
  for (const { edge } of request.edges) {
    weights[edge] ??= edgeWeights(model, corner, edge);
    methods[edge] = weights[edge].method;
  }
  for (const { name, mode } of model.submodels) notes.push(`Submodel ${name} (${mode}) is not simulated.`);
  const { up, down } = joined(request, weights, notes);
  return {
    driver: {
      name: request.name,
      kind: "iv",
      node: request.node,
      vdd: tables.supply,
      pullup: tables.pullup ?? NOTHING,
      pulldown: tables.pulldown ?? NOTHING,
      pullupWeight: up,
      pulldownWeight: down,
      capacitance: capacitance ?? 0,
    },
    parts: clampParts(tables, request.name, request.node),
    methods,
    notes,
  };
}

/** A model's clamps as parts from the node to ground, in volts of the node. */
export function clampParts(tables: CornerTables, name: string, node: string): Part[] {
  const part = (points: IvTable | null, word: string): Part[] =>
    points ? [{ name: `${name} ${word}`, kind: "iv", a: node, b: "0", points }] : [];
  return [...part(tables.gndClamp, "ground clamp"), ...part(tables.powerClamp, "power clamp")];
}

function requireDriver(model: IbisModel): void {
  if (model.type.endsWith("_diff"))
    throw new DomainError(
      `Model ${model.name} is of type ${model.type}, which is described in another language only and is not simulated. Choose a model with tables.`,
      "type",
    );
  if (!modelTypes[model.type].drives)
    throw new DomainError(
      `Model ${model.name} is of type ${model.type} and does not drive. Choose an output, or use it as a receiver.`,
      "type",
    );
}

/** The edges' weights one after another; an edge that comes before the last has ended cuts it short. */
function joined(
  { name, edges }: IbisDriverRequest,
  weights: Partial<Record<"rise" | "fall", EdgeWeights>>,
  notes: string[],
): { up: Pwl; down: Pwl } {
  const first = edges[0];
  if (!first) throw new DomainError(`${name} is given no edge. Say when it rises or falls.`, "edges");
  const time: number[] = [];
  const up: number[] = [];
  const down: number[] = [];
  edges.forEach(({ at, edge }, k) => {
    const before = edges[k - 1];
    if (!(at >= 0) || (before && (at <= before.at || edge === before.edge)))
      throw new DomainError(
        `Edge ${k + 1} of ${name} does not follow the one before. Edges start at 0 s or later, rise and fall in turn.`,
        `edges[${k}]`,
      );
    const own = weights[edge];
    if (!own) return;
    const next = edges[k + 1]?.at ?? Infinity;
    const zero = own.time[0] ?? 0;
    own.time.forEach((t, i) => {
      const when = at + t - zero;
      if (when >= next) return;
      time.push(when);
      up.push(own.up[i] ?? REST[edge].after.up);
      down.push(own.down[i] ?? REST[edge].after.down);
    });
    if (at + (own.time.at(-1) ?? 0) - zero > next)
      notes.push(`Edge ${k + 2} of ${name} starts before the one before has ended, and cuts it short.`);
  });
  return { up: { kind: "pwl", time, value: up }, down: { kind: "pwl", time, value: down } };
}
