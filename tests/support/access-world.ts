import { createHash } from "node:crypto";
import { eq } from "drizzle-orm";
import { getBindings } from "@/lib/db/binding";
import { newId } from "@/lib/db/ids";
import { applyLayoutLists } from "@/lib/db/layout-lists";
import { createMaterial, removeMaterial } from "@/lib/db/material";
import { createModel } from "@/lib/db/model";
import { createNetClass } from "@/lib/db/net-class";
import { listNets } from "@/lib/db/net";
import { createProject } from "@/lib/db/project";
import { raiseFlag } from "@/lib/db/review";
import { findRevision } from "@/lib/db/revision";
import { getRuleSet } from "@/lib/db/rule-set";
import { createRun } from "@/lib/db/run";
import {
  finding,
  noDataAcceptance,
  pathResult,
  problem,
  release,
  releaseRecipient,
  run,
  signOff,
  waiver,
} from "@/lib/db/schema";
import { freezeInputs, readInputs } from "@/lib/db/snapshot";
import { getStackup } from "@/lib/db/stackup";
import { receiveList } from "@/lib/jobs/import-list";
import { resolvePaths } from "@/lib/resolve/resolve-paths";
import type { UserActor } from "@/lib/schemas/actor";
import type { ImpedanceNote } from "@/lib/schemas/release";
import type { TestDatabase } from "./database";
import { aClass, aMaterial, aModel, aNet } from "./documents";

/** Stands in the name of everything that the own team makes: to be seen in no answer to anybody else. */
export const SECRET = "Tide gauge";

export const MISSING = "edge time of U1";

export const NET_LIST = "net;class;layer;width;length\nD1;Data;L1 Top;0.15 mm;25 mm\n";

let made = 0;

