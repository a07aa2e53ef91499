import { restoreMaterial } from "@/lib/db/material";
import { route } from "@/lib/auth/route";
import { materialParams } from "@/lib/schemas/material";

export const POST = route({
  access: "material:edit",
  params: materialParams,
  handler: ({ actor, params }) => restoreMaterial(actor, params.materialId),
});
