"use client";

import { useCallback, useState } from "react";
import { Button } from "@/components/ui/button";
import { Select } from "@/components/ui/select";
import { useLengthUnit } from "@/components/shell/length-unit";
import { ohmsText } from "@/lib/drawings/number-text";
import { impedanceOfWidth, type WidthPoint, widthOfImpedance } from "@/lib/resolve/width-points";
import type { WhatIf, WhatIfStart } from "@/lib/resolve/what-if";
import { eSeriesBetween } from "@/lib/si/units";
import { RefusedContext, WhatIfField } from "./what-if-field";

interface Props {
  start: WhatIfStart;
  change: WhatIf;
  widths: readonly WidthPoint[];
  onChange: (change: Partial<WhatIf>) => void;
  onReset: () => void;
}

const SERIES_OHMS = [0, ...eSeriesBetween(10, 240, "E24")];
const END_OHMS = [...eSeriesBetween(22, 1000, "E24")];
const DRIVER_OHMS = Array.from({ length: 120 }, (_, i) => i + 1);
const LENGTHS = Array.from({ length: 59 }, (_, i) => (10 + 5 * i) / 100);
const FARADS = Array.from({ length: 61 }, (_, i) => i * 0.5e-12);

/** Values of one path to try, each simulated as it moves; nothing is written to the draft. */
export function WhatIfPanel({ start, change, widths, onChange, onReset }: Props) {
  const changed = Object.entries(change).some(([key, value]) => key !== "endTo" && value !== null);
  const length = start.length * (change.lengthScale ?? 1);
  const { unit } = useLengthUnit();
  const [refused, setRefused] = useState<ReadonlySet<string>>(new Set());
  const [epoch, setEpoch] = useState(0);
  const onRefused = useCallback((label: string, now: boolean) => {
    setRefused((present) => {
      if (present.has(label) === now) return present;
      const next = new Set(present);
      if (now) next.add(label);
      else next.delete(label);
      return next;
    });
  }, []);
  /** The fields begin anew: texts that were out of range go with the changes. */
  function reset(): void {
    setRefused(new Set());
    setEpoch((present) => present + 1);
    onReset();
  }
  return (
    <section aria-labelledby="what-if" className="border-rule-line border-t pt-3 print:hidden">
      <div className="mb-2 flex flex-wrap items-baseline gap-x-4 gap-y-1">
        <h2 id="what-if" className="text-base font-semibold">
          Try a change
        </h2>
        <p className="text-ink-soft text-xs">
          Simulated as it moves, at every corner, by the engine of the check. Nothing is written to the draft.
        </p>
        <Button className="ml-auto" disabled={!changed && refused.size === 0} onClick={reset}>
          Put all back
        </Button>
      </div>
      <RefusedContext value={onRefused}>
        <div key={epoch} className="grid gap-x-6 gap-y-3 sm:grid-cols-2 lg:grid-cols-4">
          <WhatIfField
            label={
              start.seriesReference
                ? `Series resistor ${start.seriesReference}`
                : "Series resistor at the driver"
            }
            dimension="resistance"
            unit="Ω"
            value={change.seriesOhms ?? start.seriesOhms}
            start={start.seriesOhms}
            changed={change.seriesOhms !== null}
            steps={SERIES_OHMS}
            least={0}
            most={10_000}
            hint="steps of E24"
            onChange={(seriesOhms) => onChange({ seriesOhms })}
          />
          <WhatIfField
            label="Driver, typical"
            dimension="resistance"
            unit="Ω"
            value={change.driverOhms ?? start.driverOhms}
            start={start.driverOhms}
            changed={change.driverOhms !== null}
            steps={DRIVER_OHMS}
            least={0.1}
            most={10_000}
            onChange={(driverOhms) => onChange({ driverOhms })}
          />
          <WhatIfField
            label="Rise time 10–90 %, typical"
            dimension="time"
            unit={start.riseTime < 1e-9 ? "ps" : "ns"}
            value={change.riseTime ?? start.riseTime}
            start={start.riseTime}
            changed={change.riseTime !== null}
            steps={around(start.riseTime)}
            least={1e-12}
            most={1e-6}
            onChange={(riseTime) => onChange({ riseTime })}
          />
          <WhatIfField
            label="Length, all sections"
            dimension="length"
            unit={unit}
            value={length}
            start={start.length}
            changed={change.lengthScale !== null}
            steps={LENGTHS.map((factor) => factor * start.length)}
            least={start.length * 0.01}
            most={start.length * 10}
            onChange={(to) => onChange({ lengthScale: to === null ? null : to / start.length })}
          />
          <LineField {...{ start, change, widths, onChange }} />
          <WhatIfField
            label="Receiver capacitance, typical"
            dimension="capacitance"
            unit="pF"
            value={change.capacitance ?? start.capacitance}
            start={start.capacitance}
            changed={change.capacitance !== null}
            steps={FARADS}
            least={0}
            most={1e-9}
            onChange={(capacitance) => onChange({ capacitance })}
          />
          {start.farPin ? (
            <>
              <EndField {...{ start, change, onChange }} />
              <Select
                label="It goes to"
                value={change.endTo}
                disabled={change.endOhms === null}
                options={[
                  { value: "half", label: "half the supply" },
                  { value: "ground", label: "ground" },
                ]}
                onChange={(event) => onChange({ endTo: event.target.value === "ground" ? "ground" : "half" })}
              />
            </>
          ) : null}
        </div>
      </RefusedContext>
    </section>
  );
}

