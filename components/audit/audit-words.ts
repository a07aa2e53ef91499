import { writeDelimited } from "@/lib/formats/delimited/write";
import type { AuditEntry } from "@/lib/client/audit";

/** What an entry says of its thing, on one line: the summary where there is one, else each fact. */
export function detailText(detail: Record<string, unknown>): string {
  const { summary, revision, ...rest } = detail;
  const facts = Object.entries(rest).flatMap(([name, value]) =>
    value === null || value === "" ? [] : [`${spoken(name)} ${valueText(value)}`],
  );
  const parts = [
    typeof revision === "string" ? `Revision ${revision}` : null,
    typeof summary === "string" ? summary : null,
    facts.length > 0 ? facts.join(", ") : null,
  ];
  return parts.filter((part) => part !== null).join(": ");
}

/** "draft.edit" as people say it: "draft, edit". */
export function actionText(action: string): string {
  return spoken(action).replace(".", ": ");
}

export function auditCsv(entries: readonly AuditEntry[]): string {
  const rows = entries.map((entry) => [
    entry.seq,
    new Date(entry.at).toISOString(),
    entry.actorName,
    entry.action,
    entry.subjectKind,
    entry.subjectId ?? "",
    detailText(entry.detail),
    entry.hash,
  ]);
  return writeDelimited([["number", "time", "person", "action", "thing", "id", "detail", "sha256"], ...rows]);
}

function spoken(name: string): string {
  return name.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`).replaceAll("-", " ");
}

function valueText(value: unknown): string {
  return typeof value === "string" || typeof value === "number" || typeof value === "boolean"
    ? String(value)
    : JSON.stringify(value);
}
