"use client";

import { VerdictShape } from "@/components/ui/verdict-mark";
import type { CornerName, Verdict } from "@/lib/si/rules/types";
import { SIDES, SPEEDS } from "./net-state";

interface Props {
  verdicts: ReadonlyMap<CornerName, Verdict>;
  corner: CornerName;
  /** what the verdicts are of: a rule's title, or every rule */
  of: string;
  onCorner: (corner: CornerName) => void;
}

const INK: Record<Verdict, string> = {
  pass: "text-pass",
  near: "text-near",
  fail: "text-fail",
  "no data": "text-ink-soft",
};

/** Three driver speeds by three impedance sides, each with its verdict; arrows move between them. */
export function CornerPicker({ verdicts, corner, of, onCorner }: Props) {
  return (
    <fieldset className="min-w-0 text-xs">
      <legend className="text-ink-soft mb-1">Corner: {of.toLowerCase()}</legend>
      <div className="grid w-fit grid-cols-[auto_repeat(3,3.75rem)] gap-px">
        <span className="text-ink-soft self-end pr-2">
          driver ↓ <span className="sr-only">impedance across</span>
        </span>
        {SIDES.map((side) => (
          <span key={side} className="text-ink-soft pb-0.5 text-center">
            {side === "nominal" ? "nominal Z₀" : `${side} Z₀`}
          </span>
        ))}
        {SPEEDS.map((speed) => (
          <Row key={speed} speed={speed} {...{ verdicts, corner, onCorner }} />
        ))}
      </div>
    </fieldset>
  );
}

function Row({ speed, verdicts, corner, onCorner }: Omit<Props, "of"> & { speed: (typeof SPEEDS)[number] }) {
  return (
    <>
      <span className="text-ink-soft self-center pr-2">{speed}</span>
      {SIDES.map((side) => {
        const name: CornerName = `${speed}/${side}`;
        const verdict = verdicts.get(name) ?? "no data";
        return (
          <label
            key={side}
            className="border-rule-line has-checked:border-ink has-checked:bg-sheet has-focus-visible:outline-violet hover:bg-rule-line/40 flex h-7 cursor-pointer items-center justify-center gap-1 border has-checked:border-2 has-focus-visible:outline-2 has-focus-visible:outline-offset-2"
          >
            <input
              type="radio"
              name="corner"
              className="sr-only"
              checked={name === corner}
              onChange={() => onCorner(name)}
              aria-label={`${speed} driver, ${side} impedance: ${verdict}`}
            />
            <svg width="12" height="12" viewBox="0 0 12 12" aria-hidden="true" className={INK[verdict]}>
              <VerdictShape verdict={verdict} />
            </svg>
            <span className={INK[verdict]} aria-hidden="true">
              {verdict === "no data" ? "–" : verdict}
            </span>
          </label>
        );
      })}
    </>
  );
}
