"use client";

import type { ReactNode } from "react";
import type { Trial } from "@/lib/client/engine-impedance";
import type { LineFacts } from "@/lib/client/engine-line";
import type { LengthUnit } from "@/lib/client/preferences";
import { signedPercent } from "./row-words";

/** Every number of the solved line, the published formula beside it. */
export function TrialNumbers({ trial, unit }: { trial: Trial | null; unit: LengthUnit }) {
  const facts = trial?.facts.ok ? trial.facts.value : null;
  return (
    <section aria-label="Numbers" className="mt-4">
      <dl className="border-rule-line grid gap-x-8 border-t text-sm min-[360px]:grid-cols-2">
        {(facts ? numbersOf(facts, unit) : WAITING).map(([name, value]) => (
          <div
            key={name}
            className="border-rule-line/60 flex items-baseline justify-between gap-2 border-b py-1"
          >
            <dt className="text-ink-soft text-xs">{name}</dt>
            <dd className="whitespace-nowrap">{value}</dd>
          </div>
        ))}
      </dl>
      {facts?.formula ? (
        <p className="text-ink-soft mt-2 text-xs">
          Formula: {facts.formula.title};{" "}
          <span className={facts.formula.inRange ? undefined : "text-near"}>
            {facts.formula.inRange ? "within" : "outside"} its range ({facts.formula.range}).
          </span>
        </p>
      ) : facts ? (
        <p className="text-ink-soft mt-2 text-xs">No published formula fits this section.</p>
      ) : null}
    </section>
  );
}

type Entry = readonly [name: string, value: ReactNode];

const WAITING: Entry[] = ["Impedance", "Effective Dk", "Delay"].map((name) => [name, "…"]);

function numbersOf(facts: LineFacts, unit: LengthUnit): Entry[] {
  const { mode, even, common, crosstalk, errorEstimate } = facts;
  const delay = (perMetre: number) => (
    <>
      {unit === "mm" ? (perMetre * 1e9).toFixed(3) : (perMetre * 25.4e9).toFixed(1)}
      <Soft>{unit === "mm" ? " ps/mm" : " ps/in"}</Soft>
    </>
  );
  const z = (value: number) => (
    <>
      {value.toFixed(2)}
      <Soft> Ω</Soft>
    </>
  );
  const error: Entry = [
    "Solution error",
    <>
      ±{Math.max(0.01, Math.ceil(1e4 * errorEstimate) / 100).toFixed(2)}
      <Soft> %</Soft>
    </>,
  ];
  const formula: Entry[] = facts.formula
    ? [
        ["Formula", z(facts.formula.ohms)],
        [
          "Its difference",
          <>
            {signedPercent((100 * (facts.formula.ohms - facts.impedance)) / facts.impedance)}
            <Soft> %</Soft>
          </>,
        ],
      ]
    : [];
  if (!even)
    return [
      ["Impedance", z(facts.impedance)],
      ["Effective Dk", mode.effectivePermittivity.toFixed(3)],
      ["Delay", delay(mode.delay)],
      error,
      ...formula,
    ];
  return [
    ["Differential", z(facts.impedance)],
    ["Common", common === null ? "–" : z(common)],
    ["Odd", z(mode.impedance)],
    ["Even", z(even.impedance)],
    ["Effective Dk, odd", mode.effectivePermittivity.toFixed(3)],
    ["Effective Dk, even", even.effectivePermittivity.toFixed(3)],
    ["Delay, odd", delay(mode.delay)],
    ["Delay, even", delay(even.delay)],
    ["Crosstalk, near end", crosstalk === null ? "–" : crosstalk.toFixed(4)],
    error,
    ...formula,
  ];
}

function Soft({ children }: { children: string }) {
  return <span className="text-ink-soft">{children.replace(" ", "\u2009")}</span>;
}
