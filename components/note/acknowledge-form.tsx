"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { TextArea } from "@/components/ui/input";
import { apiPost, errorMessage } from "@/lib/client/api";

interface Props {
  /** where the answer goes: the note of an account or of a link */
  endpoint: string;
  acknowledgedAt: number | null;
  acknowledgedBy: string | null;
}

/** The recipient says that they have the note, with a word if they like. */
export function AcknowledgeForm({ endpoint, acknowledgedAt, acknowledgedBy }: Props) {
  const router = useRouter();
  const [words, setWords] = useState("");
  const [busy, setBusy] = useState(false);
  const [error, setError] = useState<string | null>(null);
  if (acknowledgedAt !== null)
    return (
      <p className="border-pass border-l-4 py-2 pl-4 text-sm print:hidden" role="status">
        Acknowledged by {acknowledgedBy} on {new Date(acknowledgedAt).toISOString().slice(0, 10)}.
      </p>
    );
  const send = async () => {
    setBusy(true);
    setError(null);
    try {
      await apiPost(endpoint, { words });
      router.refresh();
    } catch (cause) {
      setError(errorMessage(cause));
    } finally {
      setBusy(false);
    }
  };
  return (
    <section className="border-field-line flex max-w-prose flex-col gap-3 border p-4 print:hidden">
      <h2 className="text-lg font-semibold">Acknowledge this note</h2>
      <TextArea
        label="A word to the team, if you like"
        value={words}
        onChange={(event) => setWords(event.target.value)}
        error={error}
        maxLength={2000}
      />
      <div>
        <Button variant="primary" busy={busy} onClick={() => void send()}>
          Acknowledge
        </Button>
      </div>
    </section>
  );
}
