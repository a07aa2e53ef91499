export type BoardFileErrorCode =
  | "empty"
  | "not text"
  | "damaged"
  | "not xml"
  | "not ipc-2581"
  | "doctype"
  | "entity"
  | "too deep"
  | "too large"
  | "cut off"
  | "units"
  | "nothing"
  | "cancelled";

/** A file that is not read as a board; the message is a whole sentence with a way out. */
export class BoardFileError extends Error {
  override readonly name = "BoardFileError";

  constructor(
    readonly code: BoardFileErrorCode,
    message: string,
    /** Line of the file, counted from 1, when one is to blame. */
    readonly line: number | null = null,
    options?: ErrorOptions,
  ) {
    super(message, options);
  }
}
