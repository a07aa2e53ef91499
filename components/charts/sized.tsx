"use client";

import { useParentSize } from "@visx/responsive";
import type { ReactNode } from "react";

interface Props {
  /** width before the box is measured, and on the server [px] */
  initial?: number;
  /** least width a drawing is made for [px]; a narrower box scrolls sideways */
  least?: number;
  children: (width: number) => ReactNode;
}

/** Makes a drawing as wide as the place it is given. */
export function Sized({ initial = 880, least = 320, children }: Props) {
  const { parentRef, width } = useParentSize({
    debounceTime: 30,
    initialSize: { width: initial, height: 0 },
  });
  // What scrolls must be reached by the keyboard.
  const scrolls = width > 0 && width < least;
  return (
    <div
      ref={parentRef}
      {...(scrolls ? { tabIndex: 0, role: "region", "aria-label": "Drawing, scrolls sideways" } : {})}
      className="w-full overflow-x-auto print:overflow-visible"
    >
      {children(Math.max(Math.floor(width) || initial, least))}
    </div>
  );
}
