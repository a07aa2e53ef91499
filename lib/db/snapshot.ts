import "server-only";
import { createHash } from "node:crypto";
import { setImmediate } from "node:timers/promises";
import { promisify } from "node:util";
import { gunzip, gzip } from "node:zlib";
import { and, eq } from "drizzle-orm";
import type { Actor } from "@/lib/schemas/actor";
import { canonicalJson } from "@/lib/schemas/canonical-json";
import { NotFoundError, RefusedError } from "@/lib/schemas/errors";
import type { RevisionInputs } from "@/lib/schemas/snapshot";
import { within } from "./access";
import { getBindings } from "./binding";
import { getDb } from "./client";
import { listModels } from "./model";
import { listNeighbours } from "./neighbour";
import { readNetChunks } from "./net";
import { listNetClasses } from "./net-class";
import { listParts } from "./part";
import { getRevision } from "./revision";
import { getRuleSet } from "./rule-set";
import { chunk } from "./schema";
import { getStackup } from "./stackup";
import { commitUnit } from "./unit";

const NETS_A_CHUNK = 500;
/** Edits that may come in between while a draft is read, before we say that it does not hold still. */
const MAX_READS = 5;

const zip = promisify(gzip);
const unzip = promisify(gunzip);

export interface ChunkName {
  name: string;
  sha256: string;
}
export interface FrozenInputs {
  chunks: ChunkName[];
  /** SHA-256 over the list of chunks, as canonical JSON */
  inputHash: string;
}

/**
 * Everything that a check reads of a revision, all of one moment: the edit count before and after must agree.
 * Ids and versions of rows are left out of it (an id is the lineage, a version 0), so that equal contents are
 * equal whichever draft they stand in and however often they were edited to and fro.
 */
export async function readInputs(actor: Actor, revisionId: string): Promise<RevisionInputs> {
  for (let reads = 0; reads < MAX_READS; reads++) {
    const before = await getRevision(actor, revisionId);
    const inputs = await readOnce(actor, revisionId);
    const after = await getRevision(actor, revisionId);
    if (before.editCount === after.editCount && before.projectVersion === after.projectVersion) return inputs;
  }
  throw new RefusedError(
    "The draft is being edited without a pause. Wait until the edits are done, then try again.",
    "busy-draft",
  );
}

/** Writes the chunks of these inputs that are not there yet and names them all. */
export async function freezeInputs(actor: Actor, inputs: RevisionInputs): Promise<FrozenInputs> {
  const db = await getDb();
  const chunks: ChunkName[] = [];
  for (const part of cut(inputs)) {
    const text = canonicalJson(part.value);
    const sha256 = sha256Of(text);
    chunks.push({ name: part.name, sha256 });
    const content = await zip(text);
    await commitUnit([
      db
        .insert(chunk)
        .values({ teamId: actor.teamId, sha256, bytes: Buffer.byteLength(text), content })
        .onConflictDoNothing(),
    ]);
  }
  return { chunks, inputHash: hashOfChunks(chunks) };
}

/** The hash that freezing would give, without writing anything. */
export async function hashInputs(inputs: RevisionInputs): Promise<string> {
  const chunks: ChunkName[] = [];
  for (const part of cut(inputs)) {
    chunks.push({ name: part.name, sha256: sha256Of(canonicalJson(part.value)) });
    await setImmediate();
  }
  return hashOfChunks(chunks);
}

const holder = globalThis as typeof globalThis & { ringfenceInputHashes?: Map<string, string> };
const REMEMBERED = 200;

/** The input hash of a revision as it is now; remembered until its next edit. */
export async function currentInputHash(actor: Actor, revisionId: string): Promise<string> {
  const { teamId, editCount, projectVersion } = await getRevision(actor, revisionId);
  const known = (holder.ringfenceInputHashes ??= new Map<string, string>());
  const key = `${teamId} ${revisionId} ${editCount} ${projectVersion}`;
  const found = known.get(key);
  if (found) return found;
  const hash = await hashInputs(await readInputs(actor, revisionId));
  const now = await getRevision(actor, revisionId);
  if (now.editCount !== editCount || now.projectVersion !== projectVersion) return hash;
  for (const oldest of known.keys()) if (known.size >= REMEMBERED) known.delete(oldest);
  known.set(key, hash);
  return hash;
}

/**
 * The inputs that chunks hold, each verified against its hash.
 * @throws NotFoundError where a chunk is not there or not the team's
 * @throws Error where a chunk's content is not what its hash says
 */
