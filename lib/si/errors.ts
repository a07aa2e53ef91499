/** Base of every error the engine throws; `message` is one whole sentence fit for the screen. */
export class EngineError extends Error {
  override readonly name: string = "EngineError";
  constructor(
    message: string,
    /** Stable machine-readable kind. */
    readonly code: string,
    /** The input that is at fault, as a path ("traces[0].widthBottom"), or null. */
    readonly field: string | null = null,
    options?: { cause?: unknown },
  ) {
    super(message);
    if (options?.cause !== undefined) this.cause = options.cause;
  }
}

/** An input outside what the function is defined for. */
export class DomainError extends EngineError {
  override readonly name = "DomainError";
  constructor(message: string, field: string | null = null, options?: { cause?: unknown }) {
    super(message, "domain", field, options);
  }
}

/** An iteration ended before it reached its tolerance. */
export class NotConvergedError extends EngineError {
  override readonly name = "NotConvergedError";
  constructor(
    message: string,
    readonly residual: number,
    readonly iterations: number,
  ) {
    super(message, "not-converged");
  }
}

/** A legal input that this version of the engine does not compute. */
export class UnsupportedError extends EngineError {
  override readonly name = "UnsupportedError";
  constructor(message: string, field: string | null = null) {
    super(message, "unsupported", field);
  }
}

/** No value in the allowed range meets the target. */
export class UnreachableTargetError extends EngineError {
  override readonly name = "UnreachableTargetError";
  constructor(
    message: string,
    /** Smallest and largest impedance [Ω] that the allowed range gives. */
    readonly reachable: { min: number; max: number },
    field: string | null = "target",
  ) {
    super(message, "unreachable-target", field);
  }
}
