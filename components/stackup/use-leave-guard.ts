"use client";

import { useEffect, useRef } from "react";
import { toast } from "@/components/ui/toast";
import type { Autosave } from "./use-autosave";

interface Options extends Pick<Autosave, "unsaved" | "flush"> {
  /** Why it cannot be saved as it is, at this moment; null where nothing is wrong but the saving itself. */
  why: () => string | null;
  /** Gives up the texts that could not be read, and nothing else. */
  giveUp: () => void;
}

/**
 * A link is followed when what is on screen is saved; where it cannot be, one stays and is told why, with the choice
 * to leave without the texts that could not be read. Back and forward cannot be held: for those see `kept-draft.ts`.
 */
export function useLeaveGuard(options: Options): void {
  const latest = useRef(options);
  useEffect(() => {
    latest.current = options;
  });
  useEffect(() => {
    let passing = false;
    const follow = (link: HTMLAnchorElement) => {
      passing = true;
      if (link.isConnected) link.click();
      else window.location.assign(link.href);
      passing = false;
    };
    const guard = async (link: HTMLAnchorElement) => {
      if (await latest.current.flush()) return follow(link);
      const why = latest.current.why();
      toast.error(why ? `Not saved yet. ${why}` : "Not saved yet: the server did not take it.", {
        description: "Mend it, or give it up with Esc, before you leave.",
        action: {
          label: "Leave without it",
          onClick: () => {
            latest.current.giveUp();
            void latest.current.flush().then(() => follow(link));
          },
        },
      });
    };
    const onClick = (event: MouseEvent) => {
      const link = leaving(event);
      if (!link || passing) return;
      // A text that is still being typed is read as it is left.
      const typing = document.activeElement;
      if (typing instanceof HTMLElement && typing.matches("[data-typing]")) typing.blur();
      if (!latest.current.unsaved()) return;
      event.preventDefault();
      void guard(link);
    };
    // Before the link's own handler, which goes nowhere once the click is prevented.
    window.addEventListener("click", onClick, true);
    return () => window.removeEventListener("click", onClick, true);
  }, []);
}

/** The link that a click follows to another page in this tab. */
function leaving(event: MouseEvent): HTMLAnchorElement | null {
  if (event.button !== 0 || event.metaKey || event.ctrlKey || event.shiftKey || event.altKey) return null;
  const link = event.target instanceof Element ? event.target.closest<HTMLAnchorElement>("a[href]") : null;
  if (!link || (link.target !== "" && link.target !== "_self") || link.hasAttribute("download")) return null;
  const { origin, pathname, search } = window.location;
  if (link.origin !== origin) return null;
  return link.pathname === pathname && link.search === search ? null : link;
}
