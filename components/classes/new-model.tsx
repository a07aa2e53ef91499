"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useMutation, useQueryClient } from "@tanstack/react-query";
import { useForm, useWatch } from "react-hook-form";
import { z } from "zod";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { ApiError, errorMessage } from "@/lib/client/api";
import { createModel, modelsKey } from "@/lib/client/models";
import { undoKey } from "@/lib/client/undo";
import { modelDoc, type StoredModel } from "@/lib/schemas/model";
import { modelPresets } from "@/lib/schemas/model-presets";
import { useClassesDesk } from "./classes-desk";
import { freeName } from "./free-name";

interface Props {
  onClose: () => void;
  onMade: (made: StoredModel) => void;
}

const form = z.object({ name: modelDoc.shape.name, preset: z.string() });
type Fields = z.infer<typeof form>;

/** A model from a technology, assumed until its own values are put in. */
export function NewModel({ onClose, onMade }: Props) {
  const { projectId, revision, models } = useClassesDesk();
  const client = useQueryClient();
  const names = models.map(({ name }) => name);
  const first = modelPresets[0];
  const { register, handleSubmit, setError, setValue, control, formState } = useForm<Fields>({
    resolver: zodResolver(form),
    defaultValues: { name: first ? freeName(first.title, names) : "", preset: first?.id ?? "" },
  });
  const chosen = useWatch({ control, name: "preset" });
  const preset = modelPresets.find(({ id }) => id === chosen);
  const make = useMutation({
    mutationFn: ({ name }: Fields) => {
      if (!preset) throw new Error("Choose what to start from.");
      return createModel(projectId, { ...preset.doc, name });
    },
    onSuccess: async (made) => {
      await client.invalidateQueries({ queryKey: modelsKey(projectId, revision) });
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
      onMade(made);
    },
    onError: (error) =>
      setError("name", { message: (error instanceof ApiError && error.fields.name) || errorMessage(error) }),
  });

  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title="New model"
      description="It starts with values of the order usual for a technology, marked as assumed. Put in those of the part and say where they come from."
    >
      <form
        className="flex flex-col gap-4"
        onSubmit={(event) => void handleSubmit((fields) => make.mutate(fields))(event)}
      >
        <Select
          label="Start from"
          options={modelPresets.map(({ id, title }) => ({ value: id, label: title }))}
          hint={preset ? `${preset.about}. Common practice, from memory.` : undefined}
          {...register("preset", {
            onChange: (event: { target: { value: string } }) => {
              const next = modelPresets.find(({ id }) => id === event.target.value);
              if (next && !formState.dirtyFields.name) setValue("name", freeName(next.title, names));
            },
          })}
        />
        <Input label="Name" maxLength={80} error={formState.errors.name?.message} {...register("name")} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Make none</Button>
          <Button type="submit" variant="primary" busy={make.isPending}>
            Make the model
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
