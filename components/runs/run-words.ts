import type { RunView } from "@/lib/client/runs";

const DATE = new Intl.DateTimeFormat("en-GB", {
  day: "numeric",
  month: "short",
  year: "numeric",
  hour: "2-digit",
  minute: "2-digit",
});
const DAY = new Intl.DateTimeFormat("en-GB", { day: "numeric", month: "short", year: "numeric" });

export const timeText = (at: number) => DATE.format(at);
export const dayText = (at: number) => DAY.format(at);

/** How long a run took: "0.8 s", "3 min 20 s". */
export function durationText(run: Pick<RunView, "startedAt" | "finishedAt">): string | null {
  if (run.startedAt === null || run.finishedAt === null) return null;
  const seconds = Math.max(0, run.finishedAt - run.startedAt) / 1000;
  if (seconds < 10) return `${seconds.toFixed(1)}\u2009s`;
  if (seconds < 60) return `${Math.round(seconds)}\u2009s`;
  return `${Math.floor(seconds / 60)}\u2009min ${Math.round(seconds % 60)}\u2009s`;
}

export const STATE_WORDS: Record<RunView["state"], string> = {
  queued: "waiting",
  running: "running",
  done: "done",
  cancelled: "cancelled",
  failed: "stopped by an error",
};

/** "1 path", "1,840 paths". */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${count.toLocaleString("en")} ${count === 1 ? one : many}`;
}
