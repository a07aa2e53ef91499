import type { ReactNode } from "react";

const TONES = {
  plain: "border-rule-line text-ink-soft",
  ink: "border-field-line text-ink",
  copper: "border-copper text-copper",
  violet: "border-violet text-violet",
  near: "border-near text-near",
  fail: "border-fail text-fail",
  pass: "border-pass text-pass",
} as const;

/** A word that sorts a thing: a role, a state, an origin. */
export function Badge({ tone = "plain", children }: { tone?: keyof typeof TONES; children: ReactNode }) {
  return (
    <span
      className={`inline-flex h-5 w-fit items-center gap-1 rounded border px-1.5 text-xs whitespace-nowrap ${TONES[tone]}`}
    >
      {children}
    </span>
  );
}
