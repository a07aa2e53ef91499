"use client";

import { useEffect, useRef, useState } from "react";

/** True from when the element was first seen: what takes long is not computed for whoever does not scroll to it. */
export function useInView<E extends Element>() {
  const ref = useRef<E>(null);
  const [seen, setSeen] = useState(typeof IntersectionObserver === "undefined");
  useEffect(() => {
    const element = ref.current;
    if (seen || !element) return;
    const observer = new IntersectionObserver(
      (entries) => {
        if (entries.some(({ isIntersecting }) => isIntersecting)) setSeen(true);
      },
      { rootMargin: "120px" },
    );
    observer.observe(element);
    return () => observer.disconnect();
  }, [seen]);
  return [ref, seen] as const;
}
