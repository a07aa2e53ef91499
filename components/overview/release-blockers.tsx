import type { Route } from "next";
import Link from "next/link";
import { timeText } from "@/components/shell/time-text";
import type { ReleaseBlocker } from "@/lib/schemas/release";

/** Where each of them is met. */
const PLACES: Record<ReleaseBlocker["kind"], { place: string; label: string }> = {
  "no run": { place: "runs", label: "Go to the runs" },
  "stale run": { place: "runs", label: "Go to the runs" },
  "unfinished run": { place: "runs", label: "Go to the runs" },
  "nothing judged": { place: "rules", label: "See the rules" },
  lines: { place: "classes", label: "Go to the classes" },
  failures: { place: "review", label: "Work the problems" },
  "no data": { place: "review", label: "See what is missing" },
  flags: { place: "review", label: "See the flags" },
  "editor signs": { place: "review", label: "Go to review" },
};

interface Props {
  /** null: the revision is released */
  blockers: readonly ReleaseBlocker[] | null;
  letter: string;
  releasedAt: number | null;
  openFlags: number;
  base: string;
}

/** What stands between the draft and its release, each with the way to it. */
export function ReleaseBlockers({ blockers, letter, releasedAt, openFlags, base }: Props) {
  return (
    <section aria-labelledby="blockers">
      <h2 id="blockers" className="mb-2 text-lg font-semibold">
        {blockers === null ? "Released" : "What blocks release"}
      </h2>
      {blockers === null ? (
        <p className="text-sm">
          Revision {letter} is released{releasedAt === null ? "" : `, ${timeText(releasedAt)}`}, and stays as
          it is.{" "}
          <Link href={`${base}/releases` as Route} className="text-violet underline underline-offset-2">
            See its note
          </Link>
        </p>
      ) : blockers.length === 0 ? (
        <p className="text-sm">
          Nothing.{" "}
          <Link href={`${base}/releases` as Route} className="text-violet underline underline-offset-2">
            Release revision {letter}
          </Link>
        </p>
      ) : (
        <ul className="border-rule-line bg-sheet border-y text-sm">
          {blockers.map((blocker) => (
            <li key={blocker.kind} className="border-rule-line/60 border-b px-3 py-2 last:border-b-0">
              {blocker.text}{" "}
              <Link
                href={`${base}/${PLACES[blocker.kind].place}` as Route}
                className="text-violet whitespace-nowrap underline underline-offset-2"
              >
                {PLACES[blocker.kind].label}
              </Link>
            </li>
          ))}
        </ul>
      )}
      {blockers?.some((blocker) => blocker.kind === "flags") ? null : (
        <p className="text-ink-soft mt-2 text-sm">
          {openFlags === 0
            ? "No flag is open."
            : openFlags === 1
              ? "1 flag is open."
              : `${openFlags} flags are open.`}
        </p>
      )}
    </section>
  );
}
