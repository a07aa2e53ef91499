import { createMaterial, listMaterials } from "@/lib/db/material";
import { route } from "@/lib/auth/route";
import { materialInput } from "@/lib/schemas/material";

export const GET = route({
  access: "material:read",
  handler: async ({ actor }) => ({ materials: await listMaterials(actor) }),
});

export const POST = route({
  access: "material:edit",
  body: materialInput,
  handler: ({ actor, body }) => createMaterial(actor, body.material),
});
