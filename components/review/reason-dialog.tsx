"use client";

import { type ReactNode, useState } from "react";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { TextArea } from "@/components/ui/input";
import { Notice } from "@/components/ui/notice";
import { errorMessage } from "@/lib/client/api";

interface Props {
  title: string;
  description: ReactNode;
  label: string;
  confirm: string;
  /** fewest letters; 0 where it may be left empty */
  least: number;
  onConfirm: (text: string) => Promise<unknown>;
  onClose: () => void;
}

/** Asks for a reason or a remark, does it, and shows the refusal where the server refuses. */
export function ReasonDialog({ title, description, label, confirm, least, onConfirm, onClose }: Props) {
  const [text, setText] = useState("");
  const [wrong, setWrong] = useState<string | null>(null);
  const [refusal, setRefusal] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  async function send() {
    if (text.trim().length < least) return setWrong("Give the reason in a sentence.");
    setBusy(true);
    try {
      await onConfirm(text.trim());
      onClose();
    } catch (error) {
      setRefusal(errorMessage(error));
    } finally {
      setBusy(false);
    }
  }

  return (
    <Dialog
      open
      onOpenChange={(open) => (open ? undefined : onClose())}
      title={title}
      description={description}
      footer={
        <>
          <Button onClick={onClose}>Close</Button>
          <Button variant="primary" busy={busy} onClick={() => void send()}>
            {confirm}
          </Button>
        </>
      }
    >
      <TextArea
        label={label}
        rows={4}
        autoFocus
        maxLength={2000}
        value={text}
        error={wrong}
        onChange={(event) => {
          setText(event.target.value);
          setWrong(null);
        }}
      />
      {refusal ? <Notice tone="refusal">{refusal}</Notice> : null}
    </Dialog>
  );
}
