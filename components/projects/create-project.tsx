"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { useLengthUnit } from "@/components/shell/length-unit";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Input, TextArea } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { ApiError, errorMessage } from "@/lib/client/api";
import { createProject } from "@/lib/client/project";
import { projectInput } from "@/lib/schemas/project";
import { stackupTemplates } from "@/lib/si/stackup";

/** A select has no null: the empty choice stands for it. */
const form = projectInput.extend({ template: z.string() });
type Values = z.input<typeof form>;

const EMPTY = "empty";
const TEMPLATES = [
  ...stackupTemplates.map(({ id, title, description }) => ({ value: id, label: `${title}: ${description}` })),
  { value: EMPTY, label: "Empty: build it up, or read it in from a list" },
];
const UNITS = [
  { value: "mm", label: "Millimetres" },
  { value: "mil", label: "Mils" },
];

interface Props {
  open: boolean;
  onOpenChange: (open: boolean) => void;
}

export function CreateProject({ open, onOpenChange }: Props) {
  return (
    <Dialog
      open={open}
      onOpenChange={onOpenChange}
      title="Create a project"
      description="It begins as draft A. Everything can be changed until it is released."
    >
      <CreateForm onClose={() => onOpenChange(false)} />
    </Dialog>
  );
}

function CreateForm({ onClose }: { onClose: () => void }) {
  const router = useRouter();
  const { unit } = useLengthUnit();
  const { register, handleSubmit, setError, formState } = useForm<Values, unknown, z.output<typeof form>>({
    resolver: zodResolver(form),
    defaultValues: { name: "", description: "", unit, template: "6-layers" },
  });
  const { errors, isSubmitting } = formState;

  const submit = handleSubmit(async ({ template, ...values }) => {
    try {
      const project = await createProject({ ...values, template: template === EMPTY ? null : template });
      router.push(`/projects/${project.id}/stackup` as Route);
    } catch (error) {
      const taken = error instanceof ApiError ? error.fields.name : undefined;
      if (taken) setError("name", { message: taken }, { shouldFocus: true });
      else setError("root", { message: errorMessage(error) });
    }
  });

  return (
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
        label="Stackup to start from"
        options={TEMPLATES}
        error={errors.template?.message}
        {...register("template")}
      />
      <Select
        label="Unit of bare numbers"
        hint="A list’s 12 without a unit is read in this one."
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
          Create
        </Button>
      </div>
    </form>
  );
}
