"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { useState } from "react";
import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { Select } from "@/components/ui/select";
import { toast } from "@/components/ui/toast";
import { ApiError, errorMessage } from "@/lib/client/api";
import { deleteNetClass, netClassesKey, type NetClassRow } from "@/lib/client/net-classes";
import { netsKey } from "@/lib/client/nets";
import { undoKey } from "@/lib/client/undo";
import { counted } from "./class-words";
import { useClassesDesk } from "./classes-desk";

interface Props {
  row: NetClassRow;
  classes: readonly NetClassRow[];
  onClose: () => void;
  onGone: () => void;
}

const NONE = "none";

/** Asks where the nets of a class go before it is taken away. */
export function DeleteClass({ row, classes, onClose, onGone }: Props) {
  const { projectId, revision, undo } = useClassesDesk();
  const client = useQueryClient();
  const [target, setTarget] = useState("");
  const [error, setError] = useState<string | null>(null);
  /** As the server counted them, where it knows of more. */
  const [nets, setNets] = useState(row.netCount);
  const remove = useMutation({
    mutationFn: () =>
      deleteNetClass(projectId, row, nets === 0 ? undefined : target === NONE ? null : target),
    onSuccess: async () => {
      await client.invalidateQueries({ queryKey: netClassesKey(projectId, revision) });
      void client.invalidateQueries({ queryKey: netsKey(projectId) });
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
      toast.success(`${row.name} removed`, { action: { label: "Undo", onClick: undo } });
      onGone();
    },
    onError: (reason) => {
      if (reason instanceof ApiError && reason.code === "class-in-use") {
        const { nets: counted } = (reason.detail ?? {}) as { nets?: number };
        setNets(counted ?? Math.max(1, nets));
      }
      setError(errorMessage(reason));
    },
  });

  return (
    <ConfirmDialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={`Remove ${row.name}`}
      description={
        nets === 0
          ? "No net is in this class. Undo brings it back."
          : `${counted(nets, "net is", "nets are")} in this class. Say where ${nets === 1 ? "it goes" : "they go"} first: nets without a class have no target and no limits of their own.`
      }
      confirm={nets === 0 ? "Remove the class" : `Move ${counted(nets, "net")} and remove`}
      danger
      busy={remove.isPending}
      onConfirm={() => {
        if (nets > 0 && target === "") setError("Choose the class that takes the nets, or no class.");
        else remove.mutate();
      }}
    >
      {nets > 0 ? (
        <Select
          label="Its nets go to"
          placeholder="Choose"
          value={target}
          error={error}
          onChange={(event) => {
            setTarget(event.target.value);
            setError(null);
          }}
          options={[
            ...classes
              .filter(({ lineageId }) => lineageId !== row.lineageId)
              .map(({ lineageId, name, netCount }) => ({
                value: lineageId,
                label: `${name} (${counted(netCount, "net")})`,
              })),
            { value: NONE, label: "No class" },
          ]}
        />
      ) : error ? (
        <p role="alert" className="text-fail text-sm">
          {error}
        </p>
      ) : null}
    </ConfirmDialog>
  );
}
