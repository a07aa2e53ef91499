import { createMaterial } from "@/lib/db/material";
import type { UserActor } from "@/lib/schemas/actor";
import { materialDoc } from "@/lib/schemas/material";

const SHEET = "Process sheet of Estuary Circuits, invented for the demo";

/** What the demo's team keeps beside the generic library: a core, a ply and a foil of its fabricator. */
export async function addMaterials(designer: UserActor): Promise<void> {
  for (const entry of [
    {
      name: "House core, high Tg",
      kind: "laminate",
      resinPercent: "48",
      dk: "4.15",
      df: "0.017",
      frequency: { value: "1", unit: "GHz" },
      thickness: { value: "0.4", unit: "mm" },
    },
    {
      name: "House ply, 2116",
      kind: "prepreg",
      glassStyle: "2116",
      resinPercent: "54",
      dk: "4.05",
      df: "0.018",
      frequency: { value: "1", unit: "GHz" },
      thickness: { value: "126", unit: "µm" },
    },
    {
      name: "House foil, reverse-treated",
      kind: "foil",
      thickness: { value: "0.5", unit: "oz" },
      roughness: { value: "1.4", unit: "µm" },
    },
  ])
    await createMaterial(designer, materialDoc.parse({ ...entry, source: SHEET, origin: "fabricator" }));
}
