"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useMutation, useQueryClient } from "@tanstack/react-query";
import { useForm, useWatch } from "react-hook-form";
import { z } from "zod";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Input } from "@/components/ui/input";
import { controlClasses } from "@/components/ui/field";
import { ApiError, errorMessage } from "@/lib/client/api";
import { createNetClass, netClassesKey, type NetClassRow } from "@/lib/client/net-classes";
import { undoKey } from "@/lib/client/undo";
import { classPresets } from "@/lib/schemas/class-presets";
import { netClassDoc, type StoredNetClass } from "@/lib/schemas/net-class";
import { useClassesDesk } from "./classes-desk";
import { freeName } from "./free-name";

interface Props {
  classes: readonly NetClassRow[];
  onClose: () => void;
  onMade: (made: StoredNetClass) => void;
}

const BLANK = "blank";
const form = z.object({ name: netClassDoc.shape.name, preset: z.string() });
type Fields = z.infer<typeof form>;

/** A class from a technology, or an empty one. */
export function NewClass({ classes, onClose, onMade }: Props) {
  const { projectId, revision } = useClassesDesk();
  const client = useQueryClient();
  const names = classes.map(({ name }) => name);
  const { register, handleSubmit, setError, setValue, control, formState } = useForm<Fields>({
    resolver: zodResolver(form),
    defaultValues: { name: "", preset: BLANK },
  });
  const chosen = useWatch({ control, name: "preset" });
  const preset = classPresets.find(({ id }) => id === chosen);
  const make = useMutation({
    mutationFn: ({ name }: Fields) =>
      createNetClass(
        projectId,
        preset ? { ...preset.doc, name } : netClassDoc.parse({ name, kind: "single" }),
      ),
    onSuccess: async (made) => {
      await client.invalidateQueries({ queryKey: netClassesKey(projectId, revision) });
      void client.invalidateQueries({ queryKey: undoKey(projectId) });
      onMade(made);
    },
    onError: (error) =>
      setError("name", { message: (error instanceof ApiError && error.fields.name) || errorMessage(error) }),
  });
  const groups = [...new Set(classPresets.map(({ group }) => group))];

  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title="New class"
      description="Start from a technology and put in your own values, or start empty."
    >
      <form
        className="flex flex-col gap-4"
        onSubmit={(event) => void handleSubmit((fields) => make.mutate(fields))(event)}
      >
        <div className="flex flex-col gap-1">
          <label htmlFor="class-preset" className="text-sm font-medium">
            Start from
          </label>
          <select
            id="class-preset"
            className={controlClasses}
            {...register("preset", {
              onChange: (event: { target: { value: string } }) => {
                const next = classPresets.find(({ id }) => id === event.target.value);
                if (!formState.dirtyFields.name) setValue("name", next ? freeName(next.doc.name, names) : "");
              },
            })}
          >
            <option value={BLANK}>Nothing: an empty class</option>
            {groups.map((group) => (
              <optgroup key={group} label={group}>
                {classPresets
                  .filter((entry) => entry.group === group)
                  .map(({ id, title }) => (
                    <option key={id} value={id}>
                      {title}
                    </option>
                  ))}
              </optgroup>
            ))}
          </select>
          <p className="text-ink-soft min-h-8 text-xs" aria-live="polite">
            {preset
              ? `${preset.about}. ${preset.source} Data sheets decide.`
              : "Target, layers and all else are filled in afterwards."}
          </p>
        </div>
        <Input label="Name" maxLength={60} error={formState.errors.name?.message} {...register("name")} />
        <div className="flex justify-end gap-2">
          <Button onClick={onClose}>Make none</Button>
          <Button type="submit" variant="primary" busy={make.isPending}>
            Make the class
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
