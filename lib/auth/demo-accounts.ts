import "server-only";
import { readFile } from "node:fs/promises";
import path from "node:path";
import { z } from "zod";
import { roles } from "@/lib/schemas/role";

const file = z.array(
  z.object({ name: z.string(), email: z.string(), role: z.enum(roles), password: z.string() }),
);

export type DemoAccount = z.infer<typeof file>[number];

/**
 * The people of the demo team with their passwords, to be offered at sign-in. Empty unless scripts/start.mjs
 * found a new embedded database served to this computer alone and said so with RINGFENCE_DEMO=1.
 */
export async function listDemoAccounts(): Promise<DemoAccount[]> {
  if (process.env.RINGFENCE_DEMO !== "1") return [];
  const folder = process.env.DATA_DIR ?? "data";
  try {
    return file.parse(
      JSON.parse(await readFile(path.join(/* turbopackIgnore: true */ folder, "demo-accounts.json"), "utf8")),
    );
  } catch (cause) {
    if (cause instanceof Error && "code" in cause && cause.code === "ENOENT") return [];
    throw new Error("The list of demo accounts cannot be read; start again with DEMO=0 to do without.", {
      cause,
    });
  }
}
