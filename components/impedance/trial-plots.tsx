"use client";

import type { LossFacts } from "@/lib/client/engine-loss";
import type { Outcome } from "@/lib/client/engine-line";
import { quantityText } from "@/lib/drawings/number-text";
import { LossFrequency } from "@/components/charts/loss-frequency";
import { type Ref, useMemo } from "react";
import { ImpedanceWidth } from "@/components/charts/impedance-width";
import { Skeleton } from "@/components/ui/skeleton";
import type { BandPoint } from "@/lib/client/engine-spread";
import type { CurvePoint } from "@/lib/client/engine-impedance";
import type { LengthUnit } from "@/lib/client/preferences";
import { curveRows, impedanceWidth, type WidthPoint } from "@/lib/drawings/impedance-width.geometry";
import { lossFrequency, lossRows } from "@/lib/drawings/loss-frequency.geometry";
import type { Capability } from "@/lib/si/stackup";
import type { ImpedanceRow } from "./impedance-rows";
import { Saved } from "./saved";

interface Props {
  ref: Ref<HTMLElement>;
  row: ImpedanceRow;
  unit: LengthUnit;
  /** [m] */
  grid: number;
  /** [m] */
  chosen: number;
  points: CurvePoint[] | null;
  /** how production spreads along it */
  band: BandPoint[] | null;
  least: Capability | null;
}

const HEIGHT = 230;

/** Impedance against width, with what is wanted and what can be etched. */
export function WidthPlot({ ref, row, unit, grid, chosen, points, band, least }: Props) {
  const spread = useMemo(() => points && withSpread(points, band ?? []), [points, band]);
  const target = { ohms: row.target, tolerance: row.tolerance / 100 };
  const options = { unit, target, chosen, grid, least: least?.minWidth ?? null };
  return (
    <section ref={ref} aria-label="Impedance against width" className="mt-5">
      <h3 className="mb-1 text-sm font-semibold">Impedance against width</h3>
      {spread ? (
        <>
          <ImpedanceWidth points={spread} height={HEIGHT} {...options} />
          <Saved
            words={band ? "The band holds 99\u2009% of production at each width." : undefined}
            fileName={`${row.netClass.name} on ${row.layer.name} width`}
            drawing={() => impedanceWidth(spread, { width: 720, height: 340, ...options })}
            rows={() => curveRows(spread, unit)}
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

/** The curve with the spread between the widths at which it was computed, straight in their logarithm. */
function withSpread(points: readonly CurvePoint[], band: readonly BandPoint[]): WidthPoint[] {
  return points.map((point) => {
    const after = band.findIndex(({ width }) => width >= point.width * (1 - 1e-9));
    const [a, b] = [band[Math.max(after - 1, 0)], band[after]];
    if (!a || !b) return point;
    const part = a === b ? 0 : Math.log(point.width / a.width) / Math.log(b.width / a.width);
    return {
      ...point,
      low: point.impedance * (a.low + part * (b.low - a.low)),
      high: point.impedance * (a.high + part * (b.high - a.high)),
    };
  });
}

interface LossProps {
  ref: Ref<HTMLElement>;
  row: ImpedanceRow;
  unit: LengthUnit;
  loss: Outcome<LossFacts> | null;
  error: string | null;
}

/** Loss per length against frequency: what the copper takes, what the dielectric. */
export function LossPlot({ ref, row, unit, loss, error }: LossProps) {
  const refusal = error ?? (loss && !loss.ok ? loss.reason : null);
  const facts = loss?.ok ? loss.value : null;
  return (
    <section ref={ref} aria-label="Loss against frequency" className="mt-5">
      <h3 className="mb-1 text-sm font-semibold">
        Loss against frequency{row.line === "differential" ? ", odd mode" : ""}
      </h3>
      {refusal ? (
        <p className="text-ink-soft text-sm">{refusal}</p>
      ) : facts ? (
        <>
          <LossFrequency
            points={facts.points}
            height={HEIGHT}
            unit={unit}
            dispersionFrom={facts.dispersionFrom}
          />
          <Saved
            words={lossWords(facts)}
            fileName={`${row.netClass.name} on ${row.layer.name} loss`}
            drawing={() =>
              lossFrequency(facts.points, {
                width: 720,
                height: 340,
                unit,
                dispersionFrom: facts.dispersionFrom,
              })
            }
            rows={() => lossRows(facts.points, unit)}
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

function lossWords({ roughness, losslessTaken, dispersionFrom, disperses }: LossFacts): string {
  return [
    roughness
      ? `Copper of ${Number((roughness * 1e6).toFixed(2))}\u2009µm rms, by Hammerstad’s groove model.`
      : "No roughness is given for this layer: smooth copper taken.",
    losslessTaken ? "A dielectric without Df is taken as lossless." : "",
    !disperses
      ? ""
      : dispersionFrom === null
        ? "The effective Dk stays within 2\u2009% of its static value up to 20\u2009GHz (Kirschning–Jansen)."
        : `From ${quantityText(dispersionFrom, "Hz")} on the effective Dk lies more than 2\u2009% above its static value (Kirschning–Jansen): impedance and delay move by 1\u2009%.`,
  ]
    .filter((words) => words !== "")
    .join(" ");
}
