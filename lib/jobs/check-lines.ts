import "server-only";
import { createHash } from "node:crypto";
import { gzipSync } from "node:zlib";
import { canonicalJson } from "@/lib/schemas/canonical-json";
import { checkImpedance, type ControlledLine } from "@/lib/si/rules/check-impedance";
import { engineVersion } from "@/lib/si/version";
import type { CheckedPath } from "./check-worker";

/** The results of controlled lines in the shape of a batch of paths: one a class and layer, cheap enough for here. */
export function checkLines(lines: readonly ControlledLine[]): CheckedPath[] {
  return checkImpedance(lines).map(({ line, result }) => ({
    pathId: line.id,
    name: `${line.className} on ${line.layer}`,
    className: line.className,
    classLineageId: line.classLineageId,
    driver: null,
    layers: line.layer,
    inputHash: createHash("sha256")
      .update(canonicalJson({ engine: engineVersion, line }))
      .digest("hex"),
    result,
    detail: gzipSync(canonicalJson(result), { level: 4 }),
  }));
}