export async function thawInputs(actor: Actor, chunks: readonly ChunkName[]): Promise<RevisionInputs> {
  const parts = new Map<string, unknown[]>();
  for (const { name, sha256 } of chunks) {
    const value: unknown = JSON.parse(await readChunk(actor, sha256));
    const kind = name.split(" ")[0] ?? name;
    parts.set(kind, [...(parts.get(kind) ?? []), value]);
  }
  const one = <T>(kind: string): T => {
    const [value] = parts.get(kind) ?? [];
    if (value === undefined) throw new Error(`The snapshot has no ${kind}.`);
    // Its hash was verified: it is what canonicalJson wrote of a checked document of this type.
    return value as T;
  };
  return {
    ...one<Pick<RevisionInputs, "schema" | "project" | "revision">>("project"),
    stackup: one<RevisionInputs["stackup"]>("stackup"),
    classes: one<RevisionInputs["classes"]>("classes"),
    ...one<Pick<RevisionInputs, "models" | "bindings">>("models"),
    ruleSet: one<RevisionInputs["ruleSet"]>("rules"),
    parts: one<RevisionInputs["parts"]>("parts"),
    neighbours: one<RevisionInputs["neighbours"]>("neighbours"),
    nets: (parts.get("nets") ?? []).flat() as RevisionInputs["nets"],
  };
}

/** A chunk's text. @throws as thawInputs */
export async function readChunk(actor: Actor, sha256: string): Promise<string> {
  const db = await getDb();
  const [row] = await db
    .select({ content: chunk.content })
    .from(chunk)
    .where(and(within(actor, "project:read", chunk.teamId), eq(chunk.sha256, sha256)));
  if (!row) throw new NotFoundError("This part of a snapshot");
  const text = (await unzip(row.content)).toString("utf8");
  if (sha256Of(text) !== sha256)
    throw new Error(
      `The stored snapshot part ${sha256.slice(0, 12)} is damaged: its content is not what its name says.`,
    );
  return text;
}

export function hashOfChunks(chunks: readonly ChunkName[]): string {
  return sha256Of(canonicalJson(chunks));
}

async function readOnce(actor: Actor, revisionId: string): Promise<RevisionInputs> {
  const revision = await getRevision(actor, revisionId);
  const [stackup, classes, models, { bindings }, ruleSet, parts, neighbours] = await Promise.all([
    getStackup(actor, revision),
    listNetClasses(actor, revision),
    listModels(actor, revision),
    getBindings(actor, revision),
    getRuleSet(actor, revision),
    listParts(actor, revision),
    listNeighbours(actor, revision),
  ]);
  const nets: RevisionInputs["nets"] = [];
  for await (const some of readNetChunks(actor, revision, NETS_A_CHUNK))
    for (const net of some) nets.push(timeless(net));
  return {
    schema: 1,
    project: { name: revision.projectName, unit: revision.projectUnit },
    revision: revision.letter,
    stackup: {
      name: stackup.name,
      version: 0,
      ...(stackup.process ? { process: stackup.process } : {}),
      layers: stackup.layers.map(({ thickness_m: _derived, ...layer }) => ({
        ...layer,
        id: layer.lineageId,
      })),
    },
    classes: classes.map(({ netCount: _derived, ...netClass }) => timeless(netClass)),
    models: models.map(timeless),
    bindings: bindings.map((binding, index) => ({ ...binding, id: `line ${index + 1}` })),
    ruleSet: { ...ruleSet, version: 0 },
    parts: parts.map((part) => ({ ...part, id: part.lineageId })),
    nets,
    neighbours,
  };
}

function timeless<T extends { id: string; lineageId: string; version: number }>(row: T): T {
  return { ...row, id: row.lineageId, version: 0 };
}

function* cut(inputs: RevisionInputs): Generator<{ name: string; value: unknown }> {
  const { schema, project, revision } = inputs;
  yield { name: "project", value: { schema, project, revision } };
  yield { name: "stackup", value: inputs.stackup };
  yield { name: "classes", value: inputs.classes };
  yield { name: "models", value: { models: inputs.models, bindings: inputs.bindings } };
  yield { name: "rules", value: inputs.ruleSet };
  yield { name: "parts", value: inputs.parts };
  yield { name: "neighbours", value: inputs.neighbours };
  for (let start = 0; start < inputs.nets.length; start += NETS_A_CHUNK)
    yield { name: `nets ${start / NETS_A_CHUNK + 1}`, value: inputs.nets.slice(start, start + NETS_A_CHUNK) };
}

function sha256Of(text: string): string {
  return createHash("sha256").update(text).digest("hex");
}
