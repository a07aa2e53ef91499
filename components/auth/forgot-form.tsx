"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { authClient } from "@/lib/client/auth";
import { authMessage } from "@/lib/client/auth-messages";
import { forgotForm, type ForgotForm as Values } from "@/lib/schemas/account";
import { FormError } from "./form-error";

export function ForgotForm() {
  const [refusal, setRefusal] = useState<string | null>(null);
  const [sentTo, setSentTo] = useState<string | null>(null);
  const form = useForm<Values>({ resolver: zodResolver(forgotForm), defaultValues: { email: "" } });
  const { errors, isSubmitting } = form.formState;

  const submit = form.handleSubmit(async ({ email }) => {
    setRefusal(null);
    const { error } = await authClient.requestPasswordReset({ email, redirectTo: "/reset" });
    if (error) return setRefusal(authMessage(error));
    setSentTo(email);
  });

  if (sentTo) {
    return (
      <p role="status" className="text-ink-soft">
        If <strong className="text-ink font-semibold break-all">{sentTo}</strong> has an account, a message
        with a link is on its way. It holds for an hour and works once.
      </p>
    );
  }
  return (
    <form method="post" noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-4">
      <FormError message={refusal} />
      <Input
        label="E-mail address"
        type="email"
        autoComplete="username"
        error={errors.email?.message}
        {...form.register("email")}
      />
      <Button type="submit" variant="primary" size="md" busy={isSubmitting}>
        Send the link
      </Button>
    </form>
  );
}
