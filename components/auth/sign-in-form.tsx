"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import type { Route } from "next";
import Link from "next/link";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { authClient } from "@/lib/client/auth";
import { authMessage } from "@/lib/client/auth-messages";
import { bringPreferences } from "@/lib/client/own-preferences";
import { startAnew } from "@/lib/client/start-anew";
import { signInForm, type SignInForm as Values } from "@/lib/schemas/account";
import { DemoAccounts, type DemoAccount } from "./demo-accounts";
import { FormError } from "./form-error";

interface Props {
  next: string;
  demoAccounts: readonly DemoAccount[];
}

export function SignInForm({ next, demoAccounts }: Props) {
  const [refusal, setRefusal] = useState<string | null>(null);
  const [unverified, setUnverified] = useState<string | null>(null);
  const form = useForm<Values>({
    resolver: zodResolver(signInForm),
    defaultValues: { email: "", password: "" },
  });
  const { errors, isSubmitting, isSubmitSuccessful } = form.formState;

  const submit = form.handleSubmit(async (values) => {
    setRefusal(null);
    const { error } = await authClient.signIn.email(values);
    if (error) {
      setRefusal(authMessage(error));
      setUnverified(error.code === "EMAIL_NOT_VERIFIED" ? values.email : null);
      form.setError("root", { message: error.code });
      return;
    }
    await bringPreferences();
    startAnew(next);
  });

  return (
    <>
      <form method="post" noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-4">
        <FormError message={refusal} />
        {unverified ? (
          <Link
            className="prose-link text-sm"
            href={`/verify?email=${encodeURIComponent(unverified)}` as Route}
          >
            Send the link again
          </Link>
        ) : null}
        <Input
          label="E-mail address"
          type="email"
          autoComplete="username"
          error={errors.email?.message}
          {...form.register("email")}
        />
        <Input
          label="Password"
          type="password"
          autoComplete="current-password"
          error={errors.password?.message}
          {...form.register("password")}
        />
        <Button type="submit" variant="primary" size="md" busy={isSubmitting || isSubmitSuccessful}>
          Sign in
        </Button>
      </form>
      {demoAccounts.length > 0 ? (
        <DemoAccounts
          accounts={demoAccounts}
          onPick={(account) => {
            form.setValue("email", account.email);
            form.setValue("password", account.password);
            void submit();
          }}
        />
      ) : null}
    </>
  );
}
