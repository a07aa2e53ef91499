import { DelimitedError } from "./errors";

/** What the first bytes say a file is, whatever its name claims. */
const SIGNATURES: readonly { bytes: readonly number[]; what: string; way: string }[] = [
  {
    bytes: [0x50, 0x4b, 0x03, 0x04],
    what: "a zip archive or a spreadsheet workbook",
    way: "Save the sheet as CSV, or unpack it, and choose that file.",
  },
  {
    bytes: [0x50, 0x4b, 0x05, 0x06],
    what: "an empty zip archive",
    way: "Choose a CSV or tab-separated file.",
  },
  {
    bytes: [0xd0, 0xcf, 0x11, 0xe0],
    what: "an office document of the old kind",
    way: "Save the sheet as CSV and choose that file.",
  },
  { bytes: [0x1f, 0x8b], what: "a gzip archive", way: "Unpack it and choose the file inside." },
  { bytes: [0x37, 0x7a, 0xbc, 0xaf], what: "a 7z archive", way: "Unpack it and choose the file inside." },
  { bytes: [0x52, 0x61, 0x72, 0x21], what: "a RAR archive", way: "Unpack it and choose the file inside." },
  {
    bytes: [0x89, 0x50, 0x4e, 0x47],
    what: "a PNG picture",
    way: "Choose the list as CSV or tab-separated text.",
  },
  { bytes: [0xff, 0xd8, 0xff], what: "a JPEG picture", way: "Choose the list as CSV or tab-separated text." },
  {
    bytes: [0x47, 0x49, 0x46, 0x38],
    what: "a GIF picture",
    way: "Choose the list as CSV or tab-separated text.",
  },
  {
    bytes: [0x25, 0x50, 0x44, 0x46],
    what: "a PDF document",
    way: "Export the list as CSV and choose that file.",
  },
  {
    bytes: [0x7b, 0x5c, 0x72, 0x74, 0x66],
    what: "a rich-text document",
    way: "Save it as plain text or CSV and choose that file.",
  },
];

/** @throws DelimitedError "wrong type" where the bytes are those of a known kind of file that is no table */
export function refuseKnownBinary(bytes: Uint8Array): void {
  for (const { bytes: signature, what, way } of SIGNATURES)
    if (signature.every((byte, index) => bytes[index] === byte)) throw wrongType(what, way);
}

/** @throws DelimitedError "wrong type" for markup and JSON under the name of a table */
export function refuseMarkup(text: string): void {
  const start = text.slice(0, 512).trimStart().toLowerCase();
  const way = "Export the list as CSV or tab-separated text and choose that file.";
  if (start.startsWith("<!doctype html") || start.startsWith("<html")) throw wrongType("a web page", way);
  if (start.startsWith("<?xml") || /^<[a-z!][^,;\t\n]*>/.test(start)) throw wrongType("an XML file", way);
  if (/^\{\s*["}]/.test(start) || /^\[\s*[{[]/.test(start)) throw wrongType("a JSON file", way);
}

function wrongType(what: string, way: string): DelimitedError {
  return new DelimitedError("wrong type", `This is ${what}, not a table in text form. ${way}`);
}
