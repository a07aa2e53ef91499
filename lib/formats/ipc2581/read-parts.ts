import { place, text } from "./attributes";
import type { BoardDraft, DraftComponent, DraftPackage } from "./draft";
import type { XmlElement } from "./scan-xml";
import type { SectionReader } from "./section-reader";
import { both, readXform, UNMOVED, type Xform } from "./xform";

/** BomItem: part number and value of the references it lists. */
export class BomItemReader implements SectionReader {
  private readonly references: string[] = [];
  private value = "";

  constructor(
    private readonly draft: BoardDraft,
    private readonly element: XmlElement,
  ) {}

  open(element: XmlElement): void {
    if (element.name === "RefDes") {
      this.draft.count(1);
      this.references.push(text(element, "name", 80));
    } else if (/^(Textual|Measured|Enumerated)$/.test(element.name)) {
      const name =
        text(element, "textualCharacteristicName") ||
        text(element, "measuredCharacteristicName") ||
        text(element, "enumeratedCharacteristicName");
      if (!/^(value|val)$/i.test(name) || this.value !== "") return;
      this.value =
        text(element, "textualCharacteristicValue") ||
        text(element, "enumeratedCharacteristicValue") ||
        text(element, "measuredCharacteristicValue") + text(element, "engineeringUnitOfMeasure");
    }
  }

  close(name: string): void {
    if (name !== "BomItem") return;
    const partNumber = text(this.element, "OEMDesignNumberRef");
    for (const reference of this.references)
      this.draft.boms.set(reference, { partNumber, value: this.value });
  }
}

/** Component: where a part stands, and how it is turned. */
export class ComponentReader implements SectionReader {
  private form: Xform = UNMOVED;
  private at: { x: number; y: number } | null = null;

  constructor(
    private readonly draft: BoardDraft,
    private readonly element: XmlElement,
  ) {
    draft.count(1);
  }

  open(element: XmlElement): void {
    if (element.name === "Xform") this.form = both(this.form, readXform(element, this.draft.metres));
    else if (element.name === "Location") this.at = place(this.draft, element);
  }

  close(name: string): void {
    if (name !== "Component") return;
    const reference = text(this.element, "refDes", 80);
    if (reference === "") {
      this.draft.problem(this.element.line, "Component", "gives no refDes; left out.");
      return;
    }
    const component: DraftComponent = {
      reference,
      package: text(this.element, "packageRef"),
      part: text(this.element, "part"),
      layer: text(this.element, "layerRef"),
      x: this.at?.x ?? Number.NaN,
      y: this.at?.y ?? Number.NaN,
      rotation: this.form.rotation,
      mirror: this.form.mirror,
    };
    this.draft.step.components.push(component);
  }
}

/** Package: where its pins stand about its origin. */
export class PackageReader implements SectionReader {
  private readonly package: DraftPackage = { pins: [] };
  private pin: string | null = null;

  constructor(
    private readonly draft: BoardDraft,
    element: XmlElement,
  ) {
    draft.step.packages.set(text(element, "name"), this.package);
  }

  open(element: XmlElement): void {
    if (element.name === "Pin") {
      this.draft.count(1);
      this.pin = text(element, "number", 40) || text(element, "name", 40);
      if (this.pin === "") this.draft.problem(element.line, "Pin", "gives no number; left out.");
    } else if (element.name === "Location" && this.pin) {
      const at = place(this.draft, element);
      if (at) this.package.pins.push({ name: this.pin, ...at });
      this.pin = null;
    }
  }

  close(name: string): void {
    if (name === "Pin") this.pin = null;
  }
}

/** LogicalNet: the pins that a net joins. */
export class LogicalNetReader implements SectionReader {
  private readonly pins: string[] = [];

  constructor(
    private readonly draft: BoardDraft,
    element: XmlElement,
  ) {
    const name = text(element, "name", 400);
    if (name === "") draft.problem(element.line, "LogicalNet", "gives no name; left out.");
    else draft.step.logicalNets.set(name, this.pins);
  }

  open(element: XmlElement): void {
    if (element.name !== "PinRef") return;
    this.draft.count(1);
    const pin = pinOf(element);
    if (pin) this.pins.push(pin);
    else this.draft.problem(element.line, "PinRef", "names no pin of a part; left out.");
  }

  close(): void {
    // The net was kept as it opened.
  }
}

/** REFERENCE.PIN that a PinRef names. */
export function pinOf(element: XmlElement): string | null {
  const reference = text(element, "componentRef", 80);
  const pin = text(element, "pin", 40);
  return reference === "" || pin === "" ? null : `${reference}.${pin}`;
}
