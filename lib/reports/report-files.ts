import "server-only";
import { createHash } from "node:crypto";
import { canonicalJson } from "@/lib/schemas/canonical-json";

export interface ReportFile {
  name: string;
  content: string;
}

/** A file of canonical JSON: the same value gives the same bytes. */
export function jsonFile(name: string, value: unknown): ReportFile {
  return { name, content: `${canonicalJson(value)}\n` };
}

/** A name that every file system takes; two paths that would share one are told apart by their place. */
export function fileNames(names: readonly string[]): string[] {
  const taken = new Set<string>();
  return names.map((name) => {
    const plain =
      name
        .normalize("NFKD")
        .replace(/[^\w.+-]+/g, "_")
        .replace(/^[._]+/, "")
        .slice(0, 80) || "path";
    let free = plain;
    for (let count = 2; taken.has(free.toLowerCase()); count++) free = `${plain}~${count}`;
    taken.add(free.toLowerCase());
    return free;
  });
}

/** SHA-256 and size of each file, in the order of their names: what an acceptance of the report checks first. */
export function manifestFile(files: readonly ReportFile[], about: Record<string, unknown>): ReportFile {
  return jsonFile("manifest.json", {
    ...about,
    files: [...files]
      .sort((a, b) => (a.name < b.name ? -1 : 1))
      .map(({ name, content }) => ({
        name,
        bytes: Buffer.byteLength(content),
        sha256: createHash("sha256").update(content).digest("hex"),
      })),
  });
}
