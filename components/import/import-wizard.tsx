"use client";

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query";
import { parseAsString, useQueryState } from "nuqs";
import { toast } from "@/components/ui/toast";
import { TableSkeleton } from "@/components/ui/skeleton";
import { ApiError, errorMessage } from "@/lib/client/api";
import {
  confirmImport,
  dropImport,
  type ImportAnswer,
  importQuery,
  importsKey,
  remapImport,
  uploadList,
} from "@/lib/client/imports";
import { useBoardFile } from "@/lib/client/board-file";
import { netsKey } from "@/lib/client/nets";
import type { ImportMode, ListMapping } from "@/lib/schemas/import-list";
import { BoardFilePanel } from "./board-file";
import { ChooseList } from "./choose-list";
import { ConfirmList } from "./confirm-list";
import { ImportOutcome } from "./import-outcome";
import { ImportSteps } from "./import-steps";
import { LatestImports } from "./latest-imports";
import { MapColumns } from "./map-columns";
import { MapLayers } from "./map-layers";
import { Remarks } from "./remarks";
import { problemsAddress } from "@/lib/client/imports";

/** From a file or a paste to nets: choose, map with a preview, confirm, and on to the roles. The address keeps the list. */
export function ImportWizard({ projectId }: { projectId: string }) {
  const client = useQueryClient();
  const [importId, setImportId] = useQueryState("list", parseAsString.withOptions({ history: "push" }));
  // Kept while its lists are looked at one after the other.
  const board = useBoardFile();
  const keep = (answer: ImportAnswer) =>
    client.setQueryData(importQuery(projectId, answer.import.id).queryKey, answer);

  const upload = useMutation({
    mutationFn: (list: Parameters<typeof uploadList>[1]) => uploadList(projectId, list),
    onSuccess: async (answer) => {
      keep(answer);
      await setImportId(answer.import.id);
      await client.invalidateQueries({ queryKey: importsKey(projectId), exact: true });
    },
  });

  if (importId === null)
    return (
      <div className="flex flex-col gap-8">
        <ImportSteps current="list" />
        <ChooseList
          busy={upload.isPending}
          error={upload.error ? errorMessage(upload.error) : null}
          onList={(list) => upload.mutate(list)}
        />
        <BoardFilePanel board={board} busy={upload.isPending} onList={(list) => upload.mutate(list)} />
        <LatestImports projectId={projectId} onOpen={(id) => void setImportId(id)} />
      </div>
    );
  return (
    <OneImport
      key={importId}
      projectId={projectId}
      importId={importId}
      onAnother={() => void setImportId(null)}
    />
  );
}

interface OneProps {
  projectId: string;
  importId: string;
  onAnother: () => void;
}

function OneImport({ projectId, importId, onAnother }: OneProps) {
  const client = useQueryClient();
  const query = importQuery(projectId, importId);
  const { data, error } = useQuery(query);
  const refresh = async () => {
    await client.invalidateQueries({ queryKey: importsKey(projectId) });
    await client.invalidateQueries({ queryKey: netsKey(projectId) });
  };
  const remap = useMutation({
    mutationFn: (mapping: ListMapping) => remapImport(projectId, importId, mapping),
    // Each choice shows at once; what it does to the rows follows.
    onMutate: (mapping) =>
      client.setQueryData(
        query.queryKey,
        (answer) => answer && { ...answer, import: { ...answer.import, mapping } },
      ),
    onSuccess: (answer) => client.setQueryData(query.queryKey, answer),
    onError: async (failure) => {
      toast.error(errorMessage(failure));
      await client.invalidateQueries({ queryKey: query.queryKey });
    },
    scope: { id: importId },
  });
  const confirm = useMutation({
    mutationFn: (mode: ImportMode) => confirmImport(projectId, importId, mode),
    onSuccess: (answer) => client.setQueryData(query.queryKey, { import: answer.import, preview: null }),
    onError: (failure) => toast.error(errorMessage(failure)),
  });
  const drop = useMutation({
    mutationFn: () => dropImport(projectId, importId),
    onSuccess: refresh,
    onError: async (failure) => {
      // It may have been done before the cancel arrived.
      toast.error(errorMessage(failure));
      await refresh();
    },
  });

  if (error)
    return (
      <p role="alert" className="text-fail text-sm">
        {error instanceof ApiError && error.status === 404
          ? "This import does not exist. Choose the file again."
          : errorMessage(error)}
      </p>
    );
  if (!data) return <TableSkeleton label="Reading the list" />;
  const { import: view, preview } = data;
  if (!preview)
    return (
      <div className="flex flex-col gap-8">
        <ImportSteps current="import" />
        <ImportOutcome
          projectId={projectId}
          view={view}
          cancelling={drop.isPending}
          onCancel={() => drop.mutate()}
          onAnother={onAnother}
        />
      </div>
    );
  const change = (mapping: ListMapping) => remap.mutate(mapping);
  return (
    <div className="flex flex-col gap-8" aria-busy={remap.isPending}>
      <ImportSteps current="columns" />
      <div className="flex flex-col gap-1 text-sm">
        <p>
          <span className="font-medium">{view.fileName}</span>
          {preview.skippedRows > 0 ? `, ${preview.skippedRows} above the header left out` : ""}
          {preview.blankRows > 0 ? `, ${preview.blankRows} blank` : ""}
        </p>
        {view.notices.map((notice) => (
          <p key={notice} className="text-near">
            {notice}
          </p>
        ))}
        {view.error ? (
          <p role="alert" className="text-fail">
            {view.error}
          </p>
        ) : null}
      </div>
      <ConfirmList
        preview={preview}
        reading={remap.isPending}
        busy={confirm.isPending}
        onConfirm={(mode) => confirm.mutate(mode)}
        onDrop={() => drop.mutate(undefined, { onSuccess: onAnother })}
      />
      <MapColumns mapping={view.mapping} preview={preview} onChange={change} />
      <MapLayers mapping={view.mapping} preview={preview} onChange={change} />
      <Remarks preview={preview} download={problemsAddress(projectId, importId)} />
    </div>
  );
}
