import type { ReadProgress } from "./document";
import { BoardFileError } from "./errors";
import { EXPANSION_ASKED_FROM, type ReadLimits } from "./limits";

const MB = 1024 * 1024;
/** Bytes taken between two tellings of the progress. */
const STEP_BYTES = 32 * 1024;

export interface ChunkOptions {
  limits: ReadLimits;
  totalBytes: number | null;
  onProgress?: ReadProgress;
  signal?: AbortSignal;
}

/** The text of a file as it streams in: unpacked where it is gzip, decoded as its first bytes say, within limits. */
export async function* textChunks(
  file: ReadableStream<Uint8Array>,
  options: ChunkOptions,
): AsyncGenerator<string> {
  const packed = new PackedBytes(file, options);
  try {
    const first = await packed.peek();
    if (first.length === 0) throw new BoardFileError("empty", "This file is empty. Export it again.");
    if (first[0] === 0x50 && first[1] === 0x4b)
      throw new BoardFileError(
        "not xml",
        "This file is a zip archive. Unpack it and choose the board file in it (.xml or .xml.gz).",
      );
    const gzip = first[0] === 0x1f && first[1] === 0x8b;
    const bytes = gzip ? unpacked(packed) : packed.chunks();
    let decoder: TextDecoder | null = null;
    let expanded = 0;
    for await (const chunk of bytes) {
      expanded += chunk.length;
      refuseTooLarge(expanded, packed.taken, options.limits);
      decoder ??= decoderFor(chunk);
      yield decodeText(decoder, chunk);
    }
    if (decoder) yield decodeText(decoder, null);
  } finally {
    await packed.close();
  }
}

/** The file as it came: counts what was taken, tells progress, stops when told to. */
class PackedBytes {
  taken = 0;
  private readonly reader: ReadableStreamDefaultReader<Uint8Array>;
  private held: Uint8Array | null = null;

  constructor(
    file: ReadableStream<Uint8Array>,
    private readonly options: ChunkOptions,
  ) {
    this.reader = file.getReader();
  }

  async peek(): Promise<Uint8Array> {
    this.held ??= await this.more();
    return this.held ?? new Uint8Array();
  }

  async next(): Promise<Uint8Array | null> {
    if (this.options.signal?.aborted)
      throw new BoardFileError("cancelled", "Reading was stopped; nothing was kept.");
    const all = this.held ?? (await this.more());
    if (!all) return null;
    this.held = all.length > STEP_BYTES ? all.subarray(STEP_BYTES) : null;
    const step = all.subarray(0, STEP_BYTES);
    this.taken += step.length;
    this.options.onProgress?.(this.taken, this.options.totalBytes);
    return step;
  }

  /** A stream may give empty chunks, in which no mark of a format is seen. */
  private async more(): Promise<Uint8Array | null> {
    for (;;) {
      const { done, value } = await this.reader.read();
      if (done) return null;
      if (value.length > 0) return value;
    }
  }

  async *chunks(): AsyncGenerator<Uint8Array> {
    for (let chunk = await this.next(); chunk; chunk = await this.next()) yield chunk;
  }

  async close(): Promise<void> {
    await this.reader.cancel().catch(() => undefined);
  }
}

async function* unpacked(packed: PackedBytes): AsyncGenerator<Uint8Array> {
  let refused: BoardFileError | null = null;
  const source = new ReadableStream<Uint8Array<ArrayBuffer>>({
    async pull(controller) {
      try {
        const chunk = await packed.next();
        if (chunk) controller.enqueue(new Uint8Array(chunk));
        else controller.close();
      } catch (error) {
        if (error instanceof BoardFileError) refused = error;
        controller.error(error);
      }
    },
  });
  const reader = source.pipeThrough(new DecompressionStream("gzip")).getReader();
  try {
    for (;;) {
      const { done, value } = await reader.read();
      if (done) return;
      yield value;
    }
  } catch (error) {
    if (refused) throw refused as BoardFileError;
    if (error instanceof BoardFileError) throw error;
    throw new BoardFileError(
      "damaged",
      "This gzip file is damaged or cut off. Export or send it again.",
      null,
      { cause: error },
    );
  } finally {
    await reader.cancel().catch(() => undefined);
  }
}

function refuseTooLarge(expanded: number, packed: number, limits: ReadLimits): void {
  if (expanded > limits.expandedBytes)
    throw new BoardFileError(
      "too large",
      `This file unpacks to more than ${Math.round(limits.expandedBytes / MB)} MB. Export only the conductor and drill layers.`,
    );
  if (expanded > EXPANSION_ASKED_FROM && expanded > packed * limits.expansion)
    throw new BoardFileError(
      "too large",
      `This file unpacks to more than ${limits.expansion} times its size, which no board file does. Send it as plain XML.`,
    );
}

/** By the byte order mark, else by the declaration, else UTF-8. */
function decoderFor(first: Uint8Array): TextDecoder {
  const [a, b] = first;
  if (a === 0xff && b === 0xfe) return new TextDecoder("utf-16le");
  if (a === 0xfe && b === 0xff) return new TextDecoder("utf-16be");
  const head = String.fromCharCode(...first.subarray(0, 200));
  const label = /^[^<]{0,3}<\?xml[^>]*\bencoding\s*=\s*["']([\w.-]{1,40})["']/.exec(head)?.[1] ?? "utf-8";
  try {
    return new TextDecoder(label, { fatal: true });
  } catch (cause) {
    throw new BoardFileError(
      "not text",
      `This file is written in '${label}', which is not known here. Export it as UTF-8.`,
      1,
      { cause },
    );
  }
}

function decodeText(decoder: TextDecoder, chunk: Uint8Array | null): string {
  try {
    return chunk ? decoder.decode(chunk, { stream: true }) : decoder.decode();
  } catch (cause) {
    throw new BoardFileError(
      "not text",
      `This file holds bytes that are no text in ${decoder.encoding.toUpperCase()}. Export it as UTF-8.`,
      null,
      { cause },
    );
  }
}
