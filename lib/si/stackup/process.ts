import { DomainError } from "../errors";

/** What a fabricator's process holds, in fractions and metres. */
export interface Process {
  /** ± share of the finished foot width */
  width: number;
  /** ± share of thickness, where a layer names no own tolerance */
  copper: number;
  dielectric: number;
  /** ± share of every Dk */
  dk: number;
  /** ± share of the mask's thickness */
  mask: number;
  distribution: "normal" | "uniform";
  /** least width and gap that are etched [m]; null: by the copper */
  minWidth: number | null;
  minGap: number | null;
}

/** @throws DomainError naming the tolerance that is negative or half of its quantity and more */
export function validateProcess(process: Process): void {
  for (const field of ["width", "copper", "dielectric", "dk", "mask"] as const) {
    if (!(process[field] >= 0 && process[field] <= 0.5))
      throw new DomainError(
        `The process tolerance of ${field} must be 0 to 50 %; it is ${100 * process[field]} %.`,
        `process.${field}`,
      );
  }
}
