import "server-only";
import { resolvePaths, type ResolvedBoard } from "@/lib/resolve/resolve-paths";
import type { Actor } from "@/lib/schemas/actor";
import type { RevisionInputs } from "@/lib/schemas/snapshot";
import type { RevisionRef } from "./revision";
import type { RunRow } from "./run";
import { readInputs, thawInputs } from "./snapshot";

export interface BoardOfInputs {
  inputs: RevisionInputs;
  board: ResolvedBoard;
}

/** Boards that were looked at last: whoever works a list of problems opens path after path of one run. */
const KEPT = 3;
const holder = globalThis as typeof globalThis & { ringfenceBoards?: Map<string, Promise<BoardOfInputs>> };

/** What a run saw. The run is in hand only after the actor's team and role were checked. */
export function boardOfRun(
  actor: Actor,
  run: Pick<RunRow, "inputHash" | "inputChunks">,
): Promise<BoardOfInputs> {
  return remembered(`${actor.teamId} ${run.inputHash}`, () => thawInputs(actor, run.inputChunks));
}

/** A revision as it is now. */
export function boardOfRevision(actor: Actor, revision: RevisionRef): Promise<BoardOfInputs> {
  const { id, editCount, projectVersion } = revision;
  return remembered(`${actor.teamId} ${id} ${editCount} ${projectVersion}`, () => readInputs(actor, id));
}

function remembered(key: string, read: () => Promise<RevisionInputs>): Promise<BoardOfInputs> {
  const known = (holder.ringfenceBoards ??= new Map<string, Promise<BoardOfInputs>>());
  const found = known.get(key);
  known.delete(key);
  const board = found ?? read().then((inputs) => ({ inputs, board: resolvePaths(inputs) }));
  known.set(key, board);
  // What could not be read is not kept.
  board.catch(() => known.delete(key));
  for (const oldest of known.keys()) if (known.size > KEPT) known.delete(oldest);
  return board;
}
