import type { UserActor } from "@/lib/schemas/actor";
import { MISSING, NET_LIST, SECRET, type AccessWorld } from "./access-world";
import { aClass, aMaterial, aModel } from "./documents";

export interface Call {
  params?: Record<string, string>;
  query?: Record<string, string>;
  body?: unknown;
  /** A file as it is, instead of JSON. */
  file?: string;
}

export interface AccessFixture {
  /** A valid request about things of the own team. */
  call: (world: AccessWorld, as: UserActor) => Call | Promise<Call>;
  /** The answer to those who may, where it is no success: the request is let in, and refused for another reason. */
  admitted?: number;
  /** For routes of "session": whose thing it is. Left out: everybody signed in has their own. */
  belongsTo?: (as: UserActor, world: AccessWorld) => boolean;
}

const project = ({ projectId }: AccessWorld) => ({ projectId });
const inProject: AccessFixture = { call: (world) => ({ params: project(world) }) };
const inRun: AccessFixture = { call: (world) => ({ params: { ...project(world), runId: world.runId } }) };
const inPath: AccessFixture = {
  call: (world) => ({ params: { ...project(world), runId: world.runId, pathId: world.pathId } }),
};
const withBody = (body: (world: AccessWorld) => unknown): AccessFixture => ({
  call: (world) => ({ params: project(world), body: body(world) }),
});
const inFlag = (body?: unknown): AccessFixture => ({
  call: (world) => ({ params: { ...project(world), flagId: world.flagId }, body }),
});
const inRelease: AccessFixture = {
  call: (world) => ({ params: { ...project(world), releaseId: world.ids.release } }),
};
const inRecipient: AccessFixture = {
  call: (world) => ({
    params: { ...project(world), releaseId: world.ids.release, recipientId: world.ids.recipient },
  }),
};
const sentNote = (body?: unknown): AccessFixture => ({
  call: (world) => ({ params: { releaseId: world.ids.release }, body }),
  belongsTo: (as, world) => as.userId === world.data.own.actors.manufacturer.userId,
});
const link = (body?: unknown): AccessFixture => ({
  call: (world) => ({ params: { token: world.token }, body }),
});

const inImport = (body?: (received: AccessWorld["received"]) => unknown): AccessFixture => ({
  call: (world) => ({
    params: { ...project(world), importId: world.received.id },
    body: body?.(world.received),
  }),
});

const inMaterial = (body?: (material: AccessWorld["material"]) => unknown): AccessFixture => ({
  call: ({ material }) => ({ params: { materialId: material.id }, body: body?.(material) }),
});

const tomorrow = () => Date.now() + 86_400_000;

