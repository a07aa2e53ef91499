import { createProject, listProjects } from "@/lib/db/project";
import { route } from "@/lib/auth/route";
import { projectInput } from "@/lib/schemas/project";
import { projectsQuery } from "@/lib/schemas/project-query";

export const GET = route({
  access: "project:read",
  query: projectsQuery,
  handler: async ({ actor, query }) => ({ projects: await listProjects(actor, query.archived) }),
});

export const POST = route({
  access: "project:create",
  body: projectInput,
  handler: ({ actor, body }) => createProject(actor, body),
});
