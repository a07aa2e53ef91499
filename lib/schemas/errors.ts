/** Absent and forbidden look the same. */
export class NotFoundError extends Error {
  override readonly name = "NotFoundError";
  constructor(what = "It") {
    super(`${what} does not exist, or is not yours to see.`);
  }
}

/** Somebody else changed it since it was read. */
export class ConflictError extends Error {
  override readonly name = "ConflictError";
  constructor(
    message: string,
    /** the thing as it is now */
    readonly current: unknown,
    /** names of the fields that differ from what the caller had read */
    readonly changed: string[] = [],
  ) {
    super(message);
  }
}

/** Understood and allowed, but something stands in the way; the message says what and the way out. */
export class RefusedError extends Error {
  override readonly name = "RefusedError";
  constructor(
    message: string,
    readonly code: string,
    /** per field, when a form is at fault */
    readonly fields: Record<string, string> = {},
    readonly detail: unknown = null,
  ) {
    super(message);
  }
}
