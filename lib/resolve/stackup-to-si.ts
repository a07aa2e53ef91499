import { stackupFromTyped, type Stackup } from "@/lib/si/stackup";
import type { StackupDoc } from "@/lib/schemas/stackup";

/**
 * A stackup document in SI units, layer for layer.
 * @throws DomainError where a value is no number or a unit is not of its kind
 */
export function stackupToSi(stackup: Pick<StackupDoc, "layers">): Stackup {
  return stackupFromTyped(stackup.layers);
}
