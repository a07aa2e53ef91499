export type DelimitedErrorCode =
  "empty" | "not text" | "wrong type" | "too large" | "too many rows" | "too many columns" | "open quote";

/** A file or paste that cannot be read as a table; the message is a whole sentence with a way out. */
export class DelimitedError extends Error {
  override readonly name = "DelimitedError";

  constructor(
    readonly code: DelimitedErrorCode,
    message: string,
    /** Row as a spreadsheet counts it, when one is to blame. */
    readonly row: number | null = null,
    options?: ErrorOptions,
  ) {
    super(message, options);
  }
}
