"use client";

import { useEffect } from "react";
import type { PlaybackControl } from "@/components/charts/use-playback";

/** Left, right and space work the cursor wherever the focus is, except in a control that has its own use for them. */
export function useCursorKeys(control: PlaybackControl): void {
  const { step, toggle } = control;
  useEffect(() => {
    const press = (event: KeyboardEvent): void => {
      if (event.defaultPrevented || event.altKey || event.ctrlKey || event.metaKey || ownsKeys(event.target))
        return;
      if (event.key === "ArrowLeft") step(-1);
      else if (event.key === "ArrowRight") step(1);
      else if (event.key === " ") toggle();
      else return;
      event.preventDefault();
    };
    window.addEventListener("keydown", press);
    return () => window.removeEventListener("keydown", press);
  }, [step, toggle]);
}

function ownsKeys(target: EventTarget | null): boolean {
  return (
    target instanceof Element &&
    target.closest(
      "input, select, textarea, button, a, summary, [role=slider], [role=dialog], [role=menu], [role=region]",
    ) !== null
  );
}
