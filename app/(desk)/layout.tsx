import { redirect } from "next/navigation";
import type { ReactNode } from "react";
import { DeskShell } from "@/components/shell/desk-shell";
import { readShell } from "@/lib/auth/shell";
import { can } from "@/lib/schemas/actor";

/** Draws the shell. It guards nothing: each page and each query asks for the actor itself. */
export default async function DeskLayout({ children }: { children: ReactNode }) {
  const { actor, ...shell } = await readShell();
  if (actor.role === "manufacturer") redirect("/fabrication");
  return (
    <DeskShell {...shell} mayReadAudit={can(actor, "audit:read")}>
      {children}
    </DeskShell>
  );
}
