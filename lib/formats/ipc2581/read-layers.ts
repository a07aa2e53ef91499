import { optionalNumber, text } from "./attributes";
import type { BoardLayer, BoardPly } from "./document";
import type { BoardDraft } from "./draft";
import type { XmlElement } from "./scan-xml";
import type { SectionReader } from "./section-reader";

const COPPER = new Set(["CONDUCTOR", "CONDFILM", "CONDFOIL", "SIGNAL", "PLANE", "MIXED"]);

/** Layer: name, function, side, and which layers a drill joins. */
export class LayerReader implements SectionReader {
  private readonly layer: BoardLayer | null;

  constructor(
    private readonly draft: BoardDraft,
    element: XmlElement,
  ) {
    const name = text(element, "name");
    const said = text(element, "layerFunction", 60).toUpperCase();
    this.layer =
      name === ""
        ? null
        : {
            name,
            function: said,
            side: text(element, "side", 20).toUpperCase(),
            copper: COPPER.has(said),
            plane: said === "PLANE",
            span: null,
            specs: [],
          };
    draft.count(1);
    if (!this.layer) draft.problem(element.line, "Layer", "gives no name; left out.");
    else if (draft.layers.some((layer) => layer.name === name))
      draft.problem(element.line, "Layer", `${name} is given twice; the first one counts.`);
    else draft.layers.push(this.layer);
  }

  open(element: XmlElement): void {
    if (!this.layer) return;
    if (element.name === "Span") {
      const span = { from: text(element, "fromLayer"), to: text(element, "toLayer") };
      if (span.from !== "" && span.to !== "") this.layer.span = span;
      else this.draft.problem(element.line, "Span", "names no two layers; taken as through all.");
    } else if (element.name === "SpecRef") this.layer.specs.push(text(element, "id"));
  }

  close(): void {
    // The layer was kept as it opened.
  }
}

/** Stackup: its plies from top to bottom, each with thickness, tolerances and what it refers to. */
export class StackupReader implements SectionReader {
  private readonly plies: { ply: BoardPly; sequence: number | null }[] = [];
  private ply: BoardPly | null = null;

  constructor(
    private readonly draft: BoardDraft,
    private readonly element: XmlElement,
  ) {}

  open(element: XmlElement): void {
    const length = (...names: string[]) => {
      for (const name of names) {
        const value = optionalNumber(element, name);
        if (value !== null) return value * this.draft.metres;
      }
      return null;
    };
    if (element.name === "StackupLayer") {
      this.draft.count(1);
      const layer =
        text(element, "layerOrGroupRef") || text(element, "layerRef") || text(element, "layerOrGroupName");
      if (layer === "") {
        this.draft.problem(element.line, "StackupLayer", "names no layer; left out.");
        this.ply = null;
        return;
      }
      this.ply = {
        layer,
        thickness_m: length("thickness"),
        plus_m: length("tolPlus", "plusTol"),
        minus_m: length("tolMinus", "minusTol"),
        specs: [],
      };
      this.plies.push({ ply: this.ply, sequence: optionalNumber(element, "sequence") });
    } else if (element.name === "SpecRef" && this.ply) this.ply.specs.push(text(element, "id"));
  }

  close(name: string): void {
    if (name === "StackupLayer") this.ply = null;
    if (name !== "Stackup" || this.draft.stackup) return;
    const counted = this.plies.every(({ sequence }) => sequence !== null);
    const plies = counted
      ? [...this.plies].sort((a, b) => (a.sequence ?? 0) - (b.sequence ?? 0))
      : this.plies;
    const overall = optionalNumber(this.element, "overallThickness");
    this.draft.stackup = {
      name: text(this.element, "name"),
      thickness_m: overall === null ? null : overall * this.draft.metres,
      plies: plies.map(({ ply }) => ply),
    };
  }
}
