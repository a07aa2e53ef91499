"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import type { z } from "zod";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Input, TextArea } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { ApiError, errorMessage } from "@/lib/client/api";
import { updateProject } from "@/lib/client/project";
import { type ProjectSummary, projectUpdate } from "@/lib/schemas/project";

type Values = z.input<typeof projectUpdate>;

const UNITS = [
  { value: "mm", label: "Millimetres" },
  { value: "mil", label: "Mils" },
];

export function EditProject({ project, onClose }: { project: ProjectSummary; onClose: () => void }) {
  const router = useRouter();
  const { id, version, name, description, unit } = project;
  const { register, handleSubmit, setError, setValue, formState } = useForm<Values>({
    resolver: zodResolver(projectUpdate),
    defaultValues: { version, name, description, unit },
  });
  const { errors, isSubmitting } = formState;

  const submit = handleSubmit(async (values) => {
    try {
      await updateProject(id, values);
      router.refresh();
      onClose();
    } catch (error) {
      if (error instanceof ApiError && error.fields.name)
        return setError("name", { message: error.fields.name }, { shouldFocus: true });
      if (error instanceof ApiError && error.isConflict)
        setValue("version", (error.current as ProjectSummary).version);
      setError("root", { message: errorMessage(error) });
    }
  });

  return (
    <Dialog open onOpenChange={onClose} title={`Rename or describe ${name}`}>
      <form method="post" noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-4">
        <Input
          label="Name of the board"
          autoComplete="off"
          error={errors.name?.message}
          {...register("name")}
        />
        <TextArea
          label="Description (may stay empty)"
          rows={2}
          error={errors.description?.message}
          {...register("description")}
        />
        <Select
          label="Unit of bare numbers"
          options={UNITS}
          error={errors.unit?.message}
          {...register("unit")}
        />
        {errors.root ? (
          <p role="alert" className="text-fail text-sm">
            {errors.root.message}
          </p>
        ) : null}
        <div className="flex flex-wrap justify-end gap-2">
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" variant="primary" busy={isSubmitting}>
            Save
          </Button>
        </div>
      </form>
    </Dialog>
  );
}
