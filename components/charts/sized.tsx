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
  return (
    <div ref={parentRef} className="w-full overflow-x-auto print:overflow-visible">
      {children(Math.max(Math.floor(width) || initial, least))}
    </div>
  );
}
