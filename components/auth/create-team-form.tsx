"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { authClient } from "@/lib/client/auth";
import { authMessage } from "@/lib/client/auth-messages";
import { startAnew } from "@/lib/client/start-anew";
import { teamForm, type TeamForm as Values } from "@/lib/schemas/account";
import { FormError } from "./form-error";

export function CreateTeamForm() {
  const [refusal, setRefusal] = useState<string | null>(null);
  const form = useForm<Values>({ resolver: zodResolver(teamForm), defaultValues: { name: "" } });
  const { errors, isSubmitting } = form.formState;

  const submit = form.handleSubmit(async ({ name }) => {
    setRefusal(null);
    const { data, error } = await authClient.organization.create({ name, slug: slugOf(name) });
    if (error) return setRefusal(authMessage(error));
    await authClient.organization.setActive({ organizationId: data.id });
    startAnew("/projects");
  });

  return (
    <form method="post" noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-4">
      <FormError message={refusal} />
      <Input
        label="Name of the team"
        autoComplete="organization"
        error={errors.name?.message}
        {...form.register("name")}
      />
      <Button type="submit" variant="primary" size="md" busy={isSubmitting}>
        Make the team
      </Button>
    </form>
  );
}

/** Teams may share a name; the part after the dash keeps their short names apart. */
function slugOf(name: string): string {
  const words = name
    .normalize("NFKD")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .replace(/^-+|-+$/g, "")
    .slice(0, 40);
  const [random = 0] = crypto.getRandomValues(new Uint32Array(1));
  return `${words || "team"}-${random.toString(36)}`;
}