/** One entry for each method of each route under app/api/v1; the access matrix fails where one is missing. */
export const accessFixtures: Record<string, AccessFixture> = {
  "GET /audit": { call: () => ({}) },
  "GET /preferences": { call: () => ({}) },
  "PUT /preferences": { call: () => ({ body: { lengthUnit: "mil", theme: "dark" } }) },

  "GET /fabrication/notes": { call: () => ({}) },
  "GET /fabrication/notes/[releaseId]": sentNote(),
  "GET /fabrication/notes/[releaseId]/csv": sentNote(),
  "POST /fabrication/notes/[releaseId]/acknowledge": sentNote({ words: "Thank you." }),
  "GET /links/[token]/csv": link(),
  "POST /links/[token]/acknowledge": link({ words: "Thank you." }),

  "GET /materials": { call: () => ({}) },
  "POST /materials": { call: () => ({ body: { material: aMaterial(`${SECRET} ${Math.random()}`) } }) },
  "GET /materials/[materialId]": inMaterial(),
  "PUT /materials/[materialId]": inMaterial(({ version, name }) => ({
    version,
    material: aMaterial(`${name}, thin`),
  })),
  "DELETE /materials/[materialId]": inMaterial(({ version }) => ({ version })),
  "POST /materials/[materialId]/restore": {
    call: (world) => ({ params: { materialId: world.removedMaterial.id } }),
  },

  "GET /projects": { call: () => ({}) },
  "POST /projects": { call: () => ({ body: { name: `${SECRET} ${Math.random()}` } }) },
  "GET /projects/[projectId]": inProject,
  "PATCH /projects/[projectId]": withBody(() => ({
    version: 0,
    name: `${SECRET} ${Math.random()}`,
    description: "",
    unit: "mm",
  })),
  "DELETE /projects/[projectId]": inProject,
  "POST /projects/[projectId]/restore": inProject,
  "GET /projects/[projectId]/overview": inProject,
  "GET /projects/[projectId]/readiness": inProject,
  "GET /projects/[projectId]/assignees": inProject,
  "GET /projects/[projectId]/edits": inProject,
  "GET /projects/[projectId]/undo": inProject,
  "POST /projects/[projectId]/undo": { ...inProject, admitted: 422 },
  "POST /projects/[projectId]/redo": { ...inProject, admitted: 422 },
  "GET /projects/[projectId]/revisions": inProject,
  // The project has a draft already.
  "POST /projects/[projectId]/revisions": { ...inProject, admitted: 422 },

  "GET /projects/[projectId]/stackup": inProject,
  "PUT /projects/[projectId]/stackup": withBody(({ stackup: { name, layers, version } }) => ({
    version,
    stackup: { name, layers },
  })),
  "GET /projects/[projectId]/classes": inProject,
  "POST /projects/[projectId]/classes": withBody(() => ({ netClass: aClass("Another") })),
  "PUT /projects/[projectId]/classes/[classId]": {
    call: (world) => ({
      params: { ...project(world), classId: world.netClass.id },
      body: { version: world.netClass.version, netClass: aClass(`${SECRET} class`) },
    }),
  },
  "DELETE /projects/[projectId]/classes/[classId]": {
    call: (world) => ({
      params: { ...project(world), classId: world.netClass.id },
      body: { version: world.netClass.version },
    }),
  },
  "GET /projects/[projectId]/models": inProject,
  "POST /projects/[projectId]/models": withBody(() => ({ model: aModel("Another") })),
  "PUT /projects/[projectId]/models/[modelId]": {
    call: (world) => ({
      params: { ...project(world), modelId: world.model.id },
      body: { version: world.model.version, model: aModel("Renamed") },
    }),
  },
  "DELETE /projects/[projectId]/models/[modelId]": {
    call: (world) => ({
      params: { ...project(world), modelId: world.model.id },
      body: { version: world.model.version },
    }),
  },
  "GET /projects/[projectId]/bindings": inProject,
  "GET /projects/[projectId]/bindings/matches": inProject,
  "PUT /projects/[projectId]/bindings": withBody(({ bindings }) => ({
    version: bindings.version,
    bindings: [],
  })),
  "GET /projects/[projectId]/rules": inProject,
  "PUT /projects/[projectId]/rules": withBody(({ rules: { version, ...ruleSet } }) => ({ version, ruleSet })),
  "GET /projects/[projectId]/nets": inProject,
  "PATCH /projects/[projectId]/nets": {
    call: (world, as) => ({
      params: project(world),
      body: {
        nets: [{ id: world.net?.id, version: world.net?.version }],
        // A reviewer sets limits; the rest is the designers'.
        change: as.role === "reviewer" ? { limits: {} } : { matchGroup: "bus" },
      },
    }),
  },
  "GET /projects/[projectId]/nets/[netId]": {
    call: (world) => ({ params: { ...project(world), netId: world.net?.id ?? "" } }),
  },
  "GET /projects/[projectId]/nets/proposals": inProject,
  "POST /projects/[projectId]/nets/proposals": withBody(({ net }) => ({
    outOfScope: [{ id: net?.id, kind: "static", reason: "by its name" }],
    pairs: [],
    buses: [],
    matchGroups: [],
    bindings: null,
  })),
  "GET /projects/[projectId]/neighbours": inProject,
  "GET /projects/[projectId]/parts": inProject,

  "GET /projects/[projectId]/imports": inProject,
  "POST /projects/[projectId]/imports": {
    call: (world) => ({ params: project(world), query: { name: "nets.csv" }, file: NET_LIST }),
  },
  "GET /projects/[projectId]/imports/[importId]": inImport(),
  "PUT /projects/[projectId]/imports/[importId]": inImport(({ mapping }) => ({ mapping })),
  "DELETE /projects/[projectId]/imports/[importId]": inImport(),
  "GET /projects/[projectId]/imports/[importId]/problems": inImport(),
  "POST /projects/[projectId]/imports/[importId]/confirm": inImport(() => ({ mode: "merge" })),

  "GET /projects/[projectId]/runs": inProject,
  "POST /projects/[projectId]/runs": inProject,
  "GET /projects/[projectId]/runs/[runId]": inRun,
  "GET /projects/[projectId]/runs/[runId]/summary": inRun,
  "GET /projects/[projectId]/runs/[runId]/findings": inRun,
  "GET /projects/[projectId]/runs/[runId]/findings/csv": inRun,
  "GET /projects/[projectId]/runs/[runId]/selectors": inRun,
  "GET /projects/[projectId]/runs/[runId]/problems": inRun,
  "GET /projects/[projectId]/runs/[runId]/paths/[pathId]": inPath,
  "GET /projects/[projectId]/runs/[runId]/paths/[pathId]/findings": inPath,
  // The run is finished.
  "POST /projects/[projectId]/runs/[runId]/cancel": { ...inRun, admitted: 422 },
  "GET /projects/[projectId]/runs/[runId]/no-data": inRun,
  "POST /projects/[projectId]/runs/[runId]/no-data": {
    call: (world) => ({
      params: { ...project(world), runId: world.runId },
      body: { missing: MISSING, reason: "Measured on the bench, it is slow." },
    }),
  },
  "DELETE /projects/[projectId]/no-data/[acceptanceId]": {
    call: (world) => ({ params: { ...project(world), acceptanceId: world.ids.acceptance } }),
  },
  "GET /projects/[projectId]/runs/[runId]/sign-off": inRun,
  "POST /projects/[projectId]/runs/[runId]/sign-off": {
    call: (world) => ({ params: { ...project(world), runId: world.runId }, body: { remark: "" } }),
  },
  "DELETE /projects/[projectId]/sign-offs/[signOffId]": {
    call: async (world, as) => ({ params: { ...project(world), signOffId: await world.signedBy(as) } }),
  },

  "GET /projects/[projectId]/flags": inProject,
  "POST /projects/[projectId]/flags": withBody(({ pathId }) => ({
    subject: { kind: "path", lineageId: pathId },
    comment: "Look at this.",
  })),
  "GET /projects/[projectId]/flags/[flagId]": inFlag(),
  "PATCH /projects/[projectId]/flags/[flagId]": inFlag({ version: 0, state: "resolved" }),
  "POST /projects/[projectId]/flags/[flagId]/comments": inFlag({ comment: "Seen." }),
  "GET /projects/[projectId]/waivers": inProject,
  "POST /projects/[projectId]/waivers": withBody(({ runId, pathId }) => ({
    runId,
    subject: { kind: "problem", lineageId: pathId, mechanism: "mismatch" },
    reason: "The receiver tolerates this.",
    expiresAt: tomorrow(),
  })),
  "DELETE /projects/[projectId]/waivers/[waiverId]": {
    call: (world) => ({ params: { ...project(world), waiverId: world.ids.waiver } }),
  },

  "GET /projects/[projectId]/releases": inProject,
  // The draft's failures are not waived.
  "POST /projects/[projectId]/releases": {
    admitted: 422,
    call: (world) => ({
      params: project(world),
      body: { runId: world.runId, title: "First", recipients: [{ name: "Paul", email: "paul@x.example" }] },
    }),
  },
  "GET /projects/[projectId]/releases/[releaseId]": inRelease,
  "GET /projects/[projectId]/releases/[releaseId]/note": inRelease,
  "GET /projects/[projectId]/releases/[releaseId]/report": inRelease,
  "POST /projects/[projectId]/releases/[releaseId]/recipients/[recipientId]": inRecipient,
  "DELETE /projects/[projectId]/releases/[releaseId]/recipients/[recipientId]": inRecipient,
};
