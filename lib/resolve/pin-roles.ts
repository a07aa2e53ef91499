import { globMatcher } from "@/lib/formats/glob";
import type { StoredBinding } from "@/lib/schemas/model";
import type { PinRole } from "@/lib/schemas/model";
import type { NetPinDoc, StoredPart } from "@/lib/schemas/net";

interface CompiledBinding {
  binding: StoredBinding;
  reference: (text: string) => boolean;
  partNumber: (text: string) => boolean;
  pin: (text: string) => boolean;
  net: (text: string) => boolean;
}

export interface PinRoleAndModel {
  /** null: nobody said */
  role: PinRole | null;
  modelLineageId: string | null;
}

/**
 * Gives pins their role and model: the pin's own role first, else that of the first binding that matches in
 * order; the model of the first matching binding that names one. Patterns ignore case.
 */
export class PinRoles {
  private readonly compiled: CompiledBinding[];
  private readonly byReference = new Map<string, CompiledBinding[]>();

  constructor(
    bindings: StoredBinding[],
    private readonly parts: ReadonlyMap<string, StoredPart>,
  ) {
    this.compiled = bindings.map((binding) => ({
      binding,
      reference: globMatcher(binding.referencePattern),
      partNumber: globMatcher(binding.partNumberPattern),
      pin: globMatcher(binding.pinPattern),
      net: globMatcher(binding.netPattern),
    }));
  }

  of(pin: NetPinDoc, netName: string): PinRoleAndModel {
    let role = pin.role;
    for (const entry of this.forReference(pin.reference)) {
      if (!entry.pin(pin.pin) || !entry.net(netName)) continue;
      role ??= entry.binding.role;
      if (entry.binding.modelLineageId) return { role, modelLineageId: entry.binding.modelLineageId };
    }
    return { role, modelLineageId: null };
  }

  /** Few bindings fit a reference, and a component has hundreds of pins. */
  private forReference(reference: string): CompiledBinding[] {
    let list = this.byReference.get(reference);
    if (!list) {
      const partNumber = this.parts.get(reference)?.partNumber ?? "";
      list = this.compiled.filter((entry) => entry.reference(reference) && entry.partNumber(partNumber));
      this.byReference.set(reference, list);
    }
    return list;
  }
}
