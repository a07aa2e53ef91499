import "server-only";
import { ZipArchive } from "archiver";
import type { ReportFile } from "./report-files";

/**
 * A zip of the files in the order of their names, each with the same date and mode: identical files give
 * identical bytes on one version of Node (the compressor is Node's own).
 */
export function zipStream(files: readonly ReportFile[], date: Date): ReadableStream<Uint8Array> {
  const archive = new ZipArchive({ zlib: { level: 6 } });
  const ordered = [...files].sort((a, b) => (a.name < b.name ? -1 : 1));
  return new ReadableStream<Uint8Array>({
    start(controller) {
      archive.on("data", (part: Buffer) => controller.enqueue(new Uint8Array(part)));
      archive.on("end", () => controller.close());
      archive.on("error", (error: Error) => controller.error(error));
      for (const { name, content } of ordered) archive.append(content, { name, date, mode: 0o644 });
      void archive.finalize();
    },
    cancel() {
      archive.abort();
    },
  });
}
