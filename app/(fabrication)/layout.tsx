import { redirect } from "next/navigation";
import type { ReactNode } from "react";
import { Header } from "@/components/shell/header";
import { readShell } from "@/lib/auth/shell";

/** The manufacturer's side: a header and the sheet, no rail, for there is nowhere else to go. */
export default async function FabricationLayout({ children }: { children: ReactNode }) {
  const { actor, ...shell } = await readShell();
  if (actor.role !== "manufacturer") redirect("/projects");
  return (
    <div className="flex min-h-dvh flex-col">
      <Header {...shell} home="/fabrication" />
      <div className="mx-auto flex w-full max-w-6xl min-w-0 flex-1 flex-col">{children}</div>
    </div>
  );
}
