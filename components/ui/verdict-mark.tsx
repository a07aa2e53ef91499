import { useId } from "react";
import { Hatches, Marks } from "@/components/charts/mark";
import { type ShownVerdict, verdictMark } from "@/lib/drawings/verdict-mark";

export type VerdictName = ShownVerdict;

interface Props {
  verdict: VerdictName;
  /** A count before the word: "12 fail". */
  count?: number;
  /** Shows the shape alone; the word stays for those who do not see it. */
  wordHidden?: boolean;
}

const LOOKS: Record<VerdictName, { className: string; word: string }> = {
  pass: { className: "text-pass", word: "pass" },
  near: { className: "text-near", word: "near" },
  fail: { className: "text-fail", word: "fail" },
  "no data": { className: "text-ink-soft", word: "no data" },
  waived: { className: "text-waived", word: "waived" },
};

/** A verdict, told three times: by its word, by its shape and by its colour. */
export function VerdictMark({ verdict, count, wordHidden = false }: Props) {
  const look = LOOKS[verdict];
  return (
    <span className={`inline-flex items-center gap-1.5 text-sm whitespace-nowrap ${look.className}`}>
      <svg width="12" height="12" viewBox="0 0 12 12" aria-hidden="true" className="shrink-0">
        <VerdictShape verdict={verdict} />
      </svg>
      <span className={wordHidden ? "sr-only" : undefined}>
        {count === undefined ? null : `${count.toLocaleString("en")} `}
        {look.word}
      </span>
    </span>
  );
}

/** The shape alone, in a 12 × 12 box: the same that the drawings have. */
export function VerdictShape({ verdict }: { verdict: VerdictName }) {
  const scope = `v${useId().replace(/[^a-zA-Z0-9]/g, "")}`;
  return (
    <>
      {verdict === "waived" ? (
        <defs>
          <Hatches scope={scope} />
        </defs>
      ) : null}
      <Marks marks={verdictMark(verdict, 6, 6, 5)} scope={scope} />
    </>
  );
}
