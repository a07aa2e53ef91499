import Link from "next/link";
import { cn } from "@/components/ui/class-names";
import { VerdictShape } from "@/components/ui/verdict-mark";
import { measureText } from "@/components/runs/measure";
import { narrowedRun } from "@/components/runs/path-address";
import { NO_CLASS } from "@/components/runs/problem-filter";
import { ruleTitle } from "@/components/runs/rule-title";
import type { MatrixCell } from "@/lib/client/runs";
import { ruleCatalogue } from "@/lib/si/rules";

interface Props {
  projectId: string;
  runId: string;
  cells: readonly MatrixCell[];
}

/** Class × rule: paths that fail, are near, lack data, and the worst margin; each cell opens its problems. */
export function ClassMatrix({ projectId, runId, cells }: Props) {
  const { classes, rules, cellOf } = arrange(cells);
  if (classes.length === 0)
    return (
      <p className="text-ink-soft text-sm">
        Nothing fails, is near or lacks data: every path in scope passes every rule with margin to spare.
      </p>
    );
  return (
    <div className="border-rule-line bg-sheet relative overflow-x-auto border-y">
      <table className="w-full border-separate border-spacing-0 text-sm" aria-label="Class by rule">
        <thead>
          <tr>
            <th
              scope="col"
              className="border-field-line bg-sheet text-ink-soft sticky left-0 z-10 border-b px-2 py-1 text-left align-bottom font-medium"
            >
              Class
            </th>
            {rules.map((rule) => (
              <th
                key={rule}
                scope="col"
                className="border-field-line text-ink-soft min-w-24 border-b px-2 py-1 text-left align-bottom font-medium"
              >
                {ruleTitle(rule)}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {classes.map((name) => (
            <tr key={name}>
              <th
                scope="row"
                className="border-rule-line/60 bg-sheet sticky left-0 z-10 border-b px-2 py-1.5 text-left font-medium whitespace-nowrap"
              >
                <Link className="hover:underline" href={narrowedRun(projectId, runId, { class: name })}>
                  {name}
                </Link>
              </th>
              {rules.map((rule) => {
                const cell = cellOf(name, rule);
                return (
                  <td
                    key={rule}
                    className={cn(
                      "border-rule-line/60 border-b border-l p-0 align-top",
                      cell && cell.fail > 0 && "bg-fail/8",
                    )}
                  >
                    {cell ? (
                      <Link
                        href={narrowedRun(projectId, runId, { class: name, rule })}
                        aria-label={cellLabel(cell)}
                        className="hover:bg-rule-line/40 block min-h-12 px-2 py-1.5 -outline-offset-2"
                      >
                        <span className="flex flex-wrap gap-x-3" aria-hidden="true">
                          <Count verdict="fail" count={cell.fail} />
                          <Count verdict="near" count={cell.near} />
                          <Count verdict="no data" count={cell.noData} />
                        </span>
                        {cell.worstMargin === null ? null : (
                          <span className="text-ink-soft block text-xs whitespace-nowrap" aria-hidden="true">
                            {measureText(cell.worstMargin, cell.unit, { signed: true })}
                          </span>
                        )}
                      </Link>
                    ) : (
                      <span className="text-ink-soft block px-2 py-1.5" aria-label="nothing to report">
                        ·
                      </span>
                    )}
                  </td>
                );
              })}
            </tr>
          ))}
        </tbody>
      </table>
      <p className="text-ink-soft flex flex-wrap gap-x-4 gap-y-1 px-2 py-2 text-xs">
        <Key verdict="fail" /> <Key verdict="near" /> <Key verdict="no data" />
        <span>second line: worst margin</span>
        <span>· nothing to report</span>
      </p>
    </div>
  );
}

type Counted = "fail" | "near" | "no data";
const INKS: Record<Counted, string> = { fail: "text-fail", near: "text-near", "no data": "text-ink-soft" };

function Shape({ verdict }: { verdict: Counted }) {
  return (
    <svg width="11" height="11" viewBox="0 0 12 12" aria-hidden="true" className="shrink-0">
      <VerdictShape verdict={verdict} />
    </svg>
  );
}

function Count({ verdict, count }: { verdict: Counted; count: number }) {
  if (count === 0) return null;
  return (
    <span className={cn("inline-flex items-center gap-1 font-medium", INKS[verdict])}>
      <Shape verdict={verdict} />
      {count.toLocaleString("en")}
    </span>
  );
}

function Key({ verdict }: { verdict: Counted }) {
  return (
    <span className={cn("inline-flex items-center gap-1", INKS[verdict])}>
      <Shape verdict={verdict} /> paths {verdict === "fail" ? "failing" : verdict}
    </span>
  );
}

function cellLabel(cell: MatrixCell): string {
  const counts = `${cell.fail} failing, ${cell.near} near, ${cell.noData} no data`;
  const worst =
    cell.worstMargin === null
      ? ""
      : `, worst margin ${measureText(cell.worstMargin, cell.unit, { signed: true })}`;
  return `${cell.className ?? NO_CLASS}, ${ruleTitle(cell.rule)}: ${counts}${worst}`;
}

function arrange(cells: readonly MatrixCell[]) {
  const told = cells.filter((cell) => cell.fail + cell.near + cell.noData > 0);
  const classes = [...new Set(told.map((cell) => cell.className ?? NO_CLASS))];
  const failing = (name: string) =>
    told.filter((cell) => (cell.className ?? NO_CLASS) === name).reduce((sum, cell) => sum + cell.fail, 0);
  classes.sort((a, b) => failing(b) - failing(a) || a.localeCompare(b, "en", { numeric: true }));
  const order = new Map(ruleCatalogue.map((rule, index) => [rule.id, index]));
  const place = (rule: string) => order.get(rule) ?? order.size;
  const rules = [...new Set(told.map((cell) => cell.rule))].sort((a, b) => place(a) - place(b));
  const byKey = new Map(told.map((cell) => [`${cell.className ?? NO_CLASS}\n${cell.rule}`, cell]));
  return { classes, rules, cellOf: (name: string, rule: string) => byKey.get(`${name}\n${rule}`) };
}
