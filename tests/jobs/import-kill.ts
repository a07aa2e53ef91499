import { expect } from "vitest";
import { beginImport, getImport } from "@/lib/db/import-batch";
import { listNets } from "@/lib/db/net";
import { createProject } from "@/lib/db/project";
import { findRevision } from "@/lib/db/revision";
import { receiveList } from "@/lib/jobs/import-list";
import { createTestDatabase } from "../support/database";
import { workAndKill } from "../support/work-and-kill";

const NETS = 4000;
const HEADER = "net,from,to,layer,width_mm,length_mm\n";

/**
 * Confirms an import of 4,000 nets over 100 that are there, has a process of its own apply it, and kills that process
 * after each of the waits in turn. After every kill: the database is sound and shows either none of the list or all
 * of it. At last a process is left alone and finishes what is still to do.
 *
 * @param waits milliseconds from the start of the work to the kill
 * @returns how many kills came before the import stood
 */
export async function killDuringImport(waits: readonly number[]): Promise<number> {
  const data = await createTestDatabase();
  try {
    const { designer } = data.own.actors;
    const { id: projectId } = await createProject(designer, {
      name: "Tide gauge controller",
      template: "6-layers",
    });
    const draft = await findRevision(designer, projectId);
    const list = Array.from(
      { length: NETS },
      (_, i) => `N${i},U1.${i},U2.${i},TOP,0.127,${1 + (i % 50)}`,
    ).join("\n");
    const { import: batch } = await receiveList(designer, projectId, {
      bytes: new TextEncoder().encode(HEADER + list),
      fileName: "nets.csv",
    });
    const { settings } = await getImport(designer, projectId, batch.id);
    await beginImport(designer, projectId, batch.id, { ...settings, mode: "replace" });

    let early = 0;
    for (const wait of waits) {
      await workAndKill("import-child", data.file, wait);
      const [check] = (await data.open.client.execute("PRAGMA integrity_check")).rows;
      expect(check?.integrity_check).toBe("ok");
      const { total } = await listNets(designer, draft, { limit: 1 });
      const { state } = await getImport(designer, projectId, batch.id);
      expect([state, total]).toEqual(state === "applied" ? ["applied", NETS] : ["applying", 0]);
      if (state === "applied") break;
      early++;
    }
    await workAndKill("import-child", data.file, null);
    expect((await getImport(designer, projectId, batch.id)).state).toBe("applied");
    expect((await listNets(designer, draft, { limit: 1 })).total).toBe(NETS);
    return early;
  } finally {
    await data.close();
  }
}
