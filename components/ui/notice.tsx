import { CircleAlert, Info } from "lucide-react";
import type { ReactNode } from "react";
import { cn } from "./class-names";

interface Props {
  /** "refusal": something did not happen; "note": something to know; "warning": something to act on. */
  tone?: "refusal" | "note" | "warning";
  children: ReactNode;
  actions?: ReactNode;
  className?: string;
}

const TONES = {
  refusal: "border-fail text-fail",
  warning: "border-near text-ink",
  note: "border-rule-line text-ink-soft",
} as const;

/** A sentence that stands in the page: what is so, why, and the way out. */
export function Notice({ tone = "note", children, actions, className }: Props) {
  const Icon = tone === "note" ? Info : CircleAlert;
  return (
    <div
      role={tone === "refusal" ? "alert" : undefined}
      className={cn(
        "flex flex-wrap items-start gap-x-3 gap-y-2 border-l-2 py-1 pl-3 text-sm",
        TONES[tone],
        className,
      )}
    >
      <Icon
        size={15}
        aria-hidden="true"
        className={cn("mt-0.5 shrink-0", tone === "warning" && "text-near")}
      />
      <div className="max-w-prose min-w-0 flex-1">{children}</div>
      {actions ? <div className="flex flex-wrap gap-2">{actions}</div> : null}
    </div>
  );
}
