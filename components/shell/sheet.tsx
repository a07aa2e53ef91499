import type { ReactNode } from "react";

/** The one main sheet of a page. `wide` leaves the whole width to tables and drawings. */
export function Sheet({ children, wide = true }: { children: ReactNode; wide?: boolean }) {
  return (
    <main
      id="sheet"
      tabIndex={-1}
      className={`min-w-0 flex-1 px-4 py-6 outline-none lg:px-6 ${wide ? "" : "max-w-4xl"}`}
    >
      {children}
    </main>
  );
}