type Part = Pick<Props, "start" | "change" | "onChange">;

/** By width where a formula speaks of the layer, else by impedance. */
function LineField({ start, change, widths, onChange }: Part & Pick<Props, "widths">) {
  const { unit } = useLengthUnit();
  const own = impedanceOfWidth(widths, start.mainWidth);
  const ohms = change.impedance ?? start.impedance;
  const width = own === null ? null : widthOfImpedance(widths, (ohms / start.impedance) * own);
  const [first, last] = [widths[0], widths[widths.length - 1]];
  if (own === null || width === null || !first || !last)
    return (
      <WhatIfField
        label="Line impedance"
        dimension="resistance"
        unit="Ω"
        value={ohms}
        start={start.impedance}
        changed={change.impedance !== null}
        steps={DRIVER_OHMS.filter((value) => value >= 20)}
        least={5}
        most={500}
        onChange={(impedance) => onChange({ impedance })}
      />
    );
  return (
    <WhatIfField
      label={`Width on ${start.mainLayer}`}
      dimension="length"
      unit={unit}
      value={width}
      start={start.mainWidth}
      changed={change.impedance !== null}
      steps={widths.map((point) => point.width)}
      least={first.width}
      most={last.width}
      hint={
        start.atTarget
          ? `gives ${ohmsText((ohms / start.impedance) * own)}; judged at ${change.impedance === null ? `the class target, ${ohmsText(ohms)}` : `${ohmsText(ohms)}, from the class target in proportion`}`
          : `gives ${ohmsText(ohms)}`
      }
      onChange={(to) => {
        const gives = to === null ? null : impedanceOfWidth(widths, to);
        onChange({ impedance: gives === null ? null : (gives / own) * start.impedance });
      }}
    />
  );
}

function EndField({ start, change, onChange }: Part) {
  return change.endOhms === null ? (
    <div className="flex min-w-0 flex-col gap-1">
      <span className="text-sm font-medium">End resistor at {start.farPin}</span>
      <Button
        className="w-fit"
        onClick={() => onChange({ endOhms: END_OHMS.find((v) => v >= start.impedance) ?? 51 })}
      >
        Put one in
      </Button>
      <p className="text-ink-soft text-xs">none now</p>
    </div>
  ) : (
    <WhatIfField
      label={`End resistor at ${start.farPin}`}
      dimension="resistance"
      unit="Ω"
      value={change.endOhms}
      start={null}
      changed
      steps={END_OHMS}
      least={1}
      most={100_000}
      hint="steps of E24"
      onChange={(endOhms) => onChange({ endOhms })}
    />
  );
}

/** From a fifth of a value to five times it, each step a 24th of a decade. */
function around(value: number): number[] {
  return Array.from({ length: 35 }, (_, i) => value * 10 ** ((i - 17) / 24));
}
