import { TimeText } from "@/components/shell/time-text";
import type { ProjectOverview } from "@/lib/schemas/project-overview";

/** Who changed what in this revision lately. */
export function LatestEdits({ edits }: { edits: ProjectOverview["edits"] }) {
  return (
    <section aria-labelledby="edits">
      <h2 id="edits" className="mb-2 text-lg font-semibold">
        Latest edits
      </h2>
      {edits.length === 0 ? (
        <p className="text-ink-soft text-sm">This revision has not been edited.</p>
      ) : (
        <ol className="border-rule-line bg-sheet border-y text-sm">
          {edits.map((edit) => (
            <li
              key={edit.id}
              className="border-rule-line/60 flex flex-col border-b px-3 py-2 last:border-b-0"
            >
              <span className={edit.undone ? "text-ink-soft line-through" : undefined}>{edit.summary}</span>
              <span className="text-ink-soft text-xs">
                {edit.actorName}, <TimeText at={edit.at} />
                {edit.undone ? ", taken back" : ""}
              </span>
            </li>
          ))}
        </ol>
      )}
    </section>
  );
}
