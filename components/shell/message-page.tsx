import type { ReactNode } from "react";
import { Mark } from "./mark";

/** A page that says one thing and the way on from it: not found, failed, sent. */
export function MessagePage({ title, children }: { title: string; children: ReactNode }) {
  return (
    <main className="mx-auto flex min-h-dvh max-w-xl flex-col justify-center gap-4 px-6 py-16">
      <Mark size={40} />
      <h1 className="text-xl">{title}</h1>
      <div className="text-ink-soft flex flex-col items-start gap-4">{children}</div>
    </main>
  );
}
