"use client";

import { VerdictMark } from "@/components/ui/verdict-mark";
import type { Trial } from "@/lib/client/engine-impedance";
import type { LineShape, Outcome } from "@/lib/client/engine-line";
import type { SpreadFacts } from "@/lib/client/engine-spread";
import type { ResolvedLimit } from "@/lib/si/path/types";
import type { ImpedanceRow } from "./impedance-rows";
import { verdictsOf } from "./row-verdicts";
import { ohms, signedPercent, yieldPercent } from "./row-words";

interface Props {
  row: ImpedanceRow;
  shape: LineShape;
  trial: Trial | null;
  spread: Outcome<SpreadFacts> | null;
  limits: Readonly<Record<string, ResolvedLimit>>;
  error: string | null;
}

/** The number that is tried for, how far it is from the target, and how much of production meets it. */
export function TrialHead({ row, shape, trial, spread, limits, error }: Props) {
  const { target, tolerance, line } = row;
  const impedance = trial?.facts.ok ? trial.facts.value.impedance : null;
  const share = spread?.ok ? spread.value : null;
  const { centring, yielding } = verdictsOf(row, { impedance, ...shape, spread: share }, limits);
  const refusal = error ?? (trial && !trial.facts.ok ? trial.facts.reason : null);
  return (
    <>
      <div className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1" aria-live="polite">
        <p>
          <span className="text-xl font-semibold">{trial === null ? "…" : ohms(impedance)}</span>
          <span className="text-ink-soft">
            {"\u2009Ω"}
            {line === "differential" ? " differential" : ""}
          </span>
        </p>
        <p className="flex items-baseline gap-3 text-sm">
          {impedance === null ? null : (
            <span>
              {signedPercent((100 * (impedance - target)) / target)}
              <span className="text-ink-soft">
                {"\u2009%"} from {Number(target.toFixed(2))}
                {"\u2009Ω"}
              </span>
            </span>
          )}
          {centring ? <VerdictMark verdict={centring} /> : null}
        </p>
      </div>
      <p className="flex min-h-5 flex-wrap items-baseline justify-between gap-x-4 text-sm">
        <span className="text-ink-soft">2-D field solution</span>
        {share ? (
          <span className="flex items-baseline gap-3">
            <span>
              {yieldPercent(share.yield)}
              <span className="text-ink-soft">
                {"\u2009%"} of production within ±{tolerance}
                {"\u2009%"}
              </span>
            </span>
            {yielding ? <VerdictMark verdict={yielding} /> : null}
          </span>
        ) : null}
      </p>
      {refusal ? (
        <p role="alert" className="text-fail mt-1 text-sm">
          {refusal}
        </p>
      ) : null}
    </>
  );
}
