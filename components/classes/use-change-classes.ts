"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { netClassesKey, type NetClassRow, putNetClass } from "@/lib/client/net-classes";
import { undoKey } from "@/lib/client/undo";
import type { NetClassDoc, StoredNetClass } from "@/lib/schemas/net-class";
import { counted } from "./class-words";
import { useClassesDesk } from "./classes-desk";

/** What of a class is edited: all but its ids, its version and the count of its nets. */
export function classDocOf(row: StoredNetClass): NetClassDoc {
  const { id: _id, lineageId: _lineage, version: _version, netCount: _nets, ...doc } = row as NetClassRow;
  return doc;
}

/** The same kind of change to several classes, one write each, so that one conflict does not hold up the others. */
export function useChangeClasses() {
  const { projectId, revision, undo } = useClassesDesk();
  const client = useQueryClient();
  return useMutation({
    mutationFn: async (changes: readonly { row: NetClassRow; change: Partial<NetClassDoc> }[]) => {
      const refused: string[] = [];
      let changed = 0;
      for (const { row, change } of changes) {
        try {
          const saved = await putNetClass(projectId, row, { ...classDocOf(row), ...change });
          if (saved.version !== row.version) changed++;
        } catch (error) {
          refused.push(`${row.name}: ${errorMessage(error)}`);
        }
      }
      return { changed, refused };
    },
    onSuccess: ({ changed, refused }) => {
      if (changed > 0)
        toast.success(
          `${counted(changed, "class", "classes")} changed${changed > 1 ? "; undo takes them back one by one" : ""}`,
          { action: { label: "Undo", onClick: undo } },
        );
      else if (refused.length === 0) toast("Nothing changed: the classes were so already.");
      for (const reason of refused) toast.error(reason);
    },
    onSettled: async () => {
      await client.invalidateQueries({ queryKey: netClassesKey(projectId, revision) });
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
    },
  });
}
