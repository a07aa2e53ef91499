"use client";

import type { ReactNode } from "react";
import { Button } from "./button";
import { Dialog } from "./dialog";

interface Props {
  open: boolean;
  onOpenChange: (open: boolean) => void;
  title: string;
  description: ReactNode;
  /** The verb on the button that does it. */
  confirm: string;
  onConfirm: () => void;
  danger?: boolean;
  busy?: boolean;
  children?: ReactNode;
}

/** Asks once before what cannot be undone. */
export function ConfirmDialog({ confirm, onConfirm, danger = false, busy, children, ...rest }: Props) {
  return (
    <Dialog
      {...rest}
      footer={
        <>
          <Button onClick={() => rest.onOpenChange(false)}>Keep as it is</Button>
          <Button variant={danger ? "danger" : "primary"} busy={busy} onClick={onConfirm}>
            {confirm}
          </Button>
        </>
      }
    >
      {children}
    </Dialog>
  );
}
