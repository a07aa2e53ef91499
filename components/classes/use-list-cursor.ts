"use client";

import { parseAsString, useQueryState } from "nuqs";
import { useState } from "react";
import { useClassesDesk } from "./classes-desk";

/** Which row the keyboard is on and which has its panel open; an open panel follows the keyboard. */
export function useListCursor() {
  const { leave } = useClassesDesk();
  const [at, setAt] = useQueryState("at", parseAsString.withOptions({ history: "replace" }));
  const [active, setActive] = useState<string | null>(at);
  const open = (id: string | null) => {
    if (id === at) return;
    leave(() => {
      setActive(id ?? at);
      void setAt(id);
    });
  };
  return {
    openId: at,
    activeId: active,
    open,
    close: () => open(null),
    move: (id: string | null) => {
      if (at === null || id === null) setActive(id);
      else open(id);
    },
    /** Without saving: what was open is gone. */
    drop: () => void setAt(null),
  };
}
