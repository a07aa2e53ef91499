"use client";

import dynamic from "next/dynamic";
import { useCallback, useMemo } from "react";
import { PlaybackBar } from "@/components/charts/playback-bar";
import { type Engine, pageEngine } from "@/lib/client/engine";
import { topologyFromPath } from "@/lib/drawings/topology-from-path";
import type { ShownVerdict } from "@/lib/drawings/verdict-mark";
import { applyWhatIf, isChanged, whatIfStart } from "@/lib/resolve/what-if";
import { parseCorner } from "@/lib/si/rules/corners";
import type { Finding } from "@/lib/si/rules/types";
import { CornerPicker } from "./corner-picker";
import type { NetFacts } from "./facts";
import { FindingsTable } from "./findings-table";
import { NetHead } from "./net-head";
import { cornerVerdicts, inOrder, viewOf } from "./net-state";
import { NoData } from "./no-data";
import { ProblemList } from "./problem-list";
import { TargetNotice } from "./target-notice";
import { useCursor } from "./use-cursor";
import { useCursorKeys } from "./use-cursor-keys";
import { useNetAddress } from "./use-net-address";
import { usePictures } from "./use-pictures";
import { ViewControls } from "./view-controls";
import { Why } from "./why";

/** Drawn once its width is known; the cause above it is there at once. */
const TopologyStrip = dynamic(
  () => import("@/components/charts/topology-strip").then((module) => module.TopologyStrip),
  { ssr: false, loading: () => <div className="min-h-32" /> },
);

/** Comes with the first picture that the engine's thread has made; its place is kept. */
const Drawings = dynamic(() => import("./drawings").then((module) => module.Drawings), {
  ssr: false,
  loading: () => <div className="border-rule-line min-h-[48rem] border-t" />,
});

/** Comes after the drawings: it brings the units that people type in. Its place is kept. */
const WhatIfPanel = dynamic(() => import("./what-if-panel").then((module) => module.WhatIfPanel), {
  ssr: false,
  loading: () => <div className="border-rule-line min-h-72 border-t" />,
});

interface Props {
  facts: NetFacts;
  mayEdit: boolean;
  engine?: Engine;
}

