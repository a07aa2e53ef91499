import type { Metadata } from "next";
import { MaterialsView } from "@/components/materials/materials-view";
import { Sheet } from "@/components/shell/sheet";
import { requireActor } from "@/lib/auth/require-actor";
import { listMaterials } from "@/lib/db/material";
import { can } from "@/lib/schemas/actor";

export const metadata: Metadata = { title: "Materials" };

export default async function MaterialsPage() {
  const actor = await requireActor("material:read");
  return (
    <Sheet>
      <MaterialsView initial={await listMaterials(actor)} mayEdit={can(actor, "material:edit")} />
    </Sheet>
  );
}
