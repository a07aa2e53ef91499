import { DelimitedError } from "./errors";
import { refuseKnownBinary, refuseMarkup } from "./sniff";

export type TextEncoding = "UTF-8" | "UTF-16 LE" | "UTF-16 BE" | "Windows-1252";

export interface DecodedText {
  /** Without byte-order mark; line ends are "\n". */
  text: string;
  encoding: TextEncoding;
  /** What the person should know, in sentences. */
  notices: string[];
}

/** 50 MB, which is some 500,000 rows of a section list. */
export const MAX_BYTES = 50 * 1024 * 1024;

/**
 * Text of a file of unknown origin: the byte-order mark decides, then strict UTF-8, then UTF-16 by its pattern of
 * zeros, then Windows-1252 with a notice.
 *
 * @throws DelimitedError for empty, too large and binary files, and for those that lie about their type
 */
export function decodeText(bytes: Uint8Array, maxBytes = MAX_BYTES): DecodedText {
  if (bytes.length > maxBytes)
    throw new DelimitedError(
      "too large",
      `The file has ${megabytes(bytes.length)} MB; at most ${megabytes(maxBytes)} MB can be read. Split it into parts.`,
    );
  refuseKnownBinary(bytes);
  const { text, encoding, notices } = decoded(bytes);
  const plain = normaliseText(text);
  return { text: plain, encoding, notices };
}

/** The same checks for text that was pasted. @throws DelimitedError */
export function normaliseText(text: string): string {
  const plain = text.replace(/^\uFEFF/, "").replace(/\r\n?/g, "\n");
  if (plain.trim() === "")
    throw new DelimitedError(
      "empty",
      "There is nothing in it. Choose a file with a header row and at least one row below.",
    );
  if (looksBinary(plain))
    throw new DelimitedError(
      "not text",
      "This is not text: it holds control characters that no table has. Export the list as CSV or tab-separated text.",
    );
  refuseMarkup(plain);
  return plain;
}

function decoded(bytes: Uint8Array): DecodedText {
  const [a, b, c] = bytes;
  if (a === 0xef && b === 0xbb && c === 0xbf) {
    const text = strictUtf8(bytes.subarray(3));
    if (text !== null) return { text, encoding: "UTF-8", notices: [] };
  }
  if (a === 0xff && b === 0xfe)
    return { text: decodeAs("utf-16le", bytes.subarray(2)), encoding: "UTF-16 LE", notices: [] };
  if (a === 0xfe && b === 0xff)
    return { text: decodeAs("utf-16be", bytes.subarray(2)), encoding: "UTF-16 BE", notices: [] };

  const wide = zeroPattern(bytes);
  if (wide)
    return {
      text: decodeAs(wide === "UTF-16 LE" ? "utf-16le" : "utf-16be", bytes),
      encoding: wide,
      notices: [`The file does not say its encoding; it was read as ${wide}.`],
    };
  const text = strictUtf8(bytes);
  if (text !== null) return { text, encoding: "UTF-8", notices: [] };
  return {
    text: decodeAs("windows-1252", bytes),
    encoding: "Windows-1252",
    notices: [
      "The file is not UTF-8; it was read as Windows-1252. Look at letters with accents, µ and Ω before you go on.",
    ],
  };
}

function strictUtf8(bytes: Uint8Array): string | null {
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    return null; // not UTF-8: the next encoding is tried
  }
}

function decodeAs(label: string, bytes: Uint8Array): string {
  return new TextDecoder(label).decode(bytes);
}

/** Western text in UTF-16 has a zero in every other byte. */
function zeroPattern(bytes: Uint8Array): "UTF-16 LE" | "UTF-16 BE" | null {
  const end = Math.min(bytes.length & ~1, 4096);
  if (end < 4) return null;
  let even = 0;
  let odd = 0;
  for (let i = 0; i < end; i += 2) {
    if (bytes[i] === 0) even++;
    if (bytes[i + 1] === 0) odd++;
  }
  const pairs = end / 2;
  if (odd > 0.7 * pairs && even === 0) return "UTF-16 LE";
  if (even > 0.7 * pairs && odd === 0) return "UTF-16 BE";
  return null;
}

/** A NUL anywhere, or more than one control character in two hundred. */
function looksBinary(text: string): boolean {
  let controls = 0;
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code === 0) return true;
    if ((code < 32 && code !== 9 && code !== 10 && code !== 13) || (code >= 0x7f && code < 0xa0)) controls++;
  }
  return controls * 200 > text.length;
}

function megabytes(bytes: number): string {
  return (bytes / 1024 / 1024).toFixed(bytes % (1024 * 1024) === 0 ? 0 : 1);
}
