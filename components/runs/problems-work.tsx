"use client";

import { useRouter } from "next/navigation";
import { useMemo, useRef, useState } from "react";
import { Button } from "@/components/ui/button";
import { DataTable, type RowSelectionState } from "@/components/ui/data-table";
import { EmptyState } from "@/components/ui/empty-state";
import { Notice } from "@/components/ui/notice";
import { WithSidePanel } from "@/components/ui/side-panel";
import { TableSkeleton } from "@/components/ui/skeleton";
import { toast } from "@/components/ui/toast";
import { errorMessage } from "@/lib/client/api";
import { FlagDialog } from "./flag-dialog";
import { GroupList } from "./group-list";
import { KeysDialog } from "./keys-dialog";
import { pathAddress } from "./path-address";
import { narrowColumns, problemColumns, problemRowClass } from "./problem-columns";
import { filterProblems, type WorkedProblem } from "./problem-filter";
import { ProblemFilters } from "./problem-filters";
import { groupOf, groupProblems } from "./problem-groups";
import { ProblemPanel } from "./problem-panel";
import type { Rights } from "./rights";
import { counted } from "./run-words";
import { NO_FILTERS, useProblemParams } from "./use-problem-params";
import { useProblems } from "./use-problems";
import { useWork } from "./use-work";
import { useWorkKeys } from "./use-work-keys";
import { WaiveDialog } from "./waive-dialog";

interface Props {
  projectId: string;
  runId: string;
  rights: Rights;
}

type Act = { kind: "flag" | "waive"; problems: WorkedProblem[] };

/** What one may do at once; more than this is to be narrowed first. */
const MOST_AT_ONCE = 500;

