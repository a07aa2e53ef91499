"use client";

import { memo, type MouseEvent, type ReactNode, useId } from "react";
import type { Drawing, Mark } from "@/lib/drawings/marks";
import { Hatches, Marks } from "./mark";

interface Props {
  drawing: Drawing;
  /** what moves over the drawing: the cursor and its dots; redrawn without the rest */
  overlay?: readonly Mark[];
  /** the id of the thing under the pointer, or null when it leaves */
  onPoint?: (hit: string | null) => void;
  onPick?: (hit: string) => void;
  children?: ReactNode;
}

/**
 * A drawing on the page: an image with a title and the same facts in words. It keeps its size; a box that is
 * narrower scrolls it sideways.
 */
export function DrawingSvg({ drawing, overlay, onPoint, onPick, children }: Props) {
  const scope = `d${useId().replace(/[^a-zA-Z0-9]/g, "")}`;
  const find = (event: MouseEvent): string | null =>
    (event.target as Element).closest("[data-hit]")?.getAttribute("data-hit") ?? null;
  return (
    <svg
      role="img"
      aria-labelledby={`${scope}-title`}
      aria-describedby={`${scope}-desc`}
      width={drawing.width}
      height={drawing.height}
      viewBox={`0 0 ${drawing.width} ${drawing.height}`}
      className="block font-sans tabular-nums print:h-auto print:max-w-full"

      onMouseOver={onPoint && ((event) => onPoint(find(event)))}
      onMouseLeave={onPoint && (() => onPoint(null))}
      onClick={
        onPick &&
        ((event) => {
          const hit = find(event);
          if (hit !== null) onPick(hit);
        })
      }
    >
      <title id={`${scope}-title`}>{drawing.title}</title>
      <desc id={`${scope}-desc`}>{drawing.description}</desc>
      <defs>
        <Hatches scope={scope} />
      </defs>
      <Still marks={drawing.marks} scope={scope} />
      {overlay ? <Marks marks={overlay} scope={`${scope}-o`} /> : null}
      {children}
    </svg>
  );
}

/** What does not move with the cursor is drawn once a geometry. */
const Still = memo(Marks);
