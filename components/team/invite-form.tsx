"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { Select } from "@/components/ui/select";
import { inviteForm, type InviteForm as Values } from "@/lib/schemas/account";
import { ROLE_OPTIONS } from "./role-words";
import { useInvite } from "./use-team";

export function InviteForm() {
  const invite = useInvite();
  const form = useForm<Values>({
    resolver: zodResolver(inviteForm),
    defaultValues: { email: "", role: "designer" },
  });
  const { errors } = form.formState;

  const submit = form.handleSubmit((values) =>
    invite.mutate(values, { onSuccess: () => form.resetField("email") }),
  );

  return (
    <form
      noValidate
      method="post"
      onSubmit={(event) => void submit(event)}
      className="grid max-w-2xl gap-4 sm:grid-cols-[1fr_12rem_auto] sm:items-start"
    >
      <Input
        label="E-mail address"
        type="email"
        autoComplete="off"
        error={errors.email?.message}
        {...form.register("email")}
      />
      <Select label="Role" options={ROLE_OPTIONS} error={errors.role?.message} {...form.register("role")} />
      <Button type="submit" variant="primary" busy={invite.isPending} className="sm:mt-6">
        Invite
      </Button>
    </form>
  );
}
