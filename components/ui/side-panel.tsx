"use client";

import { X } from "lucide-react";
import { type ReactNode, useEffect, useId, useRef } from "react";
import { Button } from "./button";

/** From this width on a panel stands beside the sheet: Tailwind's lg, as the classes below have it. */
const BESIDE = "(min-width: 64rem)";

interface LayoutProps {
  /** The sheet that stays in view. */
  children: ReactNode;
  /** A `<SidePanel>`, or null when closed. */
  panel: ReactNode | null;
}

/** A sheet and, when open, its panel: side by side where there is room, the panel alone where there is not. */
export function WithSidePanel({ children, panel }: LayoutProps) {
  return (
    <div className="flex min-h-0 min-w-0 flex-1">
      <div className={`min-w-0 flex-1 ${panel ? "hidden lg:block" : ""}`}>{children}</div>
      {panel}
    </div>
  );
}

interface Props {
  title: ReactNode;
  onClose: () => void;
  children: ReactNode;
  footer?: ReactNode;
  /** Moves the focus into the panel when it opens beside the sheet. Leave off where the list keeps the focus. */
  takeFocus?: boolean;
  /** Room for a drawing of a trace. */
  wide?: boolean;
}

/** Opens beside the table, never over what is being compared; fills the page on a narrow screen. Esc closes. */
export function SidePanel({ title, onClose, children, footer, takeFocus = false, wide = false }: Props) {
  const id = useId();
  const ref = useRef<HTMLElement>(null);
  useEffect(() => {
    // Alone on a narrow screen it has hidden what had the focus.
    if (takeFocus || window.matchMedia?.(BESIDE).matches === false)
      ref.current?.focus({ preventScroll: true });
  }, [takeFocus]);
  return (
    <aside
      ref={ref}
      tabIndex={-1}
      aria-labelledby={id}
      onKeyDown={(event) => {
        if (event.key === "Escape" && !event.defaultPrevented) onClose();
      }}
      className={`border-rule-line bg-sheet flex w-full min-w-0 shrink-0 flex-col outline-none lg:sticky lg:top-12 lg:ml-4 lg:max-h-[calc(100dvh-3rem)] lg:border-l print:hidden ${wide ? "lg:w-[528px]" : "lg:w-[400px]"}`}
    >
      <header className="border-rule-line flex items-center justify-between gap-2 border-b px-4 py-2">
        <h2 id={id} className="min-w-0 truncate text-base font-semibold">
          {title}
        </h2>
        <Button variant="quiet" size="icon" aria-label="Close the panel" onClick={onClose}>
          <X size={16} aria-hidden="true" />
        </Button>
      </header>
      <div className="min-h-0 flex-1 overflow-y-auto p-4">{children}</div>
      {footer ? (
        <footer className="border-rule-line flex flex-wrap justify-end gap-2 border-t px-4 py-2">
          {footer}
        </footer>
      ) : null}
    </aside>
  );
}
