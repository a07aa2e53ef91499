import { netName, number, place, text } from "./attributes";
import type { BoardDraft } from "./draft";
import { pinOf } from "./read-parts";
import type { XmlElement } from "./scan-xml";
import type { SectionReader } from "./section-reader";
import { readShape, turned, type Shape } from "./shape";
import { both, readXform, UNMOVED, type Xform } from "./xform";

interface OpenPad {
  layer: string;
  padstack: string;
  via: boolean;
  line: number;
  at: { x: number; y: number } | null;
  form: Xform;
  shape: Shape | null;
  pins: string[];
}

/** Pads and holes of a set: in LayerFeature one layer's, in PadStack (revision A) of each layer. */
export class PadReader {
  private net: string | null = null;
  private viaSet = false;
  private padstackOfSet = "";
  private pad: OpenPad | null = null;

  constructor(
    private readonly draft: BoardDraft,
    private readonly layer: string,
  ) {}

  /** A pad is open; what follows belongs to it. */
  get busy(): boolean {
    return this.pad !== null;
  }

  beginSet(net: string | null, element: XmlElement): void {
    this.net = net;
    this.viaSet = /^via$/i.test(text(element, "padUsage"));
    this.padstackOfSet = text(element, "geometry");
  }

  open(element: XmlElement): void {
    const { draft, pad } = this;
    if (element.name === "Pad" || element.name === "LayerPad") {
      draft.count(1);
      this.pad = {
        layer: element.name === "Pad" ? this.layer : text(element, "layerRef"),
        padstack: text(element, "padstackDefRef") || this.padstackOfSet,
        via: this.viaSet || /^via$/i.test(text(element, "padUsage") || text(element, "padUse")),
        line: element.line,
        at: null,
        form: UNMOVED,
        shape: null,
        pins: [],
      };
    } else if (element.name === "Hole" || element.name === "LayerHole") this.hole(element);
    else if (element.name === "SlotCavity") return;
    else if (!pad) return;
    else if (element.name === "Location") pad.at = place(draft, element);
    else if (element.name === "Xform") pad.form = both(pad.form, readXform(element, draft.metres));
    else if (element.name === "PinRef") {
      const pin = pinOf(element);
      if (pin) pad.pins.push(pin);
      else draft.problem(element.line, "PinRef", "names no pin of a part; the pad is kept without it.");
    } else if (/^(Standard|User)PrimitiveRef$/.test(element.name))
      pad.shape ??= draft.shapes.get(text(element, "id")) ?? null;
    else pad.shape ??= readShape(element, draft.metres);
  }

  close(name: string): void {
    const { pad } = this;
    if (!pad || (name !== "Pad" && name !== "LayerPad")) return;
    this.pad = null;
    if (!pad.at) {
      this.draft.problem(pad.line, name, "gives no place; left out.");
      return;
    }
    const shape = pad.shape ?? this.draft.step.padstacks.get(pad.padstack)?.get(pad.layer) ?? null;
    this.draft.step.pads.push({
      net: this.net,
      layer: pad.layer,
      x: pad.at.x,
      y: pad.at.y,
      shape: shape && turned(shape, pad.form),
      pins: pad.pins,
      via: pad.via,
      line: pad.line,
    });
  }

  private hole(element: XmlElement): void {
    const { draft } = this;
    draft.count(1);
    const at = place(draft, element);
    const diameter = at && number(draft, element, "diameter");
    if (!at || diameter === null) return;
    const status = text(element, "platingStatus", 30);
    draft.step.holes.push({
      net: this.net,
      layer: this.layer,
      ...at,
      diameter_m: Math.abs(diameter * draft.metres),
      plated: !/^NONPLATED$|^NON.?PLATED$/i.test(status),
      span: null,
      line: element.line,
    });
  }
}

/** PadStack (revision A): hole and pads of one place, on all of its layers. */
export class PadStackReader implements SectionReader {
  private readonly pads: PadReader;

  constructor(
    private readonly draft: BoardDraft,
    element: XmlElement,
  ) {
    this.pads = new PadReader(draft, "");
    this.pads.beginSet(netName(element.attributes.net), element);
  }

  open(element: XmlElement): void {
    if (element.name === "Span") {
      const hole = this.draft.step.holes.at(-1);
      const span = { from: text(element, "fromLayer"), to: text(element, "toLayer") };
      if (hole && span.from !== "" && span.to !== "") hole.span = span;
    } else this.pads.open(element);
  }

  close(name: string): void {
    this.pads.close(name);
  }
}

/** PadStackDef: the shapes of a kind of pad, layer by layer, for pads that give none of their own. */
export class PadStackDefReader implements SectionReader {
  private readonly shapes = new Map<string, Shape>();
  private layer = "";

  constructor(
    private readonly draft: BoardDraft,
    element: XmlElement,
  ) {
    draft.step.padstacks.set(text(element, "name"), this.shapes);
  }

  open(element: XmlElement): void {
    if (element.name === "PadstackPadDef") {
      this.draft.count(1);
      // Antipads and thermals are holes in planes, not copper of the net.
      const use = text(element, "padUse") || text(element, "padUsage");
      this.layer = /^(antipad|thermal)$/i.test(use) ? "" : text(element, "layerRef");
      return;
    }
    if (this.layer === "") return;
    const shape = /^(Standard|User)PrimitiveRef$/.test(element.name)
      ? this.draft.shapes.get(text(element, "id"))
      : readShape(element, this.draft.metres);
    if (shape && !this.shapes.has(this.layer)) this.shapes.set(this.layer, shape);
  }

  close(name: string): void {
    if (name === "PadstackPadDef") this.layer = "";
  }
}
