import { netName, number, place, text } from "./attributes";
import type { BoardDraft } from "./draft";
import { DrawnPath } from "./path";
import { PadReader } from "./read-pads";
import type { XmlElement } from "./scan-xml";
import type { SectionReader } from "./section-reader";
import { both, placed, readXform, UNMOVED, type Xform } from "./xform";

const ORIGIN = { x: 0, y: 0 };

/** LayerFeature: the copper and the holes of one layer, set by set, each set of one net. */
export class LayerFeatureReader implements SectionReader {
  private readonly layer: string;
  private readonly pads: PadReader;
  private net: string | null = null;
  private line: { path: DrawnPath; width_m: number | null; line: number; element: string } | null = null;
  private pour: { path: DrawnPath; cutout: boolean } | null = null;
  private inFeatures = false;
  private form: Xform = UNMOVED;
  private at = ORIGIN;

  constructor(
    private readonly draft: BoardDraft,
    element: XmlElement,
  ) {
    this.layer = text(element, "layerRef");
    this.pads = new PadReader(draft, this.layer);
    if (this.layer === "") draft.problem(element.line, "LayerFeature", "names no layer.");
  }

  open(element: XmlElement): void {
    const { draft } = this;
    if (this.pads.busy) {
      this.pads.open(element);
      return;
    }
    switch (element.name) {
      case "Set":
        this.net = netName(element.attributes.net);
        this.pads.beginSet(this.net, element);
        return;
      case "Pad":
      case "Hole":
      case "SlotCavity":
        this.pads.open(element);
        return;
      case "Features":
        this.inFeatures = true;
        this.form = UNMOVED;
        this.at = ORIGIN;
        return;
      case "Xform":
        if (this.inFeatures) this.form = both(this.form, readXform(element, draft.metres));
        return;
      case "Location":
        if (this.inFeatures) this.at = place(draft, element) ?? ORIGIN;
        return;
      case "SpecRef":
        if (this.net) {
          const specs = draft.step.netSpecs.get(this.net) ?? new Set();
          draft.step.netSpecs.set(this.net, specs.add(text(element, "id")));
        }
        return;
      case "UserPrimitiveRef":
        if (this.net)
          draft.problem(
            element.line,
            element.name,
            `draws ${text(element, "id", 60)} for net ${this.net} from the dictionary; such copper is not read.`,
          );
        return;
      default:
        this.draw(element);
    }
  }

  close(name: string): void {
    if (this.pads.busy) this.pads.close(name);
    else if (name === "Polyline" || name === "Line" || name === "Arc") this.keepLine();
    else if (name === "Polygon" || name === "Cutout") this.keepPour();
    else if (name === "Features") this.inFeatures = false;
    else if (name === "Set") this.net = null;
  }

  private draw(element: XmlElement): void {
    const { draft } = this;
    switch (element.name) {
      case "Polyline":
      case "Line":
      case "Arc":
        draft.count(1);
        this.line = {
          path: new DrawnPath(draft),
          width_m: null,
          line: element.line,
          element: element.name,
        };
        if (element.name !== "Polyline") this.twoEnded(this.line.path, element);
        return;
      case "Polygon":
      case "Cutout":
        this.pour = { path: new DrawnPath(draft), cutout: element.name === "Cutout" };
        return;
      case "PolyBegin":
      case "PolyStepSegment":
      case "PolyStepCurve":
        (this.line ?? this.pour)?.path.take(element);
        return;
      case "LineDesc": {
        if (!this.line) return;
        const width = number(draft, element, "lineWidth");
        if (width !== null) this.line.width_m = width * draft.metres;
        return;
      }
      case "LineDescRef": {
        if (!this.line) return;
        const id = text(element, "id");
        const width = draft.lineWidths.get(id);
        if (width !== undefined) this.line.width_m = width;
        else
          draft.problem(
            element.line,
            element.name,
            `names line description '${id}', which is not in the dictionary.`,
          );
        return;
      }
    }
  }

  private twoEnded(path: DrawnPath, element: XmlElement): void {
    const start = place(this.draft, element, "startX", "startY");
    const end = start && place(this.draft, element, "endX", "endY");
    if (!start || !end) {
      path.broken = true;
      return;
    }
    path.begin(start.x, start.y);
    if (element.name === "Arc") path.curve(element, end);
    else path.straight(end.x, end.y);
  }

  private keepLine(): void {
    const { line } = this;
    this.line = null;
    if (!line || !this.net || line.path.broken) return;
    if (line.path.chords.length === 0) return;
    if (line.width_m === null || !(line.width_m > 0)) {
      this.draft.problem(
        line.line,
        line.element,
        `of net ${this.net} has no line width above zero; left out.`,
      );
      return;
    }
    const { path, chords } = line.path.placed(this.form, this.at);
    this.draft.step.traces.push({
      net: this.net,
      layer: this.layer,
      width_m: line.width_m * this.form.scale,
      path,
      chords,
      line: line.line,
    });
  }

  private keepPour(): void {
    const { pour } = this;
    this.pour = null;
    if (!pour || pour.path.broken || pour.path.points.length < 6) return;
    const outline: number[] = [];
    const { points } = pour.path;
    for (let index = 0; index + 1 < points.length; index += 2)
      outline.push(...placed(this.form, this.at, points[index] ?? 0, points[index + 1] ?? 0));
    this.draft.step.pours.push({ net: this.net, layer: this.layer, outline, cutout: pour.cutout });
  }
}

/** Profile: the board's own edge. */
export class ProfileReader implements SectionReader {
  private path: DrawnPath | null = null;

  constructor(private readonly draft: BoardDraft) {}

  open(element: XmlElement): void {
    if (element.name === "Polygon" || element.name === "Cutout")
      this.path = element.name === "Polygon" ? new DrawnPath(this.draft) : null;
    else if (element.name.startsWith("Poly")) this.path?.take(element);
  }

  close(name: string): void {
    if (name !== "Polygon") return;
    if (this.path && !this.path.broken && this.path.points.length >= 6)
      this.draft.step.profile.push(this.path.points);
    this.path = null;
  }
}
