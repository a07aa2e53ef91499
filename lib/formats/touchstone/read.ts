import {
  TouchstoneError,
  type TouchstoneDocument,
  type TouchstoneProblem,
  type TouchstoneReading,
} from "./document";
import { headOf } from "./head";
import { readMatrices } from "./matrices";
import { scan } from "./scan";

export const MAX_TOUCHSTONE_BYTES = 64 * 1024 * 1024;

/**
 * Reads a Touchstone file: version 1 (.s1p to .sNp and their Y, Z, G, H kin) and 2.0 and 2.1.
 *
 * Never throws for what a file holds; time and memory grow in proportion to its size.
 *
 * @param name  of the file; version 1 keeps the number of ports in its extension. Without it, lines tell
 * @see "Touchstone File Format Specification", version 2.0, IBIS Open Forum, 2009 (wording of rules from memory)
 */
export function readTouchstone(source: string | Uint8Array, name = ""): TouchstoneReading {
  const problems: TouchstoneProblem[] = [];
  try {
    const document = read(source, name, problems);
    return { document, problems };
  } catch (error) {
    if (!(error instanceof TouchstoneError)) throw error;
    return { document: null, problems: [{ severity: "error", line: error.line, reason: error.message }] };
  }
}

function read(source: string | Uint8Array, name: string, problems: TouchstoneProblem[]): TouchstoneDocument {
  const size = typeof source === "string" ? source.length : source.byteLength;
  if (size > MAX_TOUCHSTONE_BYTES)
    throw new TouchstoneError(
      1,
      `The file has ${Math.ceil(size / 1048576)} MB; at most 64 MB can be read. Thin out its frequencies.`,
    );
  const text = typeof source === "string" ? source : new TextDecoder("windows-1252").decode(source);
  const zero = text.indexOf("\u0000");
  if (zero >= 0)
    throw new TouchstoneError(
      text.slice(0, zero).split("\n").length,
      "The file holds a zero byte, so it is not text. Unpack or export it, and choose the .sNp file.",
    );
  const scanned = scan(text.replace(/^(\uFEFF|ï»¿)/, ""), problems);
  if (scanned.numbers.length === 0)
    throw new TouchstoneError(
      1,
      "The file holds no numbers, so it is no Touchstone file. Choose one such as coupon.s2p.",
    );
  const head = headOf(scanned, name, problems);
  const data = readMatrices(scanned, head, problems);
  return {
    version: head.version,
    kind: scanned.options.kind,
    format: scanned.options.format,
    data,
    mixedMode: head.mixedMode,
    comments: scanned.comments,
  };
}
