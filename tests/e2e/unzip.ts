import { inflateRawSync } from "node:zlib";

/**
 * The files of a zip by name, read from its central directory (APPNOTE 6.3.10, 4.3.12 and 4.3.16). For the reports
 * that the tests download: no encryption, no spanning, no 64-bit sizes.
 * @throws Error where the archive is cut short or a file's length differs from what is written
 */
export function unzip(bytes: Buffer): Map<string, Buffer> {
  const end = bytes.lastIndexOf(Buffer.from([0x50, 0x4b, 0x05, 0x06]));
  if (end < 0) throw new Error("This is no zip: it has no end of central directory.");
  const count = bytes.readUInt16LE(end + 10);
  let at = bytes.readUInt32LE(end + 16);
  const files = new Map<string, Buffer>();
  for (let index = 0; index < count; index++) {
    if (bytes.readUInt32LE(at) !== 0x02014b50) throw new Error("The central directory is damaged.");
    const method = bytes.readUInt16LE(at + 10);
    const packed = bytes.readUInt32LE(at + 20);
    const size = bytes.readUInt32LE(at + 24);
    const nameLength = bytes.readUInt16LE(at + 28);
    const local = bytes.readUInt32LE(at + 42);
    const name = bytes.toString("utf8", at + 46, at + 46 + nameLength);
    const from = local + 30 + bytes.readUInt16LE(local + 26) + bytes.readUInt16LE(local + 28);
    const raw = bytes.subarray(from, from + packed);
    const content = method === 0 ? raw : inflateRawSync(raw);
    if (content.length !== size) throw new Error(`${name} has ${content.length} bytes instead of ${size}.`);
    files.set(name, content);
    at += 46 + nameLength + bytes.readUInt16LE(at + 30) + bytes.readUInt16LE(at + 32);
  }
  return files;
}
