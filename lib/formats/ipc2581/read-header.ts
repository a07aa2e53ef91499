import { optionalNumber, text } from "./attributes";
import { readUnit } from "./board-unit";
import type { BoardSpec } from "./document";
import type { BoardDraft } from "./draft";
import type { XmlElement } from "./scan-xml";
import type { SectionReader } from "./section-reader";

/** CadHeader: the units of the step, and the specifications that layers and nets refer to. */
export class CadHeaderReader implements SectionReader {
  private spec: BoardSpec | null = null;
  private about: { about: string; type: string; comment: string } | null = null;

  constructor(
    private readonly draft: BoardDraft,
    element: XmlElement,
  ) {
    draft.unit = readUnit(element.attributes.units, "CadHeader", element.line);
  }

  open(element: XmlElement): void {
    const { draft } = this;
    if (element.name === "Spec") {
      draft.count(1);
      this.spec = { name: text(element, "name"), lines: [] };
      if (this.spec.name === "") draft.problem(element.line, "Spec", "gives no name; left out.");
      else draft.specs.push(this.spec);
    } else if (this.spec && element.name === "Property") {
      const value = optionalNumber(element, "value");
      this.spec.lines.push({
        ...(this.about ?? { about: "", type: "", comment: "" }),
        text: text(element, "text", 300),
        value,
        unit: text(element, "unit", 40),
        plus: optionalNumber(element, "plusTol") ?? optionalNumber(element, "tolPlus"),
        minus: optionalNumber(element, "minusTol") ?? optionalNumber(element, "tolMinus"),
      });
    } else if (this.spec)
      this.about = {
        about: element.name,
        type: text(element, "type", 60),
        comment: text(element, "comment", 300),
      };
  }

  close(name: string): void {
    if (name === "Spec") this.spec = null;
    if (name !== "Property") this.about = null;
  }
}