/** One path: what it sees, which rule it breaks, which bounce does it, and what would help. */
export function NetPage({ facts, mayEdit, engine = pageEngine() }: Props) {
  const { path, rules } = facts;
  const { asked, change, chooseFinding, look, tryChange, reset } = useNetAddress();
  const drivers = useMemo(() => path.drivers.map((pin) => pin.pin), [path]);
  const listening = useMemo(() => path.receivers.map((pin) => pin.pin), [path]);
  const driver = viewOf(asked, facts.result, drivers, listening).driver;
  const changed = useMemo(() => applyWhatIf(path, driver, change), [path, driver, change]);
  const trying = isChanged(change);
  const blocked = missingOf(facts);

  const pictures = usePictures({
    engine,
    path,
    changed,
    trying,
    view: viewOf(asked, facts.result, drivers, listening),
    blocked: blocked.length > 0,
  });
  const result = (trying ? pictures.after : null) ?? facts.result;
  const view = viewOf(asked, result, drivers, listening);
  const receivers = useMemo(() => listening.filter((pin) => pin !== view.driver), [listening, view.driver]);
  const { control, harmTime } = useCursor(pictures.picture, view, asked.t, look);

  useCursorKeys(control);

  const waived = useMemo(
    () => new Set(facts.problems.filter((p) => p.waiver?.covers).map((p) => p.mechanism)),
    [facts.problems],
  );
  const findings = useMemo(() => inOrder(facts.result.findings), [facts.result]);
  const choose = useCallback(
    (rule: string) => {
      const found = result.findings.find((entry) => entry.rule === rule);
      if (found) chooseFinding(found);
    },
    [result, chooseFinding],
  );
  const topology = useMemo(
    () =>
      topologyFromPath(
        changed,
        view.driver,
        pinVerdicts(result.findings, receivers),
        parseCorner(view.corner),
      ),
    [changed, view.driver, view.corner, result, receivers],
  );
  const rule = rules.find((entry) => entry.id === view.finding?.rule) ?? null;
  const corners = useMemo(() => cornerVerdicts(result, rule?.id ?? null), [result, rule]);
  const start = useMemo(() => whatIfStart(path, view.driver), [path, view.driver]);

  return (
    <div className="flex min-w-0 flex-col gap-4">
      <NetHead
        facts={facts}
        driver={view.driver}
        receivers={receivers}
        waived={
          facts.problems.length > 0 && facts.problems.every((p) => p.verdict !== "fail" || p.waiver?.covers)
        }
      />
      {blocked.length > 0 ? (
        <NoData projectId={facts.projectId} missing={blocked} mayEdit={mayEdit} />
      ) : (
        <Why
          finding={view.finding}
          rule={rule}
          waived={waived.has(view.finding?.mechanism ?? "")}
          trying={trying}
        />
      )}
      <div className="flex flex-wrap items-start gap-x-6 gap-y-3">
        <div className="min-w-0 grow basis-96">
          <TopologyStrip
            topology={topology}
            title={`Topology of ${path.name}`}
            highlight={view.pin}
            onPick={(id) => receivers.includes(id) && look({ pin: id })}
          />
        </div>
        {blocked.length > 0 ? null : (
          <CornerPicker
            verdicts={corners.verdicts}
            of={corners.of === null ? "every rule" : (rule?.title ?? "every rule")}
            corner={view.corner}
            onCorner={(corner) => look({ corner })}
          />
        )}
      </div>
      {start ? <TargetNotice start={start} widths={facts.widths} target={path.target} /> : null}
      {blocked.length > 0 ? null : (
        <>
          <div className="bg-paper border-rule-line flex flex-wrap items-end gap-x-6 gap-y-2 border-y py-2">
            <ViewControls view={view} drivers={drivers} receivers={receivers} onLook={look} />
            <div className="min-w-0 grow basis-80">
              <PlaybackBar control={control} />
            </div>
          </div>
          <Drawings
            picture={pictures.picture}
            before={trying ? pictures.before : null}
            error={pictures.error}
            pin={view.pin}
            rule={view.finding?.rule ?? null}
            edge={view.edge}
            harmTime={harmTime}
            control={control}
            fileName={path.name}
            left={
              <FindingsTable
                findings={findings}
                after={trying ? (pictures.after?.findings ?? null) : null}
                {...{ rules, waived }}
                chosen={view.finding?.rule ?? null}
                onChoose={choose}
              />
            }
          />
          {start ? (
            <WhatIfPanel
              start={start}
              change={change}
              widths={facts.widths}
              onChange={tryChange}
              onReset={reset}
            />
          ) : null}
        </>
      )}
      <ProblemList facts={facts} onChoose={choose} />
    </div>
  );
}

/** What keeps the path from being drawn. */
function missingOf({ path, result }: NetFacts): { input: string; detail: string }[] {
  if (path.missing.length > 0) return path.missing;
  const refused = result.simulations === 0 ? result.findings.find((f) => f.counts && f.missing) : undefined;
  return refused?.missing ? [{ input: refused.missing, detail: refused.cause ?? "" }] : [];
}

function pinVerdicts(findings: readonly Finding[], receivers: readonly string[]): Map<string, ShownVerdict> {
  const rank = { fail: 0, near: 1, pass: 2, "no data": 3 } as const;
  const worst = new Map<string, ShownVerdict>();
  for (const pin of receivers) {
    const own = findings.filter((f) => f.counts && (f.pin === pin || receivers.length === 1));
    const [first] = own.sort((a, b) => rank[a.verdict] - rank[b.verdict]);
    if (first) worst.set(pin, first.verdict);
  }
  return worst;
}
