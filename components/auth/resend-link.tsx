"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { authClient } from "@/lib/client/auth";
import { authMessage } from "@/lib/client/auth-messages";
import { FormError } from "./form-error";

/** Sends the confirming link once more. */
export function ResendLink({ email, next }: { email: string; next: string }) {
  const [state, setState] = useState<"idle" | "busy" | "sent">("idle");
  const [refusal, setRefusal] = useState<string | null>(null);

  async function send() {
    setState("busy");
    setRefusal(null);
    const { error } = await authClient.sendVerificationEmail({ email, callbackURL: next });
    if (error) setRefusal(authMessage(error));
    setState(error ? "idle" : "sent");
  }

  return (
    <div className="flex flex-col items-start gap-3">
      <FormError message={refusal} />
      <Button busy={state === "busy"} onClick={() => void send()}>
        Send the link again
      </Button>
      <p aria-live="polite" className="text-ink-soft text-sm">
        {state === "sent" ? "Sent. It may take a minute." : null}
      </p>
    </div>
  );
}