/** The table that is worked: groups, filters, rows, the panel beside them, keys. */
export function ProblemsWork({ projectId, runId, rights }: Props) {
  const router = useRouter();
  const { rows, error, retry } = useProblems(projectId, runId);
  const { params, setParams, filter } = useProblemParams();
  const [selection, setSelection] = useState<RowSelectionState>({});
  const [act, setAct] = useState<Act | null>(null);
  const [help, setHelp] = useState(false);
  const searchRef = useRef<HTMLInputElement>(null);
  const work = useWork(projectId, runId);

  const left = useMemo(
    () => filterProblems(rows ?? [], filter, rights.userId),
    [rows, filter, rights.userId],
  );
  const groups = useMemo(() => groupProblems(left, params.group), [left, params.group]);
  const shown = useMemo(
    () =>
      params.in === null ? left : left.filter((problem) => groupOf(problem, params.group) === params.in),
    [left, params.in, params.group],
  );
  const at = useMemo(() => rows?.find((problem) => problem.key === params.at) ?? null, [rows, params.at]);
  const ticked = useMemo(() => shown.filter((problem) => selection[problem.key]), [shown, selection]);

  const [column, direction] = params.sort?.split(" ") ?? [];
  const sorting = useMemo(
    () => (column ? [{ id: column, desc: direction === "down" }] : []),
    [column, direction],
  );

  function begin(kind: Act["kind"], problems: WorkedProblem[]) {
    if (problems.length === 0)
      return void toast.error("No problem is selected. Choose one with j and k, or tick some with x.");
    if (problems.length > MOST_AT_ONCE)
      return void toast.error(
        `${problems.length.toLocaleString("en")} problems are selected. Narrow them to ${MOST_AT_ONCE} at a time.`,
      );
    if (kind === "waive" && !rights.waive)
      return void toast.error(
        "Waivers are a reviewer's to give. Flag the problem and say why it is acceptable.",
      );
    if (kind === "flag" && !rights.flag) return;
    work.forget();
    setAct({ kind, problems });
  }
  const chosen = () => (ticked.length > 0 ? ticked : at ? [at] : []);

  useWorkKeys({
    open: () => at && router.push(pathAddress(projectId, runId, at.pathId)),
    flag: () => begin("flag", chosen()),
    waive: () => begin("waive", chosen()),
    tick: () => at && setSelection((now) => toggled(now, at.key)),
    search: () => searchRef.current?.focus(),
    help: () => setHelp(true),
    close: () => void setParams({ at: null }),
  });

  if (error)
    return (
      <Notice tone="refusal" actions={<Button onClick={retry}>Try again</Button>}>
        {errorMessage(error)}
      </Notice>
    );
  if (!rows) return <TableSkeleton rows={12} label="Loading the problems" />;
  if (rows.length === 0)
    return (
      <EmptyState title="No problem was found">
        Every path in scope passes every rule at every corner, with more margin than the near band. What is
        out of scope or not fully routed was not judged: the counts above say how many nets that is.
      </EmptyState>
    );

  return (
    <>
      <ProblemFilters problems={rows} params={params} setParams={setParams} searchRef={searchRef} />
      <WithSidePanel
        panel={
          at ? (
            <ProblemPanel
              key={at.key}
              projectId={projectId}
              runId={runId}
              problem={at}
              rights={rights}
              onClose={() => void setParams({ at: null })}
              onFlag={() => begin("flag", [at])}
              onWaive={() => begin("waive", [at])}
            />
          ) : null
        }
      >
        <GroupList
          groups={groups}
          open={params.in}
          onOpen={(key) => void setParams({ in: key })}
          onMember={(problem) => void setParams({ at: problem.key })}
        />
        <div
          className="mb-2 flex min-h-8 flex-wrap items-center gap-2 text-sm print:hidden"
          aria-live="polite"
        >
          <span className="text-ink-soft">
            {ticked.length > 0
              ? `${counted(ticked.length, "problem")} selected`
              : shown.length === rows.length
                ? counted(rows.length, "problem")
                : `${shown.length.toLocaleString("en")} of ${counted(rows.length, "problem")}`}
          </span>
          {ticked.length > 0 ? (
            <>
              {rights.flag ? <Button onClick={() => begin("flag", ticked)}>Flag or assign</Button> : null}
              {rights.waive ? <Button onClick={() => begin("waive", ticked)}>Waive</Button> : null}
              <Button variant="quiet" onClick={() => setSelection({})}>
                Select none
              </Button>
            </>
          ) : null}
          <Button variant="quiet" className="ml-auto max-md:hidden" onClick={() => setHelp(true)}>
            Keys <kbd className="border-field-line rounded border px-1 font-mono text-xs">?</kbd>
          </Button>
        </div>
        <DataTable
          label="Problems, worst first"
          keys="page"
          rows={shown}
          columns={at ? narrowColumns : problemColumns}
          rowId={rowId}
          activeId={params.at}
          onActiveChange={(id) => void setParams({ at: id })}
          sorting={sorting}
          onSortingChange={([sort]) =>
            void setParams({ sort: sort ? `${sort.id}${sort.desc ? " down" : ""}` : null })
          }
          selection={selection}
          onSelectionChange={setSelection}
          rowClassName={problemRowClass}
          empty={
            <span className="flex items-center gap-3">
              No problem fits these filters.
              <Button onClick={() => void setParams(NO_FILTERS)}>Show all</Button>
            </span>
          }
        />
      </WithSidePanel>
      {act?.kind === "flag" ? (
        <FlagDialog projectId={projectId} problems={act.problems} work={work} onClose={() => setAct(null)} />
      ) : null}
      {act?.kind === "waive" ? (
        <WaiveDialog problems={act.problems} work={work} onClose={() => setAct(null)} />
      ) : null}
      <KeysDialog open={help} onOpenChange={setHelp} />
    </>
  );
}

const rowId = (problem: WorkedProblem) => problem.key;

function toggled(selection: RowSelectionState, key: string): RowSelectionState {
  const { [key]: was, ...others } = selection;
  return was ? others : { ...others, [key]: true };
}