/** One project of the own team with one of each thing, made anew for each request so that none sees another's traces. */
export async function makeWorld(data: TestDatabase) {
  const { designer, reviewer, manufacturer } = data.own.actors;
  const at = Date.now();
  const project = await createProject(designer, {
    name: `${SECRET} ${++made}`,
    description: "",
    unit: "mm",
    template: "6-layers",
  });
  const projectId = project.id;
  const netClass = await createNetClass(designer, projectId, aClass(`${SECRET} class`));
  const model = await createModel(designer, projectId, aModel(`${SECRET} driver`));
  const material = await createMaterial(designer, aMaterial(`${SECRET} laminate ${made}`));
  const removedMaterial = await createMaterial(designer, aMaterial(`${SECRET} old laminate ${made}`));
  await removeMaterial(designer, removedMaterial.id, removedMaterial.version);
  await applyLayoutLists(
    designer,
    projectId,
    { nets: [aNet(`${SECRET} net`)] },
    { mode: "merge", summary: "1 net" },
  );
  const draft = await findRevision(designer, projectId);
  const [net] = (await listNets(designer, draft)).nets;
  const stackup = await getStackup(designer, draft);
  const rules = await getRuleSet(designer, draft);
  const bindings = await getBindings(designer, draft);

  const inputs = await readInputs(designer, draft.id);
  const { chunks, inputHash } = await freezeInputs(designer, inputs);
  const pathId = resolvePaths(inputs).paths[0]?.id ?? newId();
  const { id: runId } = await createRun(reviewer, {
    projectId,
    revisionId: draft.id,
    inputHash,
    inputChunks: chunks,
    engineVersion: "0",
    runtimeVersion: "test",
    corners: ["typical"],
    total: 1,
  });
  const own = { teamId: data.own.id, projectId, revisionId: draft.id, runId };
  const { db } = data;
  const ids = {
    waiver: newId(),
    acceptance: newId(),
    signOff: newId(),
    release: newId(),
    recipient: newId(),
  };
  const token = createHash("sha256").update(ids.recipient).digest("base64url");
  const verdict = {
    mechanism: "mismatch",
    worstRule: "overshoot",
    worstMargin: -0.1,
    failsAt: 1,
    ofCorners: 1,
  };
  await db.batch([
    db.update(run).set({ state: "done", finishedAt: at, done: 1 }).where(eq(run.id, runId)),
    db.insert(pathResult).values({
      runId,
      teamId: data.own.id,
      pathId,
      name: `${SECRET} net`,
      verdict: "fail",
      inputHash,
      detail: Buffer.alloc(0),
    }),
    ...(["mismatch", "missing"] as const).map((mechanism) =>
      db.insert(problem).values({
        ...verdict,
        id: newId(),
        runId,
        teamId: data.own.id,
        pathId,
        pathName: `${SECRET} net`,
        mechanism,
        title: "overshoots",
        verdict: mechanism === "missing" ? "no data" : "fail",
        missing: mechanism === "missing" ? MISSING : null,
        severity: "error",
        failsAtNominal: true,
        restsOnAssumed: false,
      }),
    ),
    db.insert(finding).values({
      id: newId(),
      runId,
      teamId: data.own.id,
      pathId,
      mechanism: "mismatch",
      rule: "overshoot",
      verdict: "fail",
      value: 0.4,
      limit: 0.3,
      unit: "V",
      margin: -0.1,
      severity: "error",
      counts: true,
      failsAt: 1,
      ofCorners: 1,
      failsAtNominal: true,
      restsOnAssumed: false,
    }),
    db.insert(waiver).values({
      id: ids.waiver,
      teamId: data.own.id,
      projectId,
      pathLineageId: pathId,
      pathName: `${SECRET} net`,
      mechanism: "other",
      runId,
      waived: [],
      reason: `${SECRET}: seen on the bench`,
      expiresAt: at + 86_400_000,
      createdBy: reviewer.userId,
      createdAt: at,
    }),
    db.insert(noDataAcceptance).values({
      id: ids.acceptance,
      teamId: data.own.id,
      projectId,
      revisionId: draft.id,
      missing: "rails",
      reason: `${SECRET}: not needed`,
      createdBy: reviewer.userId,
      createdAt: at,
    }),
    db.insert(release).values({
      ...own,
      id: ids.release,
      letter: "A",
      title: `${SECRET} release`,
      snapshotChunks: chunks,
      snapshotHash: inputHash,
      note: aNote(),
      noteHash: inputHash,
      signOffId: ids.signOff,
      releasedBy: reviewer.userId,
      releasedAt: at,
    }),
    db.insert(releaseRecipient).values({
      id: ids.recipient,
      teamId: data.own.id,
      releaseId: ids.release,
      name: manufacturer.name,
      email: manufacturer.email,
      tokenHash: createHash("sha256").update(token).digest("hex"),
      tokenExpiresAt: at + 86_400_000,
    }),
  ]);
  const flagId = await raiseFlag(reviewer, projectId, {
    subject: { kind: "path", lineageId: pathId, mechanism: null },
    title: `${SECRET} flag`,
    comment: `${SECRET} comment`,
    assigneeUserId: null,
  });

  const list = {
    bytes: new TextEncoder().encode(NET_LIST),
    fileName: `${SECRET} nets.csv`,
    kind: "net list" as const,
  };
  const { import: received } = await receiveList(designer, projectId, list);

  /** A signature is its signer's own to withdraw. */
  const signedBy = async (actor: UserActor): Promise<string> => {
    const id = newId();
    await db.insert(signOff).values({ ...own, id, inputHash, signedBy: actor.userId, signedAt: at });
    return id;
  };

  return {
    data,
    projectId,
    draft,
    netClass,
    model,
    material,
    removedMaterial,
    net,
    stackup,
    rules,
    bindings,
    runId,
    pathId,
    flagId,
    ids,
    token,
    received,
    signedBy,
  };
}

export type AccessWorld = Awaited<ReturnType<typeof makeWorld>>;

function aNote(): ImpedanceNote {
  return {
    project: `${SECRET} controller`,
    revision: "A",
    title: `${SECRET} release`,
    remarks: "",
    releasedAt: 0,
    signedBy: "",
    team: "Saltmarsh",
    totalThickness_m: 0.0016,
    stackup: [],
    lines: [],
    caution: "",
  };
}
