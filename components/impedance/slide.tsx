"use client";

import { type ReactNode, useEffect, useRef } from "react";

interface Props {
  label: string;
  id: string;
  value: number;
  min: number;
  max: number;
  step: number;
  /** the value in words, for those who do not see the slider */
  words: string;
  onDrag: (value: number) => void;
  onSettle: () => void;
  /** the number beside it */
  children: ReactNode;
}

/** One line: a name, a slider on its grid, the number as a field. */
export function Slide({ label, id, value, min, max, step, words, onDrag, onSettle, children }: Props) {
  const first = Math.ceil(min / step - 1e-9);
  const last = Math.floor(max / step + 1e-9);
  const ref = useRef<HTMLInputElement>(null);
  const settled = useRef(onSettle);
  useEffect(() => {
    settled.current = onSettle;
  });
  // React calls every movement a change; the element's own event of that name comes when it is let go of.
  useEffect(() => {
    const input = ref.current;
    const listen = () => settled.current();
    input?.addEventListener("change", listen);
    return () => input?.removeEventListener("change", listen);
  }, []);
  return (
    <div className="grid grid-cols-[112px_1fr_96px] items-center gap-3">
      <label htmlFor={id} className="text-sm font-medium">
        {label}
      </label>
      <input
        ref={ref}
        id={id}
        type="range"
        min={first}
        max={last}
        step={1}
        value={Math.min(last, Math.max(first, Math.round(value / step)))}
        aria-valuetext={words}
        onChange={(event) => onDrag(Number((Number(event.target.value) * step).toPrecision(12)))}
        className="accent-copper h-8 w-full min-w-0"
      />
      {children}
    </div>
  );
}
