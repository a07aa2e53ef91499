import { EngineError } from "@/lib/si/errors";
import { type LayerSpread, spreadOnLayer, type Stackup, yieldOf } from "@/lib/si/stackup";
import type { LineSpread } from "@/lib/si/rules/check-impedance";
import type { StoredStackup } from "@/lib/schemas/stackup";
import { processToSi } from "./process-to-si";
import { stackupToSi } from "./stackup-to-si";

/** Spreads of lines by layer, width and gap, each computed once. */
export class LineSpreads {
  private readonly stackup: Stackup;
  private readonly process;
  private readonly known = new Map<string, LayerSpread | null>();

  constructor(stored: StoredStackup) {
    this.stackup = stackupToSi(stored);
    this.process = processToSi(stored.process);
  }

  /**
   * @param index  of the layer in the stackup
   * @param target  [Ω]
   * @param tolerance  of the target, as a fraction
   * @returns null where the section cannot be solved
   */
  of(
    index: number,
    shape: { width: number; gap: number | null },
    target: number,
    tolerance: number,
  ): LineSpread | null {
    const spread = this.spread(index, shape);
    if (!spread) return null;
    const [chief] = spread.sensitivities;
    return {
      yield: yieldOf(spread, target, tolerance),
      low: spread.low,
      high: spread.high,
      chief: chief?.name ?? "nothing",
      chiefShare: chief?.share ?? 0,
      method: spread.method,
    };
  }

  private spread(index: number, { width, gap }: { width: number; gap: number | null }): LayerSpread | null {
    const key = `${index} ${width} ${gap}`;
    let spread = this.known.get(key);
    if (spread === undefined) this.known.set(key, (spread = this.compute(index, width, gap)));
    return spread;
  }

  private compute(index: number, width: number, gap: number | null): LayerSpread | null {
    try {
      return spreadOnLayer(this.stackup, index, gap === null ? { width } : { width, gap }, this.process);
    } catch (error) {
      if (error instanceof EngineError) return null;
      throw error;
    }
  }
}
