"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useQueryClient } from "@tanstack/react-query";
import { Plus, X } from "lucide-react";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { useFieldArray, useForm } from "react-hook-form";
import { toast } from "@/components/ui/toast";
import type { z } from "zod";
import { Button } from "@/components/ui/button";
import { ConfirmDialog } from "@/components/ui/confirm-dialog";
import { Input, TextArea } from "@/components/ui/input";
import { ApiError, apiPost, errorMessage } from "@/lib/client/api";
import { releaseInput } from "@/lib/schemas/release";

type Values = z.input<typeof releaseInput>;

interface Props {
  projectId: string;
  letter: string;
  run: { id: string; number: number };
}

/** Names the release and its recipients, then asks once: what follows cannot be undone. */
export function ReleaseForm({ projectId, letter, run }: Props) {
  const router = useRouter();
  const client = useQueryClient();
  const [asking, setAsking] = useState<z.output<typeof releaseInput> | null>(null);
  const [busy, setBusy] = useState(false);
  const form = useForm<Values, unknown, z.output<typeof releaseInput>>({
    resolver: zodResolver(releaseInput),
    defaultValues: {
      runId: run.id,
      title: "",
      remarks: "",
      recipients: [{ name: "", email: "", company: "" }],
    },
  });
  const recipients = useFieldArray({ control: form.control, name: "recipients" });
  const { errors } = form.formState;

  const release = async (values: z.output<typeof releaseInput>) => {
    setBusy(true);
    try {
      const { id } = await apiPost<{ id: string }>(`/projects/${projectId}/releases`, values);
      await client.invalidateQueries();
      router.push(`/projects/${projectId}/releases/${id}` as Route);
      router.refresh();
    } catch (error) {
      if (error instanceof ApiError)
        for (const [field, message] of Object.entries(error.fields))
          form.setError(field as "title", { message });
      toast.error(errorMessage(error));
    } finally {
      setBusy(false);
      setAsking(null);
    }
  };

  return (
    <form
      className="mt-4 flex max-w-2xl flex-col gap-4"
      noValidate
      onSubmit={(event) => void form.handleSubmit((values) => setAsking(values))(event)}
    >
      <Input
        label="Title"
        hint="As it stands on the note, for example: first build"
        error={errors.title?.message}
        {...form.register("title")}
      />
      <TextArea
        label="Remarks to the fabricator"
        error={errors.remarks?.message}
        {...form.register("remarks")}
      />
      <fieldset className="flex flex-col gap-3">
        <legend className="mb-1 font-medium">Recipients</legend>
        {recipients.fields.map((field, index) => (
          <div
            key={field.id}
            className="grid grid-cols-1 items-start gap-2 sm:grid-cols-[1fr_1.4fr_1fr_auto]"
          >
            <Input
              label="Name"
              error={errors.recipients?.[index]?.name?.message}
              {...form.register(`recipients.${index}.name`)}
            />
            <Input
              label="E-mail"
              type="email"
              error={errors.recipients?.[index]?.email?.message}
              {...form.register(`recipients.${index}.email`)}
            />
            <Input label="Company" {...form.register(`recipients.${index}.company`)} />
            {recipients.fields.length > 1 ? (
              <Button
                variant="quiet"
                size="icon"
                className="sm:mt-6"
                aria-label={`Remove recipient ${index + 1}`}
                onClick={() => recipients.remove(index)}
              >
                <X size={16} aria-hidden="true" />
              </Button>
            ) : null}
          </div>
        ))}
        {errors.recipients?.message ? (
          <p role="alert" className="text-fail text-xs">
            {errors.recipients.message}
          </p>
        ) : null}
        <div>
          <Button onClick={() => recipients.append({ name: "", email: "", company: "" })}>
            <Plus size={14} aria-hidden="true" />
            Add a recipient
          </Button>
        </div>
      </fieldset>
      <div>
        <Button type="submit" variant="primary" size="md">
          Release revision {letter}
        </Button>
      </div>
      <ConfirmDialog
        open={asking !== null}
        onOpenChange={(open) => (open ? undefined : setAsking(null))}
        title={`Release revision ${letter}?`}
        description={`This freezes stackup, classes, models, rules, parts and nets of revision ${letter} together with run ${run.number}, for good, and sends the impedance-control note to ${asking?.recipients.length ?? 0} ${asking?.recipients.length === 1 ? "recipient" : "recipients"}. It cannot be undone; work goes on in a new draft.`}
        confirm={`Release revision ${letter}`}
        busy={busy}
        onConfirm={() => {
          if (asking) void release(asking);
        }}
      />
    </form>
  );
}
