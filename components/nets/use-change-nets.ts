"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { changeNets, type NetChange, netsKey, type NetRow } from "@/lib/client/nets";
import { undoKey } from "@/lib/client/undo";
import { counted } from "./net-words";

/** Changes many nets at once and says so, with the way back. */
export function useChangeNets(projectId: string, undo: () => void) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: async ({ nets, change }: { nets: readonly NetRow[]; change: NetChange }) => {
      if (change.scope !== "in") return (await changeNets(projectId, nets, change)).changed;
      // Back in scope a route with gaps is still an incomplete one.
      const whole = nets.filter(({ gaps }) => gaps === 0);
      const broken = nets.filter(({ gaps }) => gaps > 0);
      let changed = 0;
      if (whole.length > 0) changed += (await changeNets(projectId, whole, change)).changed;
      if (broken.length > 0)
        changed += (await changeNets(projectId, broken, { ...change, scope: "incomplete" })).changed;
      return changed;
    },
    onSuccess: (changed) => {
      if (changed === 0) toast("Nothing changed: the nets were so already.");
      else toast.success(`${counted(changed, "net")} changed`, { action: { label: "Undo", onClick: undo } });
    },
    // A conflict says which nets changed; the fresh table shows how.
    onError: (error) => toast.error(errorMessage(error)),
    onSettled: async () => {
      await Promise.all([
        client.invalidateQueries({ queryKey: netsKey(projectId) }),
        client.invalidateQueries({ queryKey: undoKey(projectId) }),
      ]);
    },
  });
}
