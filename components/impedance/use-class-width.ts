"use client";

import { useMutation, useQueryClient } from "@tanstack/react-query";
import { toast } from "@/components/ui/toast";
import { ApiError, errorMessage } from "@/lib/client/api";
import { netClassesKey, putNetClass } from "@/lib/client/net-classes";
import type { LengthUnit } from "@/lib/client/preferences";
import { undoKey } from "@/lib/client/undo";
import type { StoredNetClass } from "@/lib/schemas/net-class";
import { withClassWidth } from "./class-width";
import { lengthDigits } from "./grids";
import type { ImpedanceRow } from "./impedance-rows";

interface Shape {
  row: ImpedanceRow;
  width: number;
  gap: number | null;
}

/** Writes a width into its class; what was written can be undone from the message that says so. */
export function useClassWidth(projectId: string, revision: string, unit: LengthUnit, undo: () => void) {
  const client = useQueryClient();
  const key = netClassesKey(projectId, revision);
  return useMutation({
    mutationFn: ({ row, width, gap }: Shape) =>
      putNetClass(
        projectId,
        row.netClass,
        withClassWidth(row.netClass, row.layer.lineageId, { width, gap }, unit),
      ),
    onSuccess: (saved, { row, width, gap }) => {
      client.setQueryData<StoredNetClass[]>(key, (classes) =>
        classes?.map((present) =>
          present.lineageId === saved.lineageId ? { ...present, ...saved } : present,
        ),
      );
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
      const size = `${lengthDigits(width, unit)}${gap === null ? "" : ` with a gap of ${lengthDigits(gap, unit)}`} ${unit}`;
      toast.success(`${row.netClass.name} on ${row.layer.name} is now ${size}`, {
        action: { label: "Undo", onClick: undo },
      });
    },
    onError: (error) => {
      // Somebody else changed the class: the next try starts from what it is now.
      if (error instanceof ApiError && error.isConflict) void client.invalidateQueries({ queryKey: key });
      toast.error(errorMessage(error));
    },
  });
}
