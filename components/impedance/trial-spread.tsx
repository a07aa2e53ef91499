"use client";

import type { Outcome } from "@/lib/client/engine-line";
import type { SpreadFacts } from "@/lib/client/engine-spread";
import { SpreadHistogram } from "@/components/charts/spread-histogram";
import { ToleranceBars } from "@/components/charts/tolerance-bars";
import { Skeleton } from "@/components/ui/skeleton";
import { spreadHistogram, histogramRows } from "@/lib/drawings/spread-histogram.geometry";
import { toleranceBars, toleranceRows } from "@/lib/drawings/tolerance-bars.geometry";
import type { ImpedanceRow } from "./impedance-rows";
import { ohms } from "./row-words";
import { Saved } from "./saved";

interface Props {
  row: ImpedanceRow;
  spread: Outcome<SpreadFacts> | null;
  error: string | null;
}

const HEIGHT = 150;

/** How production is predicted to spread, and which tolerance makes most of it. */
export function TrialSpread({ row, spread, error }: Props) {
  const refusal = error ?? (spread && !spread.ok ? spread.reason : null);
  const facts = spread?.ok ? spread.value : null;
  const target = { ohms: row.target, tolerance: row.tolerance / 100 };
  const name = `${row.netClass.name} on ${row.layer.name}`;
  return (
    <section aria-label="Spread" className="mt-5">
      <h3 className="mb-1 text-sm font-semibold">How production spreads</h3>
      {refusal ? (
        <p className="text-ink-soft text-sm">{refusal}</p>
      ) : facts ? (
        <>
          <SpreadHistogram
            bins={facts.histogram}
            height={HEIGHT}
            target={target}
            low={facts.low}
            high={facts.high}
          />
          <Saved
            words={`99 % between ${ohms(facts.low)} and ${ohms(facts.high)}\u2009Ω; ${facts.method}.`}
            fileName={`${name} spread`}
            drawing={() => spreadHistogram(facts.histogram, { width: 640, height: 220, target, ...facts })}
            rows={() => histogramRows(facts.histogram)}
          />
          <h3 className="mt-3 mb-1 text-sm font-semibold">Which tolerance matters most</h3>
          <ToleranceBars shares={facts.sensitivities} />
          <Saved
            words="Each within its tolerance, the others held; shares are of the variance."
            fileName={`${name} tolerances`}
            drawing={() => toleranceBars(facts.sensitivities, { width: 640 })}
            rows={() => toleranceRows(facts.sensitivities)}
          />
        </>
      ) : (
        <div style={{ height: HEIGHT }}>
          <Skeleton className="h-full w-full" />
        </div>
      )}
    </section>
  );
}
