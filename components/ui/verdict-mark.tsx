export type VerdictName = "pass" | "near" | "fail" | "no data" | "waived";

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

/** The shape alone, in a 12 × 12 box, for drawings that place marks of their own. */
export function VerdictShape({ verdict }: { verdict: VerdictName }) {
  switch (verdict) {
    case "pass": // a filled disc
      return <circle cx="6" cy="6" r="4.5" fill="currentColor" />;
    case "near": // a half-filled diamond
      return (
        <>
          <path d="M6 1 11 6 6 11 1 6Z" fill="none" stroke="currentColor" strokeWidth="1.5" />
          <path d="M6 1 6 11 1 6Z" fill="currentColor" />
        </>
      );
    case "fail": // a filled square with a bar left out
      return <path d="M1 1H11V11H1ZM3 5.2V6.8H9V5.2Z" fill="currentColor" fillRule="evenodd" />;
    case "no data": // an empty, broken ring
      return (
        <circle
          cx="6"
          cy="6"
          r="4.5"
          fill="none"
          stroke="currentColor"
          strokeWidth="1.5"
          strokeDasharray="3 2.6"
        />
      );
    case "waived": // a hatched square
      return (
        <>
          <rect
            x="1.25"
            y="1.25"
            width="9.5"
            height="9.5"
            fill="none"
            stroke="currentColor"
            strokeWidth="1.5"
          />
          <path d="M1.5 7 7 1.5M2 10.5 10.5 2M5.5 10.5 10.5 5.5" stroke="currentColor" strokeWidth="1" />
        </>
      );
  }
}
