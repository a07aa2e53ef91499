import type { IbisComponent, IbisDocument, IbisModel } from "./document";
import { checkNames } from "./check-names";
import { enclosed, modelKeywords, notSimulated, otherFiles, textKeywords } from "./keywords";
import { excerpt, type ProblemList } from "./problem";
import { newComponent, readDifferential, readPackage, readPins, readSelector } from "./read-component";
import { newModel, readModelBlock } from "./read-model";
import { BlockReader, split } from "./rows";
import type { IbisBlock } from "./scan";

/** Newest major version of the standard whose keywords are known here. */
const NEWEST_MAJOR = 7;
const VERSION = /^\d{1,2}\.\d{1,2}$/;
const HEADER: Readonly<Record<string, "fileName" | "fileRevision" | "date">> = {
  "file name": "fileName",
  "file rev": "fileRevision",
  date: "date",
};

/** Walks the blocks with the component, model or submodel they belong to. */
export function readBlocks(blocks: readonly IbisBlock[], problems: ProblemList): IbisDocument {
  const document: IbisDocument = {
    version: "",
    fileName: "",
    fileRevision: "",
    date: "",
    components: [],
    selectors: [],
    models: [],
    submodels: [],
  };
  const walk = new Walk(document, problems);
  for (const block of blocks) walk.take(block);
  walk.finish(blocks.at(-1));
  return document;
}

class Walk {
  private component: IbisComponent | null = null;
  private model: IbisModel | null = null;
  private isInSubmodel = false;
  /** keyword that ends what is being left out */
  private until: { end: string; block: IbisBlock } | null = null;
  private readonly told = new Set<string>();

  constructor(
    private readonly document: IbisDocument,
    private readonly problems: ProblemList,
  ) {}

  take(block: IbisBlock): void {
    if (this.until) {
      if (block.keyword === this.until.end) this.until = null;
      if (block.keyword !== "end") return;
    }
    const reader = new BlockReader(block, this.problems);
    if (this.takeHeader(block, reader) || this.takePart(block, reader)) return;
    const other = otherFiles.get(block.keyword);
    if (other && this.document.components.length === 0)
      reader.warn(block.line, `From here the file is ${other}. That part was left out.`);
    const outside = enclosed.get(block.keyword);
    if (outside) {
      this.until = { end: outside.end, block };
      reader.warn(block.line, `${outside.what} is known but not simulated; it was left out up to its end.`);
    } else if (notSimulated.has(block.keyword))
      this.tell(block, "is known but not simulated; it was left out.");
    else if (!other)
      this.tell(
        block,
        `'${excerpt(block.shown)}' is no keyword of the standard; it was left out. See whether it is misspelt.`,
      );
  }

  finish(last: IbisBlock | undefined): void {
    const { document, problems } = this;
    const line = last?.line ?? 1;
    if (this.until)
      problems.add(
        "error",
        this.until.block.line,
        this.until.block.shown,
        `Its end, [${this.until.end.replace(/^./, (c) => c.toUpperCase())}], is missing; everything after it was left out. Add the end.`,
      );
    if (last?.keyword !== "end")
      problems.add("warning", line, "[End]", "The file has no [End]. See whether it was cut off.");
    if (document.components.length === 0)
      problems.add(
        "error",
        line,
        "[Component]",
        "The file has no component, so no pin is known. Add [Component].",
      );
    if (document.models.length === 0)
      problems.add("error", line, "[Model]", "The file has no model. Choose another file, or add [Model].");
    checkNames(document, problems);
  }

  private takeHeader(block: IbisBlock, reader: BlockReader): boolean {
    const { keyword, rest, line } = block;
    const field = HEADER[keyword];
    if (field) this.document[field] = rest;
    else if (keyword === "ibis ver") {
      if (this.document.version !== "") reader.warn(line, "The version is given twice; the first holds.");
      else this.document.version = readVersion(rest, reader);
    } else return textKeywords.has(keyword) || keyword === "end";
    return true;
  }

  /** Blocks of components, selectors, models and submodels. */
  private takePart(block: IbisBlock, reader: BlockReader): boolean {
    const { keyword } = block;
    if (keyword === "component") {
      this.component = newComponent(reader);
      this.document.components.push(this.component);
      this.leaveModel();
    } else if (keyword === "model selector") {
      readSelector(this.document, reader);
      this.leaveModel();
    } else if (keyword === "model") {
      this.model = newModel(reader);
      this.document.models.push(this.model);
      this.isInSubmodel = false;
    } else if (keyword === "submodel") {
      const type = block.lines
        .map(({ text }) => split(text))
        .find(([word]) => /^submodel_type$/i.test(word ?? ""));
      this.document.submodels.push({ name: block.rest, line: block.line, type: type?.[1] ?? "" });
      this.leaveModel();
      this.isInSubmodel = true;
    } else if (this.isInSubmodel) return modelKeywords.has(keyword) || notSimulated.has(keyword);
    else if (keyword === "package" || keyword === "pin" || keyword === "diff pin")
      this.takeComponentBlock(keyword, reader);
    else if (this.model) return readModelBlock(this.model, reader);
    else if (modelKeywords.has(keyword))
      reader.refuse(block.line, "Stands outside a model; it was left out. Put it below its [Model].");
    else return false;
    return true;
  }

  private takeComponentBlock(keyword: "package" | "pin" | "diff pin", reader: BlockReader): void {
    const { component } = this;
    if (!component)
      reader.refuse(
        reader.block.line,
        "Stands outside a component; it was left out. Put it below its [Component].",
      );
    else if (keyword === "package") readPackage(component, reader);
    else if (keyword === "pin") readPins(component, reader);
    else readDifferential(component, reader);
  }

  private leaveModel(): void {
    this.model = null;
    this.isInSubmodel = false;
  }

  private tell({ keyword, shown, line }: IbisBlock, reason: string): void {
    if (this.told.has(keyword)) return;
    this.told.add(keyword);
    const whole = reason.startsWith("'") ? reason : `${excerpt(shown)} ${reason}`;
    this.problems.add("warning", line, shown, whole);
  }
}

function readVersion(rest: string, reader: BlockReader): string {
  const { line } = reader.block;
  const version = rest.split(/\s+/)[0] ?? "";
  if (!VERSION.test(version)) {
    reader.refuse(
      line,
      `'${excerpt(version)}' is no version. The file was read as version ${NEWEST_MAJOR}; write one such as 5.0.`,
    );
    return "";
  }
  if (Number(version.split(".")[0]) > NEWEST_MAJOR)
    reader.warn(
      line,
      `Version ${version} is newer than ${NEWEST_MAJOR}; keywords it adds are not known here.`,
    );
  return version;
}
