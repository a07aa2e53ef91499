"use client";

import { MarginHistogram } from "@/components/charts/margin-histogram";
import { cn } from "@/components/ui/class-names";
import { VerdictMark } from "@/components/ui/verdict-mark";
import { measureText } from "./measure";
import type { WorkedProblem } from "./problem-filter";
import type { ProblemGroup } from "./problem-groups";
import { ruleTitle } from "./rule-title";
import { counted } from "./run-words";

interface Props {
  groups: readonly ProblemGroup[];
  /** the group whose members are listed below */
  open: string | null;
  onOpen: (key: string | null) => void;
  onMember: (problem: WorkedProblem) => void;
}

/** Groups of problems: how many, how their margins are spread, the worst member and the one in the middle. */
export function GroupList({ groups, open, onOpen, onMember }: Props) {
  if (groups.length === 0) return null;
  return (
    <ul
      aria-label="Groups of problems"
      className="border-rule-line bg-sheet mb-4 max-h-64 overflow-y-auto border-y print:max-h-none"
    >
      {groups.map((group) => (
        <li
          key={group.key}
          className={cn(
            "border-rule-line/60 grid items-center gap-x-4 gap-y-1 border-b px-2 py-1.5 last:border-b-0 md:grid-cols-[minmax(0,1fr)_auto] xl:grid-cols-[minmax(0,1.3fr)_minmax(0,1fr)_220px]",
            group.key === open && "bg-copper/10",
          )}
        >
          <button
            type="button"
            aria-pressed={group.key === open}
            onClick={() => onOpen(group.key === open ? null : group.key)}
            className="min-w-0 text-left -outline-offset-2 hover:underline"
          >
            <span className="block truncate text-sm font-medium">{group.title}</span>
            <span className="text-ink-soft flex flex-wrap gap-x-3 text-xs">
              {counted(group.count, "problem")}
              {group.fail > 0 ? <VerdictMark verdict="fail" count={group.fail} /> : null}
              {group.near > 0 ? <VerdictMark verdict="near" count={group.near} /> : null}
              {group.noData > 0 ? <VerdictMark verdict="no data" count={group.noData} /> : null}
            </span>
          </button>
          <div className="text-ink-soft flex min-w-0 flex-col gap-0.5 text-xs max-xl:hidden">
            <Member name="worst" problem={group.worst} onMember={onMember} />
            {group.typical !== group.worst ? (
              <Member name="typical" problem={group.typical} onMember={onMember} />
            ) : null}
          </div>
          {group.margins.length > 1 ? (
            <MarginHistogram
              margins={group.margins}
              width={220}
              height={52}
              unit="%"
              near={Number.POSITIVE_INFINITY}
              title={`Margins of ${group.title}, as a share of the limit`}
            />
          ) : null}
        </li>
      ))}
    </ul>
  );
}

function Member({
  name,
  problem,
  onMember,
}: {
  name: string;
  problem: WorkedProblem | null;
  onMember: (problem: WorkedProblem) => void;
}) {
  if (!problem) return null;
  return (
    <span className="flex min-w-0 items-baseline gap-1.5">
      <span className="w-12 shrink-0">{name}</span>
      <button
        type="button"
        onClick={() => onMember(problem)}
        className="text-ink min-h-6 max-w-36 shrink-0 truncate font-mono hover:underline"
      >
        {problem.path}
      </button>
      <span className="min-w-0 truncate">
        {measureText(problem.margin, problem.unit, { signed: true })} {ruleTitle(problem.rule).toLowerCase()}
      </span>
    </span>
  );
}
