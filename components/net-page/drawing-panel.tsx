import type { ReactNode } from "react";

interface Props {
  title: string;
  /** one line on what is drawn, or what is left out */
  note?: ReactNode;
  actions?: ReactNode;
  /** [px] kept for the drawing before it comes */
  height: number;
  children: ReactNode | null;
}

/** A drawing with its title; its place is kept while it is computed. */
export function DrawingPanel({ title, note, actions, height, children }: Props) {
  return (
    <section aria-label={title} className="min-w-0">
      <div className="flex min-h-8 flex-wrap items-center justify-between gap-x-3">
        <h2 className="text-sm font-semibold">{title}</h2>
        {actions}
      </div>
      <div className="border-rule-line bg-sheet border p-2" style={{ minHeight: height + 18 }}>
        {children}
      </div>
      {note ? <p className="text-ink-soft mt-1 text-xs">{note}</p> : null}
    </section>
  );
}
