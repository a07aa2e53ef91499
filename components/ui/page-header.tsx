import type { ReactNode } from "react";

interface Props {
  title: ReactNode;
  /** One line below: what this page is for, or what it is of. */
  description?: ReactNode;
  actions?: ReactNode;
}

/** The head of a sheet: its name, a line about it, and its acts. */
export function PageHeader({ title, description, actions }: Props) {
  return (
    <header className="mb-6 flex flex-wrap items-start justify-between gap-x-6 gap-y-3">
      <div className="min-w-0">
        <h1 className="text-xl font-semibold break-words">{title}</h1>
        {description ? <p className="text-ink-soft mt-1 max-w-prose text-sm">{description}</p> : null}
      </div>
      {actions ? <div className="flex flex-wrap gap-2 print:hidden">{actions}</div> : null}
    </header>
  );
}
