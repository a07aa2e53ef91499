import "server-only";

/** SQLITE_BUSY, SQLITE_LOCKED and the client's own "statements in progress" that follows them. */
export function isBusy(error: unknown): boolean {
  return anyCause(
    error,
    (cause) =>
      /^SQLITE_(BUSY|LOCKED)/.test(codeOf(cause)) ||
      /database (table )?is locked|statements in progress/i.test(cause.message),
  );
}

/** The connection was closed between being borrowed and being used: nothing of the unit was done. */
export function isCutOff(error: unknown): boolean {
  return anyCause(error, (cause) => codeOf(cause) === "CLIENT_CLOSED" && cause.message.includes("in flight"));
}

function anyCause(error: unknown, holds: (cause: Error) => boolean): boolean {
  for (let cause: unknown = error; cause instanceof Error; cause = cause.cause) if (holds(cause)) return true;
  return false;
}

function codeOf(error: Error): string {
  return "code" in error && typeof error.code === "string" ? error.code : "";
}
