import { EngineError } from "@/lib/si/errors";
import {
  buildCrossSection,
  FIELD_METHOD,
  isSignal,
  lineOnLayer,
  type LayerLine,
  type Stackup,
} from "@/lib/si/stackup";
import type { StoredStackup } from "@/lib/schemas/stackup";
import type { MissingInput } from "./path-pins";
import { stackupToSi } from "./stackup-to-si";

export interface LineOnLayer {
  layerName: string;
  /** nominal by the field solver [Ω], of a pair its differential; null with `missing` */
  impedance: number | null;
  /** [s/m] */
  delayPerMeter: number | null;
  /** "2-D field solution" */
  method: string | null;
  /** the published formula's value beside it; null where none fits */
  closedForm: { ohms: number; title: string; inRange: boolean } | null;
  missing: MissingInput | null;
}

/** A width that no etch takes away, to ask a layer for its height over the plane. */
const PROBE_WIDTH_M = 1e-3;

/** What the formula beside a field solution says, for tables and sentences. */
export function closedFormOf({ closedForm }: LayerLine): LineOnLayer["closedForm"] {
  const ohms = closedForm?.pair?.differential ?? closedForm?.single?.impedance;
  if (!closedForm || ohms === undefined) return null;
  return { ohms, title: closedForm.form.title, inRange: closedForm.form.inRange };
}

/** Impedance and delay of traces by layer and width, each computed once. */
export class LineTable {
  private readonly stackup: Stackup;
  private readonly byId = new Map<string, number>();
  private readonly byName = new Map<string, number>();
  private readonly lines = new Map<string, LineOnLayer>();
  private readonly heights = new Map<number, number | null>();

  constructor(stored: StoredStackup) {
    this.stackup = stackupToSi(stored);
    stored.layers.forEach((layer, index) => {
      this.byId.set(layer.lineageId, index);
      this.byName.set(layer.name.toLowerCase(), index);
    });
  }

  /**
   * @param lineageId  of the stackup's layer; null: not mapped at import
   * @param text       the layer as imported, for the sentence
   */
  line(lineageId: string | null, text: string, width: number, gap: number | null = null): LineOnLayer {
    const index = lineageId === null ? undefined : this.byId.get(lineageId);
    const key = `${index ?? text} ${width} ${gap}`;
    let line = this.lines.get(key);
    if (!line) this.lines.set(key, (line = this.compute(index, text, width, gap)));
    return line;
  }

  /** Distance of a trace to the nearer plane [m]; null where the layer or its plane is not known. */
  heightOverPlane(layerText: string): number | null {
    const index = this.byId.get(layerText) ?? this.byName.get(layerText.trim().toLowerCase());
    if (index === undefined) return null;
    let height = this.heights.get(index);
    if (height === undefined) this.heights.set(index, (height = this.computeHeight(index)));
    return height;
  }

  private compute(index: number | undefined, text: string, width: number, gap: number | null): LineOnLayer {
    const layer = index === undefined ? undefined : this.stackup.layers[index];
    const without = (input: string, detail: string): LineOnLayer => ({
      layerName: layer?.name ?? text,
      impedance: null,
      delayPerMeter: null,
      method: null,
      closedForm: null,
      missing: { input, detail },
    });
    if (index === undefined || !layer)
      return without(
        `layer "${text}" in the stackup`,
        `Routes lie on "${text}", which is no layer of the stackup. Map it or add it.`,
      );
    if (!isSignal(layer))
      return without(
        `signal layer in place of ${layer.name}`,
        `Routes lie on ${layer.name}, which the stackup has as ${layer.kind}.`,
      );
    try {
      const { line } = lineOnLayer(this.stackup, index, gap === null ? { width } : { width, gap });
      const mode =
        line.single ?? (line.pair && { impedance: line.pair.differential, delay: line.pair.odd.delay });
      if (!mode || !(mode.impedance > 0) || !Number.isFinite(mode.impedance))
        return without(
          `impedance of ${layer.name}`,
          `Nothing gives the impedance of this line on ${layer.name}.`,
        );
      return {
        layerName: layer.name,
        impedance: mode.impedance,
        delayPerMeter: mode.delay,
        method: FIELD_METHOD,
        closedForm: closedFormOf(line),
        missing: null,
      };
    } catch (error) {
      if (!(error instanceof EngineError)) throw error;
      return without(`stackup around ${layer.name}`, error.message);
    }
  }

  private computeHeight(index: number): number | null {
    try {
      const { section } = buildCrossSection(this.stackup, index, { width: PROBE_WIDTH_M });
      const [trace] = section.traces;
      if (!trace) return null;
      const total = section.layers.reduce((sum, slab) => sum + slab.thickness, 0);
      return section.upperPlane ? Math.min(trace.y, total - trace.y - trace.thickness) : trace.y;
    } catch (error) {
      if (error instanceof EngineError) return null;
      throw error;
    }
  }
}
