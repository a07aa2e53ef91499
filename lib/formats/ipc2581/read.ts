import { text } from "./attributes";
import type { BoardFile, ReadProgress } from "./document";
import { BoardDraft } from "./draft";
import { BoardFileError } from "./errors";
import { READ_LIMITS, type ReadLimits } from "./limits";
import { ContentReader } from "./read-content";
import { LayerFeatureReader, ProfileReader } from "./read-features";
import { CadHeaderReader } from "./read-header";
import { LayerReader, StackupReader } from "./read-layers";
import { PadStackDefReader, PadStackReader } from "./read-pads";
import { BomItemReader, ComponentReader, LogicalNetReader, PackageReader } from "./read-parts";
import { resolveBoard } from "./resolve-board";
import { XmlScanner, type XmlElement, type XmlHandler } from "./scan-xml";
import type { SectionReader } from "./section-reader";
import { textChunks } from "./text-chunks";

export interface ReadOptions {
  /** Size of the file as it comes [bytes], for the progress. */
  totalBytes?: number;
  onProgress?: ReadProgress;
  signal?: AbortSignal;
  limits?: Partial<ReadLimits>;
  /** Ends of lines nearer than this are one place [m]. */
  tolerance_m?: number;
}

/** 2 µm: above the rounding of coordinates, below the shortest section that a real board has. */
const TOLERANCE_M = 2e-6;

/**
 * Reads an IPC-2581 file (revision A to C; XML, or XML packed with gzip) as it streams in. Elements that cannot be
 * used are left out and told by line and element.
 *
 * @throws BoardFileError with a whole sentence where the file is not read at all
 */
export async function readBoard(
  file: ReadableStream<Uint8Array>,
  options: ReadOptions = {},
): Promise<BoardFile> {
  const limits = { ...READ_LIMITS, ...options.limits };
  const draft = new BoardDraft(limits.items);
  const scanner = new XmlScanner(new BoardHandler(draft), limits);
  const chunks = textChunks(file, {
    limits,
    totalBytes: options.totalBytes ?? null,
    onProgress: options.onProgress,
    signal: options.signal,
  });
  for await (const chunk of chunks) scanner.write(chunk);
  scanner.end();
  if (!draft.unit)
    throw new BoardFileError(
      "units",
      "This file has no CadHeader with its units: it holds no layout. Export it with its layers.",
    );
  return resolveBoard(draft, options.tolerance_m ?? TOLERANCE_M);
}

type MakeReader = (draft: BoardDraft, element: XmlElement) => SectionReader;

/** The parts of a file that are read, by the element that holds them; all else is passed over. */
const READERS: Readonly<Record<string, MakeReader>> = {
  Content: (draft) => new ContentReader(draft),
  CadHeader: (draft, element) => new CadHeaderReader(draft, element),
  BomItem: (draft, element) => new BomItemReader(draft, element),
  Layer: (draft, element) => new LayerReader(draft, element),
  Stackup: (draft, element) => new StackupReader(draft, element),
  Profile: (draft) => new ProfileReader(draft),
  PadStackDef: (draft, element) => new PadStackDefReader(draft, element),
  PadStack: (draft, element) => new PadStackReader(draft, element),
  Package: (draft, element) => new PackageReader(draft, element),
  Component: (draft, element) => new ComponentReader(draft, element),
  LogicalNet: (draft, element) => new LogicalNetReader(draft, element),
  LayerFeature: (draft, element) => new LayerFeatureReader(draft, element),
};

/** Hands each element to the reader of the part that it stands in. */
class BoardHandler implements XmlHandler {
  private reader: SectionReader | null = null;
  /** Elements open within the reader's own, itself included. */
  private depth = 0;
  private rooted = false;

  constructor(private readonly draft: BoardDraft) {}

  open(element: XmlElement): void {
    if (!this.rooted) this.root(element);
    else if (this.reader) {
      this.depth++;
      this.reader.open(element);
    } else if (element.name === "Step") this.draft.beginStep(text(element, "name"));
    else {
      const make = Object.hasOwn(READERS, element.name) ? READERS[element.name] : undefined;
      if (!make) return;
      this.reader = make(this.draft, element);
      this.depth = 1;
    }
  }

  close(name: string): void {
    if (!this.reader) return;
    this.reader.close(name);
    if (--this.depth === 0) this.reader = null;
  }

  private root(element: XmlElement): void {
    this.rooted = true;
    if (element.name !== "IPC-2581")
      throw new BoardFileError(
        "not ipc-2581",
        `This is XML, but its first element is ${element.name.slice(0, 60)}, not IPC-2581. Export the board as IPC-2581.`,
        element.line,
      );
    this.draft.revision = text(element, "revision", 10).toUpperCase();
    if (!/^[ABC]/.test(this.draft.revision))
      this.draft.problem(
        element.line,
        element.name,
        this.draft.revision === ""
          ? "states no revision; read as revision C."
          : `states revision ${this.draft.revision}; revisions A to C are known. Read as revision C.`,
      );
  }
}
