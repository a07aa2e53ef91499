import { VerdictMark } from "@/components/ui/verdict-mark";
import type { ValidationChapter, ValidationCompared } from "@/lib/schemas/validation";
import { ErrorStrip } from "./error-strip";
import { errorText } from "./error-strip.geometry";

const CELL = "border-rule-line border-b px-2 py-1.5 text-left font-normal";
const NUMBER = `${CELL} text-right tabular-nums whitespace-nowrap`;

/** One kind of comparison: a row for each group, and below them every case. */
export function Chapter({ chapter }: { chapter: ValidationChapter }) {
  const judged = chapter.groups.some(({ allowed }) => allowed !== null);
  const values = chapter.groups.reduce((sum, group) => sum + group.values, 0);
  return (
    <section aria-labelledby={chapter.id} className="flex flex-col gap-3">
      <h2 id={chapter.id} className="text-lg font-semibold">
        {chapter.title}
      </h2>
      <p className="text-ink-soft max-w-prose text-sm">{chapter.about}</p>
      <p className="text-ink-soft max-w-prose text-sm">
        <span className="text-ink">Source:</span> {chapter.source} {values.toLocaleString("en")} numbers.
      </p>
      <div
        className="bg-sheet border-rule-line overflow-x-auto border-t"
        tabIndex={0}
        role="region"
        aria-labelledby={chapter.id}
      >
        <table className="w-full border-separate border-spacing-0 text-sm">
          <thead>
            <tr className="text-ink-soft">
              <th scope="col" className={CELL}>
                Group
              </th>
              <th scope="col" className={NUMBER}>
                Cases
              </th>
              <th scope="col" className={NUMBER}>
                Numbers
              </th>
              <th scope="col" className={NUMBER}>
                Median error
              </th>
              <th scope="col" className={NUMBER}>
                Worst
              </th>
              {judged ? (
                <>
                  <th scope="col" className={NUMBER}>
                    Allowed
                  </th>
                  <th scope="col" className={CELL}>
                    Verdict
                  </th>
                </>
              ) : null}
              <th scope="col" className={CELL}>
                Each case, 10⁻¹⁰ to 1
              </th>
            </tr>
          </thead>
          <tbody>
            {chapter.groups.map((group) => (
              <tr key={group.title}>
                <th scope="row" className={CELL}>
                  {group.title}
                </th>
                <td className={NUMBER}>{group.cases.length}</td>
                <td className={NUMBER}>{group.values}</td>
                <td className={NUMBER}>{errorText(group.median)}</td>
                <td className={NUMBER}>{errorText(group.worst)}</td>
                {judged ? (
                  <>
                    <td className={NUMBER}>{group.allowed === null ? "–" : errorText(group.allowed)}</td>
                    <td className={CELL}>
                      {group.allowed === null ? null : (
                        <VerdictMark verdict={group.worst <= group.allowed ? "pass" : "fail"} />
                      )}
                    </td>
                  </>
                ) : null}
                <td className={CELL}>
                  <ErrorStrip group={group} />
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <details className="text-sm">
        <summary className="prose-link w-fit cursor-pointer">Every case with its worst number</summary>
        <CaseTable chapter={chapter} />
      </details>
    </section>
  );
}

function CaseTable({ chapter }: { chapter: ValidationChapter }) {
  return (
    <div
      className="mt-2 overflow-x-auto"
      tabIndex={0}
      role="region"
      aria-label={`${chapter.title}, every case`}
    >
      <table className="w-full border-separate border-spacing-0 text-sm">
        <thead>
          <tr className="text-ink-soft">
            {["Case", "Group", "Worst number"].map((title) => (
              <th key={title} scope="col" className={CELL}>
                {title}
              </th>
            ))}
            {["Reference", "Engine", "Error"].map((title) => (
              <th key={title} scope="col" className={NUMBER}>
                {title}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {chapter.groups.flatMap((group) =>
            group.cases.map(({ id, worst }) => (
              <tr key={`${group.title} ${id}`}>
                <th scope="row" className={`${CELL} font-mono text-xs`}>
                  {id}
                </th>
                <td className={CELL}>{group.title}</td>
                <td className={CELL}>{worst.quantity}</td>
                <td className={NUMBER}>{numberOf(worst.reference, worst)}</td>
                <td className={NUMBER}>{numberOf(worst.engine, worst)}</td>
                <td className={NUMBER}>{errorText(worst.error)}</td>
              </tr>
            )),
          )}
        </tbody>
      </table>
    </div>
  );
}

/** Matrix entries per metre are shown in pF/m and nH/m. */
const SHOWN: Record<string, { factor: number; unit: string }> = {
  "F/m": { factor: 1e12, unit: "pF/m" },
  "H/m": { factor: 1e9, unit: "nH/m" },
};

function numberOf(value: number | null, { unit }: ValidationCompared): string {
  if (value === null) return "–";
  const shown = SHOWN[unit] ?? { factor: 1, unit };
  const digits = Number((value * shown.factor).toPrecision(6));
  return shown.unit === "" ? String(digits) : `${digits}\u2009${shown.unit}`;
}
