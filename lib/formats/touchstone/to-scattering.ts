import { DomainError } from "@/lib/si/errors";
import { scatteringFromImmittance, type PortData } from "@/lib/si/ports";
import type { TouchstoneDocument } from "./document";

/**
 * A file's data as scattering parameters.
 * @throws DomainError for G and H, and where a matrix has no scattering parameters
 */
export function scatteringOf({ kind, data }: TouchstoneDocument): PortData {
  if (kind === "S") return data;
  if (kind === "Z" || kind === "Y") return scatteringFromImmittance(kind, data);
  throw new DomainError(
    `The file holds ${kind} parameters, which are not converted. Export S, Y or Z.`,
    "kind",
  );
}
