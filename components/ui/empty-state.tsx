import type { ReactNode } from "react";

/** Says what is not there yet, why one would want it, and how to get it. */
export function EmptyState({
  title,
  children,
  actions,
}: {
  title: string;
  children?: ReactNode;
  actions?: ReactNode;
}) {
  return (
    <section className="border-field-line flex flex-col items-start gap-3 border border-dashed px-6 py-10">
      <h2 className="text-lg font-semibold">{title}</h2>
      {children ? <div className="text-ink-soft max-w-prose">{children}</div> : null}
      {actions ? <div className="flex flex-wrap gap-2 pt-1">{actions}</div> : null}
    </section>
  );
}
