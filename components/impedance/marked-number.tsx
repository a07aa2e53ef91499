import { NumberText } from "@/components/ui/number-text";
import { VerdictMark } from "@/components/ui/verdict-mark";
import type { RowVerdict } from "./row-verdicts";

/** A percentage after the mark of its verdict; marks stand in one line, points in another. */
export function MarkedNumber({ verdict, text }: { verdict: RowVerdict; text: string | null }) {
  return (
    <span className="flex items-center justify-between gap-1">
      <span className="w-3 shrink-0">{verdict ? <VerdictMark verdict={verdict} wordHidden /> : null}</span>
      <NumberText
        text={text}
        unit={text === null || text === "…" ? undefined : "%"}
        fraction={1}
        unitWidth={1}
      />
    </span>
  );
}
