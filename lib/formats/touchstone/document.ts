import type { PortData } from "@/lib/si/ports";

export interface TouchstoneProblem {
  severity: "error" | "warning" | "notice";
  /** counted from 1 */
  line: number;
  /** what is wrong and the way out, in sentences */
  reason: string;
}

export type ParameterKind = "S" | "Y" | "Z" | "G" | "H";
export type NumberFormat = "RI" | "MA" | "DB";

export interface TouchstoneDocument {
  version: "1" | "2.0" | "2.1";
  kind: ParameterKind;
  format: NumberFormat;
  /**
   * Values of `kind` in SI, references in Ω, frequencies in Hz; layout as in PortData. Y and Z are no longer counted in
   * the reference as version 1 writes them.
   */
  data: PortData;
  /** as the file lists it, port by port ("D2,1", "C2,1"); null where every port stands by itself */
  mixedMode: string[] | null;
  comments: string[];
}

export interface TouchstoneReading {
  /** Null where the file is refused; then the problems say why. */
  document: TouchstoneDocument | null;
  problems: TouchstoneProblem[];
}

/** Ends the reading; becomes the one problem of a refused file. */
export class TouchstoneError extends Error {
  override readonly name = "TouchstoneError";
  constructor(
    readonly line: number,
    reason: string,
  ) {
    super(reason);
  }
}
