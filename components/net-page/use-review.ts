"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { toast } from "@/components/ui/toast";
import { api, ApiError, errorMessage } from "@/lib/client/api";

interface Outcome {
  /** shown when it is done */
  said: string;
  then?: () => void;
}

/** Acts on flags and waivers of a project; a refusal is kept as a sentence and by field. */
export function useReview(projectId: string) {
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [refusal, setRefusal] = useState<string | null>(null);
  const [fields, setFields] = useState<Record<string, string>>({});

  async function act(
    method: "POST" | "PATCH" | "DELETE",
    path: string,
    body: unknown,
    { said, then }: Outcome,
  ): Promise<void> {
    setBusy(true);
    setRefusal(null);
    setFields({});
    try {
      await api(method, `/projects/${projectId}${path}`, { body });
      toast.success(said);
      router.refresh();
      then?.();
    } catch (error) {
      setRefusal(errorMessage(error));
      if (error instanceof ApiError) setFields(error.fields);
    } finally {
      setBusy(false);
    }
  }
  return { act, busy, refusal, fields };
}
