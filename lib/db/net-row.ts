import "server-only";
import { SiValues } from "@/lib/resolve/si-values";
import type { NetDoc } from "@/lib/schemas/net";

/** The columns beside a net's document, which lists and filters read. */
export interface NetColumns {
  name: string;
  classLineageId: string | null;
  scope: NetDoc["scope"];
  scopeKind: NetDoc["scopeKind"];
  pinCount: number;
  sectionCount: number;
  viaCount: number;
  length_m: number;
  /** names in order of first use, joined by " · " */
  layers: string;
}

export function netColumns(doc: NetDoc, si = new SiValues()): NetColumns {
  const { sections, pins, viaCount } = doc.topology;
  return {
    name: doc.name,
    classLineageId: doc.classLineageId,
    scope: doc.scope,
    scopeKind: doc.scopeKind,
    pinCount: pins.length,
    sectionCount: sections.length,
    viaCount,
    length_m: sections.reduce((sum, section) => sum + si.of(section.length, "length"), 0),
    layers: [...new Set(sections.map((section) => section.layer))].join(" · "),
  };
}
