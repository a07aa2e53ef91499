"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import type { Route } from "next";
import { useRouter } from "next/navigation";
import { useState } from "react";
import { useForm } from "react-hook-form";
import { Button } from "@/components/ui/button";
import { Input } from "@/components/ui/input";
import { authClient } from "@/lib/client/auth";
import { authMessage } from "@/lib/client/auth-messages";
import { signUpForm, type SignUpForm as Values } from "@/lib/schemas/account";
import { FormError } from "./form-error";

export function SignUpForm({ next }: { next: string }) {
  const router = useRouter();
  const [refusal, setRefusal] = useState<string | null>(null);
  const form = useForm<Values>({
    resolver: zodResolver(signUpForm),
    defaultValues: { name: "", email: "", password: "" },
  });
  const { errors, isSubmitting } = form.formState;

  const submit = form.handleSubmit(async (values) => {
    setRefusal(null);
    const { error } = await authClient.signUp.email({ ...values, callbackURL: next });
    if (error) return setRefusal(authMessage(error));
    router.push(
      `/verify?email=${encodeURIComponent(values.email)}&next=${encodeURIComponent(next)}` as Route,
    );
  });

  return (
    <form method="post" noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-4">
      <FormError message={refusal} />
      <Input label="Your name" autoComplete="name" error={errors.name?.message} {...form.register("name")} />
      <Input
        label="E-mail address"
        type="email"
        autoComplete="username"
        hint="We send one message with a link, to see that it reaches you."
        error={errors.email?.message}
        {...form.register("email")}
      />
      <Input
        label="Password"
        type="password"
        autoComplete="new-password"
        hint="At least 10 characters; a few unrelated words do well."
        error={errors.password?.message}
        {...form.register("password")}
      />
      <Button type="submit" variant="primary" size="md" busy={isSubmitting}>
        Make the account
      </Button>
    </form>
  );
}
