import { number, text } from "./attributes";
import { metresIn, readUnit } from "./board-unit";
import type { BoardDraft } from "./draft";
import type { XmlElement } from "./scan-xml";
import type { SectionReader } from "./section-reader";
import { outlineShape, readShape } from "./shape";

/** Content: which step is meant, and the dictionaries of line widths and pad shapes, each in its own units. */
export class ContentReader implements SectionReader {
  private metres = metresIn("in");
  private entry: string | null = null;
  private corners: number[] | null = null;

  constructor(private readonly draft: BoardDraft) {}

  open(element: XmlElement): void {
    const { draft } = this;
    switch (element.name) {
      case "StepRef":
        draft.wantedStep ??= text(element, "name");
        return;
      case "DictionaryLineDesc":
      case "DictionaryStandard":
      case "DictionaryUser":
        this.metres = readUnit(element.attributes.units, element.name, element.line).metres;
        return;
      case "EntryLineDesc":
      case "EntryStandard":
      case "EntryUser":
        draft.count(1);
        this.entry = text(element, "id");
        if (this.entry === "") draft.problem(element.line, element.name, "gives no id; left out.");
        return;
      case "LineDesc": {
        if (!this.entry) return;
        const width = number(draft, element, "lineWidth");
        if (width !== null) draft.lineWidths.set(this.entry, width * this.metres);
        return;
      }
      case "Contour":
        this.corners = [];
        return;
      case "PolyBegin":
      case "PolyStepSegment":
      case "PolyStepCurve":
        this.corner(element);
        return;
      default: {
        const shape = this.entry ? readShape(element, this.metres) : null;
        if (shape && this.entry && !draft.shapes.has(this.entry)) draft.shapes.set(this.entry, shape);
      }
    }
  }

  close(name: string): void {
    if (name === "Contour") {
      const shape = this.entry && this.corners ? outlineShape(this.corners) : null;
      if (shape && this.entry && !this.draft.shapes.has(this.entry)) this.draft.shapes.set(this.entry, shape);
      this.corners = null;
    } else if (name.startsWith("Entry")) this.entry = null;
  }

  private corner(element: XmlElement): void {
    if (!this.corners) return;
    this.draft.count(1);
    const x = number(this.draft, element, "x");
    const y = number(this.draft, element, "y");
    if (x !== null && y !== null) this.corners.push(x * this.metres, y * this.metres);
  }
}
