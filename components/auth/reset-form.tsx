"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import Link from "next/link";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { authClient } from "@/lib/client/auth";
import { authMessage } from "@/lib/client/auth-messages";
import { resetForm, type ResetForm as Values } from "@/lib/schemas/account";
import { FormError } from "./form-error";

export function ResetForm({ token }: { token: string }) {
  const [refusal, setRefusal] = useState<string | null>(null);
  const [done, setDone] = useState(false);
  const form = useForm<Values>({ resolver: zodResolver(resetForm), defaultValues: { password: "" } });
  const { errors, isSubmitting } = form.formState;

  const submit = form.handleSubmit(async ({ password }) => {
    setRefusal(null);
    const { error } = await authClient.resetPassword({ newPassword: password, token });
    if (error) return setRefusal(authMessage(error));
    setDone(true);
  });

  if (done) {
    return (
      <p role="status">
        The password is changed.{" "}
        <Link className="prose-link" href={"/sign-in"}>
          Sign in with it
        </Link>
      </p>
    );
  }
  return (
    <form method="post" noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-4">
      <FormError message={refusal} />
      <Input
        label="New password"
        type="password"
        autoComplete="new-password"
        hint="At least 10 characters; a few unrelated words do well."
        error={errors.password?.message}
        {...form.register("password")}
      />
      <Button type="submit" variant="primary" size="md" busy={isSubmitting}>
        Change the password
      </Button>
    </form>
  );
}
