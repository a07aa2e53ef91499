/**
 * Runs in a worker thread: judges a batch of resolved paths with the same engine that the browser uses,
 * and prepares what the database will hold so that the serving thread only writes.
 */
import { createHash } from "node:crypto";
import { gzipSync } from "node:zlib";
import { canonicalJson } from "@/lib/schemas/canonical-json";
import { checkPath, engineVersion } from "@/lib/si";
import type { ResolvedPath } from "@/lib/si/path/types";
import type { Corner, PathResult } from "@/lib/si/rules/types";

export interface CheckBatch {
  paths: ResolvedPath[];
  corners: readonly Corner[];
}

export interface CheckedPath {
  pathId: string;
  name: string;
  className: string | null;
  classLineageId: string | null;
  driver: string | null;
  layers: string;
  inputHash: string;
  result: PathResult;
  /** gzip of the canonical result: every rule at every corner */
  detail: Uint8Array;
}

export default function checkBatch({ paths, corners }: CheckBatch): CheckedPath[] {
  return paths.map((path) => {
    const result = checkPath(path, { corners });
    return {
      pathId: path.id,
      name: path.name,
      className: path.className,
      classLineageId: path.classLineageId,
      driver: path.drivers[0]?.pin ?? null,
      layers: [...new Set(path.sections.map((section) => section.layer))].join(", "),
      inputHash: pathInputHash(path, corners),
      result,
      detail: gzipSync(canonicalJson(result), { level: 4 }),
    };
  });
}

/** SHA-256 over the resolved path with its limits, the corners and the engine's version. */
export function pathInputHash(path: ResolvedPath, corners: readonly Corner[]): string {
  return createHash("sha256")
    .update(canonicalJson({ engine: engineVersion, corners, path }))
    .digest("hex");
}
