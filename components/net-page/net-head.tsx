import { ChevronLeft, ChevronRight } from "lucide-react";
import type { Route } from "next";
import Link from "next/link";
import { Badge } from "@/components/ui/badge";
import { buttonClasses } from "@/components/ui/button";
import { VerdictMark } from "@/components/ui/verdict-mark";
import type { Around, NetFacts } from "./facts";

interface Props {
  facts: NetFacts;
  driver: string;
  receivers: readonly string[];
  waived: boolean;
}

/** Which path this is, of which run, and the way to its neighbours in the list. */
export function NetHead({ facts, driver, receivers, waived }: Props) {
  const { path, result, run, revision, projectId, around } = facts;
  const others = path.nets.map((net) => net.name).filter((name) => name !== path.name);
  return (
    <header className="flex flex-col gap-1">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-1">
        <h1 className="min-w-0 font-mono text-xl font-semibold break-all">{path.name}</h1>
        <VerdictMark verdict={result.verdict === "fail" && waived ? "waived" : result.verdict} />
        {path.className ? <Badge tone="ink">{path.className}</Badge> : <Badge>no class</Badge>}
        {around ? <Neighbours around={around} /> : null}
      </div>
      <p className="text-ink-soft text-sm">
        <span className="text-ink font-mono">{driver || "no driver"}</span> →{" "}
        <span className="text-ink font-mono">{receivers.join(", ") || "no receiver"}</span>
        {others.length > 0 ? ` · joined with ${others.join(", ")}` : null}
        {path.viaCount > 0 ? ` · ${path.viaCount} ${path.viaCount === 1 ? "via" : "vias"}` : null}
        {" · "}
        {run ? (
          <>
            <Link className="prose-link" href={`/projects/${projectId}/runs/${run.id}` as Route}>
              run {run.number}
            </Link>{" "}
            of revision {revision.letter}
          </>
        ) : (
          `revision ${revision.letter} as it is now, not yet checked`
        )}
      </p>
      {run?.outdated ? (
        <p className="text-near text-sm">
          The draft was edited since run {run.number}. This page shows what the run saw;{" "}
          <Link className="prose-link" href={`/projects/${projectId}/nets/${path.id}?run=now` as Route}>
            show the draft as it is now
          </Link>
          .
        </p>
      ) : null}
      {run?.otherEngine ? (
        <p className="text-near text-sm">
          Run {run.number} was judged by engine {run.otherEngine}; what is drawn here is computed by the
          present one.
        </p>
      ) : null}
    </header>
  );
}

function Neighbours({ around }: { around: Around }) {
  return (
    <nav aria-label="Problems of the run" className="ml-auto flex items-center gap-1 text-sm print:hidden">
      <Link className={buttonClasses({ variant: "quiet" })} href={around.back as Route}>
        All problems
      </Link>
      <Step to={around.previous} label="Previous" />
      <span className="text-ink-soft tabular-nums">
        {around.position} of {around.total}
      </span>
      <Step to={around.next} label="Next" />
    </nav>
  );
}

function Step({ to, label }: { to: { href: string; name: string } | null; label: "Previous" | "Next" }) {
  const icon =
    label === "Previous" ? <ChevronLeft size={16} aria-hidden /> : <ChevronRight size={16} aria-hidden />;
  const look = buttonClasses({ size: "icon" });
  return to ? (
    <Link
      className={look}
      href={to.href as Route}
      aria-label={`${label} path with a problem: ${to.name}`}
      title={to.name}
    >
      {icon}
    </Link>
  ) : (
    <span className={`${look} opacity-40`} aria-hidden="true">
      {icon}
    </span>
  );
}
